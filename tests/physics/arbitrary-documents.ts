import fc from 'fast-check';

/** Numbers of a size that a device could have, so that the documents are not only valid but buildable. */
const between = (min: number, max: number): fc.Arbitrary<number> => fc.double({ min, max, noNaN: true });

const material = fc.oneof(
  fc.constantFrom('NdFeB N42', 'NdFeB N35SH', 'SmCo 2:17 26H', 'Ferrite Y30'),
  fc.record({
    name: fc.constant('as measured'),
    remanence: between(0.3, 1.4),
    recoilPermeability: between(1, 1.2),
    remanencePerKelvin: between(-0.002, 0),
    intrinsicCoercivity: between(3e5, 2e6),
    density: between(4000, 9000),
    maxTemperature: between(60, 300),
  }),
);

const polarity = fc.constantFrom(1, -1);

const throughParts = fc
  .record({
    diameter: between(2e-3, 20e-3),
    slenderness: between(0.3, 2),
    bore: between(1.08, 1.5),
    depth: between(0.15, 0.8),
    width: between(0.3, 1.5),
    at: between(-0.8, 0.8),
    fill: between(0.1, 0.75),
    count: fc.integer({ min: 1, max: 3 }),
    hollow: fc.boolean(),
    material,
    sense: polarity,
    first: polarity,
  })
  .map(({ diameter, slenderness, bore, depth, width, at, fill, count, hollow, material: stuff, sense, first }) => {
    const length = slenderness * diameter;
    const inner = bore * diameter;
    const coil = {
      shape: 'round',
      innerDiameter: inner,
      outerDiameter: inner + 2 * depth * diameter,
      length: width * length,
    };
    const turns = 20 + Math.round(600 * fill);
    const overall = Math.sqrt((0.6 * fill * depth * diameter * width * length) / turns);
    const thin = Math.min(overall, 0.45 * Math.min(depth * diameter, width * length));
    return {
      layout: 'through',
      magnets: Array.from({ length: count }, (_, index) => ({
        shape: 'cylinder',
        outerDiameter: diameter,
        innerDiameter: hollow ? 0.3 * diameter : 0,
        length,
        at: (index - (count - 1) / 2) * 1.3 * length,
        polarity: index % 2 === 0 ? first : -first,
        material: stuff,
      })),
      coils: [{ ...coil, at: at * length, turns, sense, wire: { diameter: 0.8 * thin, overallDiameter: thin } }],
      size: length,
    };
  });

const circuit = fc.oneof(
  fc.record({ kind: fc.constant('resistor'), resistance: between(10, 1e5) }),
  fc.record({
    kind: fc.constant('bridge'),
    resistance: between(100, 1e5),
    capacitance: between(1e-6, 1e-3),
    diode: fc.constantFrom<unknown>('1N4148', 'BAT54', { drop: 0.3 }),
  }),
  fc.record({ kind: fc.constant('store'), voltage: between(0.2, 5), diode: fc.constantFrom('1N4148', '1N5817') }),
  fc.record({
    kind: fc.constant('tracker'),
    inputResistance: between(100, 1e4),
    startVoltage: between(0, 1),
    efficiency: between(0.3, 1),
    diode: fc.constant('1N5817'),
  }),
);

const frequency = between(8, 120);

/** Documents of the through layout on a linear or hardening spring with a resistor, and a tone near its resonance. */
export const resistorOnTone = fc
  .record({
    parts: throughParts,
    mass: between(2e-3, 0.1),
    frequency,
    cubic: fc.oneof(fc.constant(0), between(0, 1e7)),
    quality: between(5, 200),
    resistance: between(10, 1e5),
    angle: fc.constantFrom(0, Math.PI / 2, 0.3),
    detune: between(0.9, 1.1),
    acceleration: between(0.01, 3),
    temperature: between(-20, 70),
  })
  .map(({ parts, mass, frequency: f0, cubic, quality, resistance, angle, detune, acceleration, temperature }) => {
    const { size, ...geometry } = parts;
    const stiffness = mass * (2 * Math.PI * f0) ** 2;
    return {
      design: {
        ...geometry,
        axisAngle: angle,
        temperature,
        movingMass: { total: mass },
        // Hardening that shows at the size of the device, whatever its stiffness
        suspension: { kind: 'spring', stiffness, cubic: (cubic / 1e7) * (stiffness / size ** 2), neutralAt: 0 },
        damping: { quality },
        circuit: { kind: 'resistor', resistance },
      },
      vibration: { kind: 'tone', frequency: f0 * detune, acceleration, as: 'peak' },
    };
  });

/** Any valid design document of the through layout, whatever its circuit. */
export const anyDesign = fc
  .record({ base: resistorOnTone, circuit, title: fc.string({ maxLength: 40 }) })
  .map(({ base, circuit: feed, title }) => ({ ...base.design, title, circuit: feed }));
