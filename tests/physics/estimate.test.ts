import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { DocumentError, estimate } from '#physics/estimate';
import type { Estimate } from '#physics/estimate';
import { handbookValue, numberOf, referenceCase } from '../support/handbook';
import { anyDesign, resistorOnTone } from './arbitrary-documents';
import { wideDesign, wideVibration } from './wide-documents';

type Document = Record<string, unknown> & { coils: Record<string, unknown>[]; magnets: Record<string, unknown>[] };

const design = referenceCase('D1-01').design as Document;
const modelled = referenceCase('D2-01').design as Document;
const tone = { kind: 'tone', frequency: 50, acceleration: 1, as: 'peak' };
const relative = (value: number | null, expected: number): number => Math.abs((value ?? NaN) / expected - 1);

/** Paths of numbers that JSON cannot carry. */
function notFinite(value: unknown, path = ''): string[] {
  if (typeof value === 'number') return Number.isFinite(value) ? [] : [path];
  if (value === null || typeof value !== 'object') return [];
  return Object.entries(value).flatMap(([key, one]) => notFinite(one, `${path}.${key}`));
}

/** Paths that are null, outside lists. */
function notComputed(answer: Estimate): string[] {
  const parts = {
    coil: answer.coil,
    mechanics: answer.mechanics,
    response: answer.response,
    power: answer.power,
    bounds: answer.bounds,
  };
  return Object.entries(parts).flatMap(([part, figures]) =>
    Object.entries(figures)
      .filter(([, value]) => value === null)
      .map(([key]) => `${part}.${key}`),
  );
}

// Cases D1-01 and D2-01: the two figures that the reference device is known by
test('the reference device: 1.3001 mW with constant coupling, 1.2978 mW with the modelled one', () => {
  expect(relative(estimate(design, tone).response.loadPower, 0.001300134795)).toBeLessThan(1e-7);
  expect(relative(estimate(modelled, tone).response.loadPower, 0.001297792)).toBeLessThan(1e-5);
});

test('the same documents give the same estimate, bit for bit', () => {
  for (const document of [design, modelled, referenceCase('D3-02').design]) {
    expect(JSON.stringify(estimate(document, tone))).toBe(JSON.stringify(estimate(structuredClone(document), tone)));
  }
  const noise = {
    kind: 'spectrum',
    points: [
      [20, 0.001],
      [80, 0.001],
    ],
    unit: 'g^2/Hz',
    duration: 5,
    seed: 3,
  };
  expect(JSON.stringify(estimate(design, noise))).toBe(JSON.stringify(estimate(design, noise)));
});

test('inputs are left as they were', () => {
  const before = JSON.stringify(modelled);
  estimate(modelled, tone);
  expect(JSON.stringify(modelled)).toBe(before);
});

describe('positions of the curve', () => {
  test('are those asked for, evaluated exactly', () => {
    const { curve } = estimate(modelled, tone, { positions: [0, -0.002, 0.03] });
    expect(curve.position).toEqual([0, -0.002, 0.03]);
    expect(curve.coupling?.[0]).toBe(curve.couplingAtRest);
  });

  test('by default show the rest, the excursion and the peak of the coupling', () => {
    const { curve, mechanics, response } = estimate(modelled, tone);
    const position = curve.position ?? [];
    expect(position).toHaveLength(201);
    const [from, to] = [position[0] ?? NaN, position[200] ?? NaN];
    expect(from).toBeLessThan((mechanics.restPosition ?? NaN) - (response.displacementPeak ?? NaN));
    expect(to).toBeGreaterThan(curve.couplingPeakAt ?? NaN);
    const largest = Math.max(...(curve.coupling ?? []).map(Math.abs));
    expect(relative(curve.couplingPeak, largest)).toBeLessThan(2e-3);
    expect(curve.couplingPeak).toBeGreaterThanOrEqual(largest * (1 - 1e-12));
  });

  // Case F2-02: "peak coupling 6.05716246 V s/m at 5.567299 mm"
  test('the peak is found between positions: centred coil of the reference pair', () => {
    const { curve } = estimate(referenceCase('F2-02').design, tone, { positions: [0] });
    expect(relative(curve.couplingPeak, 6.05716246)).toBeLessThan(1e-8);
    expect(curve.couplingPeakAt).toBeCloseTo(0.005567299, 8);
  });

  test('of two equal peaks the one nearer to rest is named', () => {
    const centred = referenceCase('F2-02').design;
    const left = { ...centred, suspension: { kind: 'spring', stiffness: 2467.4011, neutralAt: '-1 mm' } };
    expect(estimate(left, tone).curve.couplingPeakAt).toBeCloseTo(-0.005567299, 8);
  });

  test.each([[['0']], [[NaN]], [[11]], ['zero'], [{}]])('%j is refused', (positions) => {
    expect(() => estimate(design, tone, { positions: positions as number[] })).toThrow(/positions/);
  });

  test('arrays can be left out', () => {
    const quiet = estimate(modelled, tone, { arrays: false });
    expect(quiet.curve).not.toHaveProperty('position');
    expect(quiet.waveforms).toBeNull();
    expect(quiet.response).toEqual(estimate(modelled, tone).response);
  });
});

describe('any valid document', () => {
  test('balances its energy, and what is not computed says why: 1,000 devices on a tone', () => {
    let unsolved = 0;
    fc.assert(
      fc.property(resistorOnTone, ({ design: document, vibration }) => {
        const answer = estimate(document, vibration, { arrays: false });
        expect(notFinite(answer)).toEqual([]);
        if (answer.response.loadPower === null) {
          unsolved += 1;
          expect(answer.notes.join(' ')).toMatch(/No steady response|did not converge|because/);
          return;
        }
        expect(Math.abs(answer.power.residual ?? NaN)).toBeLessThan(1e-6);
        expect(answer.response.loadPower).toBeLessThanOrEqual((answer.bounds.resonant ?? Infinity) * (1 + 1e-9));
      }),
      { numRuns: 1000, seed: 20, endOnFailure: true },
    );
    // Excursions of many magnet lengths may be beyond the harmonics; more than a few would be a defect
    expect(unsolved).toBeLessThanOrEqual(30);
  });

  test('gives finite numbers or null, whatever its circuit', () => {
    fc.assert(
      fc.property(anyDesign, (document) => {
        const answer = estimate(document, { kind: 'tone', frequency: 30, acceleration: 1, as: 'rms' });
        expect(notFinite(answer)).toEqual([]);
        const missing = notComputed(answer).filter((path) => path !== 'response.stopContact');
        if (missing.length > 0)
          expect(
            answer.notes.some((note) => /because/.test(note)),
            missing.join(),
          ).toBe(true);
      }),
      { numRuns: 40, seed: 21, endOnFailure: true },
    );
  });
});

test('whatever the schema takes is answered: finite numbers, honest nulls or named errors', () => {
  fc.assert(
    fc.property(wideDesign, wideVibration, (document, vibration) => {
      let answer: Estimate;
      try {
        answer = estimate(document, vibration);
      } catch (error) {
        if (!(error instanceof DocumentError)) throw error;
        expect(error.issues.every(({ path, message }) => path !== '' && message !== '')).toBe(true);
        return;
      }
      expect(notFinite(answer)).toEqual([]);
      const codes = answer.cautions.map(({ code }) => code);
      // A balance that does not close is never passed over in silence
      if (Math.abs(answer.power.residual ?? 0) > 0.005) expect(codes).toContain('not-trustworthy');
      if (answer.response.loadPower === null) expect(answer.notes.length).toBeGreaterThan(0);
    }),
    { numRuns: 14, seed: 4, endOnFailure: true },
  );
});

describe('laws', () => {
  const lengths = /^(outerDiameter|innerDiameter|length|at|diameter|overallDiameter)$/;

  /** Lengths × s, and the other inputs so that the same equations hold: ω/s, mass × s³, k × s, acceleration ÷ s. */
  function scaled(document: unknown, s: number): unknown {
    if (Array.isArray(document)) return document.map((one) => scaled(one, s));
    if (document === null || typeof document !== 'object') return document;
    return Object.fromEntries(
      Object.entries(document).map(([key, value]) => [
        key,
        typeof value === 'number' && lengths.test(key) ? value * s : scaled(value, s),
      ]),
    );
  }

  test('dimensional similarity: lengths times s', () => {
    const s = 1.7;
    const base = { ...modelled, asMeasured: null };
    const small = estimate(base, tone);
    // Time × s: frequency ÷ s, acceleration ÷ s; R ∝ 1/s, L ∝ s, θ ∝ s, c = m ω/Q ∝ s², power ∝ m a² / c ∝ s²·s⁻²·s³⁻²
    const large = estimate(
      {
        ...(scaled(base, s) as object),
        movingMass: { total: 0.025 * s ** 3 },
        suspension: { kind: 'spring', stiffness: 2467.40110027234 * s },
        circuit: { kind: 'resistor', resistance: 804.160706 / s },
      },
      { ...tone, frequency: 50 / s, acceleration: 1 / s },
    );
    expect(relative(large.coil.inductance, s * (small.coil.inductance ?? NaN))).toBeLessThan(1e-9);
    expect(relative(large.coil.resistance, (small.coil.resistance ?? NaN) / s)).toBeLessThan(1e-12);
    expect(relative(large.curve.couplingPeak, s * (small.curve.couplingPeak ?? NaN))).toBeLessThan(1e-9);
    expect(large.mechanics.quality).toBeCloseTo(small.mechanics.quality ?? NaN, 9);
  });

  test('turns times n: EMF × n, resistance × n² in the same window, the same power into n² times the load', () => {
    const base = { ...modelled, asMeasured: null };
    const n = 0.25;
    const wire = { diameter: 1e-4 / Math.sqrt(n), overallDiameter: 1.17e-4 / Math.sqrt(n) };
    const few = {
      ...base,
      coils: [{ ...base.coils[0], turns: 250, wire }],
      circuit: { kind: 'resistor', resistance: 804.160706 * n * n },
    };
    const [many, less] = [estimate(base, tone), estimate(few, tone)];
    expect(relative(less.response.loadPower, many.response.loadPower ?? NaN)).toBeLessThan(1e-9);
    expect(relative(less.response.openCircuitEmfRms, n * (many.response.openCircuitEmfRms ?? NaN))).toBeLessThan(1e-9);
    expect(relative(less.coil.inductance, n * n * (many.coil.inductance ?? NaN))).toBeLessThan(1e-12);
  });

  test('reciprocity: the coil moved by −x sees what the magnet moved by x gives', () => {
    const base = { ...modelled, asMeasured: null };
    const moved = { ...base, coils: [{ ...base.coils[0], at: -0.005567299 - 0.002 }] };
    const magnet = estimate(base, tone, { positions: [0.002] });
    const coil = estimate(moved, tone, { positions: [0] });
    expect(relative(coil.curve.coupling?.[0] ?? null, magnet.curve.coupling?.[0] ?? NaN)).toBeLessThan(1e-12);
  });

  test('polarity and sense turn the sign of the coupling and nothing else', () => {
    const base = { ...modelled, asMeasured: null };
    const plain = estimate(base, tone);
    for (const turned of [
      { ...base, coils: [{ ...base.coils[0], sense: -1 }] },
      { ...base, magnets: [{ ...base.magnets[0], polarity: -1 }] },
    ]) {
      const answer = estimate(turned, tone);
      expect(answer.curve.couplingAtRest).toBe(-(plain.curve.couplingAtRest ?? NaN));
      expect(relative(answer.response.loadPower, plain.response.loadPower ?? NaN)).toBeLessThan(1e-12);
    }
  });
});

describe('cautions', () => {
  const codes = (document: unknown, vibration: unknown = tone, options = {}): string[] =>
    estimate(document, vibration, options).cautions.map(({ code }) => code);
  const change = (changes: object): unknown => ({ ...design, ...changes });
  const base = design;

  test.each<[string, unknown, unknown]>([
    ['off-resonance', design, { ...tone, frequency: 49 }],
    ['touch-voltage', change({ asMeasured: { coupling: 200 } }), tone],
    ['lighter-than-magnets', change({ movingMass: { total: '5 g' } }), tone],
    ['orthocyclic-lay', change({ coils: [{ ...base.coils[0], turns: 1400 }] }), tone],
    ['not-windable', change({ coils: [{ ...base.coils[0], turns: 1500 }] }), tone],
    ['magnet-temperature', change({ temperature: 100 }), tone],
    [
      'demagnetisation',
      change({ magnets: [{ ...base.magnets[0], length: '1 mm', material: 'NdFeB N52' }], temperature: 70 }),
      tone,
    ],
    ['coercivity-coefficient-unknown', change({ temperature: 60 }), tone],
    ['parts-overlap', change({ coils: [base.coils[0], base.coils[0]] }), tone],
    [
      'several-responses',
      referenceCase('D3-02').design,
      { kind: 'tone', frequency: 53, acceleration: 1.5, as: 'peak' },
    ],
    [
      'stop-contact',
      change({ stops: { upper: '0.7 mm', stiffness: 50000, damping: 3 } }),
      { ...tone, acceleration: 1.2 },
    ],
    ['rest-on-stop', change({ axisAngle: '90 deg', stops: { lower: '0.1 mm', stiffness: 50000 } }), tone],
    ['coil-in-path', change({ coils: [{ ...base.coils[0], innerDiameter: '4 mm', at: '-8.5 mm' }] }), tone],
  ])('%s', (code, document, vibration) => {
    expect(codes(document, vibration)).toContain(code);
  });

  test('the reference device at its resonance has only that of every strong magnet', () => {
    expect(codes(design)).toEqual(['implants']);
    // handbook/safety.json#half-millitesla-1 (P1): 68.8 mm from the centre
    expect(estimate(design, tone).cautions[0]?.message).toContain('64 mm from the magnets');
  });

  test('large magnets fall under the rules of air transport', () => {
    const large = { ...base.magnets[0], outerDiameter: '40 mm', length: '60 mm' };
    const wide = { ...base.coils[0], innerDiameter: '44 mm', outerDiameter: '50 mm' };
    expect(codes(change({ magnets: [large], coils: [wide], movingMass: { added: 0 } }))).toContain('air-transport');
  });

  test('levitation needs a guide', () => {
    expect(codes(referenceCase('F6-01').design)).toContain('needs-guide');
  });

  test('hard ferrite is checked in the cold, rare earth in the heat', () => {
    const thin = (material: string, length: string): unknown =>
      change({ magnets: [{ ...base.magnets[0], length, material }] });
    const range = { temperatureRange: { coldest: -40, hottest: 80 } };
    expect(codes(thin('Ferrite Y25', '7 mm'))).not.toContain('demagnetisation');
    expect(codes(thin('Ferrite Y25', '7 mm'), tone, range)).toContain('demagnetisation');
    expect(codes(thin('NdFeB N42', '3 mm'))).not.toContain('demagnetisation');
    expect(codes(thin('NdFeB N42', '3 mm'), tone, range)).toContain('demagnetisation');
  });

  // handbook/magnets.json#knee-… (P1)
  test.each(['knee-01', 'knee-02'])('%s: operating point at 80 °C', (id) => {
    const { given, expected } = handbookValue('magnets', id);
    const magnet = {
      outerDiameter: numberOf(given, 'diameter_m'),
      length: numberOf(given, 'length_m'),
      material: {
        remanence: numberOf(given, 'remanence20_T'),
        recoilPermeability: numberOf(given, 'recoilPermeability'),
        remanencePerKelvin: numberOf(given, 'remanenceTempCoeff_percentPerK') / 100,
        intrinsicCoercivity: 1000 * numberOf(given, 'intrinsicCoercivity20_kAPerM'),
        intrinsicCoercivityPerKelvin: numberOf(given, 'coercivityTempCoeff_percentPerK') / 100,
        density: 7500,
      },
    };
    const wide = { ...base.coils[0], innerDiameter: '22 mm', outerDiameter: '28 mm' };
    const answer = estimate(
      change({ magnets: [magnet], coils: [wide], movingMass: { added: '10 g' }, temperature: 80 }),
      tone,
    );
    const found = answer.cautions.find(({ code }) => code === 'demagnetisation');
    expect(found !== undefined).toBe(expected['demagnetised']);
    if (found) expect(found.message).toContain('736 kA/m');
  });

  test('the worst come first', () => {
    const { cautions } = estimate(change({ coils: [{ ...base.coils[0], turns: 1500 }], temperature: 100 }), {
      ...tone,
      frequency: 49,
    });
    const rank = cautions.map(({ severity }) => ['stop', 'caution', 'info'].indexOf(severity));
    expect(rank).toEqual([...rank].sort((a, b) => a - b));
    expect(new Set(rank).size).toBeGreaterThan(1);
  });
});
