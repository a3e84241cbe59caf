import fc from 'fast-check';

/*
 * Documents of every layout, suspension, circuit and vibration, far beyond what anybody would build: the schema takes
 * them, so the estimate must answer them with finite numbers, honest nulls or named errors.
 */

const logarithmic = (low: number, high: number): fc.Arbitrary<number> =>
  fc.double({ min: Math.log(low), max: Math.log(high), noNaN: true }).map(Math.exp);
const within = (half: number): fc.Arbitrary<number> => fc.double({ min: -half, max: half, noNaN: true });
const sign = fc.constantFrom(1, -1);
const material = fc.constantFrom('NdFeB N42', 'Ferrite Y30', 'SmCo 2:17 26H');
const thinWire = { diameter: 1e-5, overallDiameter: 1.2e-5 };

const cylinder = fc.record({
  outerDiameter: logarithmic(1e-3, 0.05),
  length: logarithmic(5e-4, 0.1),
  at: within(0.1),
  polarity: sign,
  material,
});

/** Coils of any proportion, most of which let the widest magnet through. */
const axialCoil = (widest: number): fc.Arbitrary<object> =>
  fc
    .record({
      bore: fc.double({ min: 0.95, max: 3, noNaN: true }),
      ratio: fc.double({ min: 1.05, max: 4, noNaN: true }),
      length: logarithmic(3e-4, 0.1),
      at: within(0.1),
      turns: fc.integer({ min: 1, max: 100 }),
      sense: sign,
    })
    .map(({ bore, ratio, ...coil }) => ({
      ...coil,
      innerDiameter: bore * widest,
      outerDiameter: bore * widest * ratio,
      wire: thinWire,
    }));

const block = fc.record({
  size: fc.tuple(logarithmic(1e-3, 0.05), logarithmic(1e-3, 0.05), logarithmic(5e-4, 0.02)),
  at: fc.tuple(within(0.05), within(0.02), fc.double({ min: 4e-3, max: 0.03, noNaN: true })),
  polarity: sign,
  material,
});

const face = fc.record({
  length: logarithmic(3e-4, 5e-3),
  at: fc.tuple(within(0.02), fc.constant(0), fc.constant(0)),
  turns: fc.constant(100),
  wire: fc.constant(thinWire),
});
const small = logarithmic(1e-3, 0.01);
const ratio = fc.double({ min: 1.1, max: 3, noNaN: true });
const faceCoil = fc.oneof(
  fc
    .tuple(face, small, ratio)
    .map(([rest, inner, r]) => ({ shape: 'round', innerDiameter: inner, outerDiameter: inner * r, ...rest })),
  fc.tuple(face, small, ratio, small).map(([rest, inner, r, straight]) => ({
    shape: 'racetrack',
    straight,
    innerEndRadius: inner,
    outerEndRadius: inner * r,
    ...rest,
  })),
  fc.tuple(face, small, small, logarithmic(5e-4, 5e-3)).map(([rest, a, b, build]) => ({
    shape: 'rectangular',
    inner: [a, b],
    outer: [a + 2 * build, b + 2 * build],
    ...rest,
  })),
);

const suspension = fc.oneof(
  fc.record({
    kind: fc.constant('spring'),
    stiffness: logarithmic(1, 1e5),
    cubic: fc.oneof(
      fc.constant(0),
      logarithmic(1, 1e10),
      logarithmic(1, 1e9).map((value) => -value),
    ),
  }),
  fc.record({
    kind: fc.constant('spring'),
    stiffness: logarithmic(1, 1e4).map((value) => -value),
    cubic: logarithmic(1e3, 1e10),
  }),
  fc.record({
    kind: fc.constant('helical'),
    wireDiameter: logarithmic(1e-4, 2e-3),
    meanDiameter: logarithmic(3e-3, 3e-2),
    activeTurns: fc.integer({ min: 2, max: 30 }),
  }),
  logarithmic(1, 1e4).map((k) => ({
    kind: 'table',
    displacement: [-0.01, -0.005, 0, 0.005, 0.01],
    force: [0.012 * k, 0.005 * k, 0, -0.005 * k, -0.013 * k],
  })),
);
const levitated = cylinder.map((magnet) => ({
  kind: 'levitated',
  fixed: [-0.15, 0.15].map((at) => ({ ...magnet, at, polarity: -1 })),
}));

const diode = fc.constantFrom<unknown>('1N4148', 'BAT54', { drop: 0 }, { drop: 0.4 });
const node = { sleepCurrent: 1e-6, activeCurrent: 1e-3, activeTime: 0.01, period: 0.3, minimumVoltage: 1.8 };
const circuit = fc.oneof(
  fc.record({ kind: fc.constant('resistor'), resistance: logarithmic(1e-3, 1e9) }),
  fc.record({
    kind: fc.constantFrom('bridge', 'doubler'),
    resistance: logarithmic(1, 1e7),
    capacitance: logarithmic(1e-9, 1),
    diode,
  }),
  fc.record({ kind: fc.constant('store'), voltage: logarithmic(1e-2, 100), diode }),
  fc.record({
    kind: fc.constant('tracker'),
    inputResistance: logarithmic(1, 1e6),
    startVoltage: fc.constantFrom(0, 0.5, 20),
    diode,
  }),
  fc.record({
    kind: fc.constant('supercapacitor'),
    capacitance: logarithmic(1e-4, 1),
    leakageResistance: logarithmic(1e3, 1e8),
    initialVoltage: fc.constantFrom(0, 1),
    diode,
    node: fc.constant(node),
    duration: logarithmic(0.02, 0.3),
  }),
);

const surroundings = fc.record({
  axisAngle: fc.constantFrom(0, Math.PI / 2, -0.7),
  temperature: fc.constantFrom(20, -30, 90),
  movingMass: fc.oneof(
    logarithmic(1e-4, 1).map((total) => ({ total })),
    logarithmic(1e-4, 0.1).map((added) => ({ added })),
  ),
  damping: fc.oneof(
    logarithmic(0.5, 1e4).map((quality) => ({ quality })),
    logarithmic(1e-4, 10).map((coefficient) => ({ coefficient, quadratic: 0.01 })),
    fc.constant({ coefficient: 0 }),
  ),
  stops: fc.option(fc.constant({ lower: -0.004, upper: 0.004, stiffness: 1e5, damping: 2 }), { freq: 4 }),
  circuit,
});

/** Any device at all. */
export const wideDesign = fc.oneof(
  {
    weight: 3,
    arbitrary: fc
      .tuple(
        surroundings,
        fc.array(cylinder, { minLength: 1, maxLength: 3 }),
        fc.oneof({ weight: 4, arbitrary: suspension }, { weight: 1, arbitrary: levitated }),
      )
      .chain(([rest, magnets, hold]) => {
        const widest = Math.max(...magnets.map(({ outerDiameter }) => outerDiameter));
        const coils = fc.array(axialCoil(widest), { minLength: 1, maxLength: 2 });
        return fc.tuple(fc.constant(rest), fc.constant(magnets), coils, fc.constant(hold));
      })
      .map(([rest, magnets, coils, hold]) => ({ layout: 'through', ...rest, magnets, coils, suspension: hold })),
  },
  {
    weight: 1,
    arbitrary: fc
      .tuple(
        surroundings,
        fc.array(block, { minLength: 1, maxLength: 2 }),
        fc.array(faceCoil, { minLength: 1, maxLength: 2 }),
        suspension,
      )
      .map(([rest, magnets, coils, hold]) => ({ layout: 'across', ...rest, magnets, coils, suspension: hold })),
  },
);

/** Any vibration at all, short enough for a test. */
export const wideVibration = fc.oneof(
  fc.record({
    kind: fc.constant('tone'),
    frequency: logarithmic(1, 500),
    acceleration: logarithmic(1e-3, 100),
    as: fc.constantFrom('peak', 'rms'),
  }),
  fc
    .tuple(logarithmic(5, 200), fc.constantFrom(2, 1.5, Math.SQRT2), logarithmic(1e-2, 20))
    .map(([frequency, factor, acceleration]) => ({
      kind: 'tones',
      tones: [1, factor].map((times) => ({ frequency: frequency * times, acceleration, as: 'peak' })),
    })),
  fc.tuple(logarithmic(1, 50), logarithmic(1e-6, 0.1)).map(([frequency, density]) => ({
    kind: 'spectrum',
    points: [
      [frequency, density],
      [5 * frequency, 2 * density],
    ],
    unit: 'g^2/Hz',
    duration: 1,
    seed: 3,
  })),
  logarithmic(1e-2, 50).map((size) => ({
    kind: 'recording',
    rate: 500,
    unit: 'm/s^2',
    acceleration: Array.from({ length: 300 }, (_, index) => size * Math.sin(0.7 * index) * Math.sin(0.01 * index)),
  })),
);
