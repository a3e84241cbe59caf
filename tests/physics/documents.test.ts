import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { catalogueDiodes, catalogueMagnets, catalogueWires } from '#physics/catalogue';
import { canonicalText } from '#physics/canonical';
import {
  DocumentError,
  designField,
  designFields,
  parseDesignDocument,
  readDesignDocument,
} from '#physics/design-document';
import type { DocumentField } from '#physics/design-document';
import { digestOfDocument, digestOfInputs } from '#physics/digest';
import { estimate } from '#physics/estimate';
import { dimensions, parseQuantity } from '#physics/quantity';
import { parseVibrationDocument, readVibrationDocument, vibrationFields } from '#physics/vibration-document';
import { handbookValue, numberOf, referenceCase } from '../support/handbook';
import { anyDesign } from './arbitrary-documents';

type Json = Record<string, unknown>;

const reference = referenceCase('D1-01').design;
const tone = { kind: 'tone', frequency: 50, acceleration: 1, as: 'peak' };
const across = referenceCase('F3-03').design;

/** A copy with one value replaced, or left out where it is undefined; keys are made where they are missing. */
function withValue(document: Json, path: string, value: unknown): Json {
  const copy = structuredClone(document);
  const keys = path.split('.');
  let target: Json = copy;
  for (const key of keys.slice(0, -1)) target = (target[key] ??= {}) as Json;
  const last = keys[keys.length - 1] ?? '';
  if (value === undefined) delete target[last];
  else target[last] = value;
  return copy;
}

describe('canonical form', () => {
  test('quantities as typed and as SI numbers are one document', () => {
    const typed = {
      title: 'Reference device',
      layout: 'through',
      magnets: [
        {
          outerDiameter: '10 mm',
          length: '1 cm',
          material: {
            remanence: '13 kG',
            recoilPermeability: 1,
            remanencePerKelvin: '-0.12 %/K',
            intrinsicCoercivity: '955 kA/m',
            density: '7.5 g/cm^3',
          },
        },
      ],
      coils: [
        {
          innerDiameter: '12 mm',
          outerDiameter: '18 mm',
          length: '6 mm',
          at: '-5.567299 mm',
          turns: '1000',
          wire: { diameter: '0.1 mm', overallDiameter: '117 um' },
        },
      ],
      movingMass: { total: '25 g' },
      suspension: { kind: 'spring', stiffness: '2.46740110027234 kN/m' },
      damping: { quality: 150 },
      circuit: { kind: 'resistor', resistance: '804.160706 ohm' },
      asMeasured: { coilResistance: '103.448276 ohm', coilInductance: '0 mH', coupling: '6.05716246 V s/m' },
    };
    expect(canonicalText(parseDesignDocument(typed))).toBe(canonicalText(parseDesignDocument(reference)));
  });

  test('defaults are written out and keys stand in schema order', () => {
    const document = parseDesignDocument(reference);
    expect(Object.keys(document)).toEqual([
      'format',
      'title',
      'layout',
      'axisAngle',
      'temperature',
      'recoil',
      'magnets',
      'misalignment',
      'coils',
      'conductivity',
      'movingMass',
      'suspension',
      'damping',
      'stops',
      'circuit',
      'asMeasured',
    ]);
    expect(document.recoil).toBe(true);
    expect(document.stops).toBeNull();
    expect(document.damping).toEqual({ quality: 150, quadratic: 0 });
  });

  test('the order of keys in the file does not matter', () => {
    const reversed = Object.fromEntries(Object.entries(reference).reverse());
    expect(canonicalText(parseDesignDocument(reversed))).toBe(canonicalText(parseDesignDocument(reference)));
  });

  test('minus zero is zero', () => {
    expect(canonicalText(parseDesignDocument(withValue(reference, 'axisAngle', -0)))).toContain('"axisAngle":0,');
  });

  test('any valid document survives canonicalisation unchanged', () => {
    fc.assert(
      fc.property(anyDesign, (design) => {
        const once = canonicalText(parseDesignDocument(design));
        expect(canonicalText(parseDesignDocument(JSON.parse(once)))).toBe(once);
      }),
      { numRuns: 300 },
    );
  });

  test('a spectrum in g²/Hz and in SI are one document; a recording in g likewise', () => {
    const g = parseVibrationDocument({
      kind: 'spectrum',
      points: [
        ['10 Hz', 0.015],
        [200, 0.015],
      ],
      unit: 'g^2/Hz',
    });
    const si = parseVibrationDocument({
      kind: 'spectrum',
      points: [
        [10, 0.015 * 96.1703842225],
        [200, 0.015 * 96.1703842225],
      ],
      unit: '(m/s^2)^2/Hz',
      duration: '1 min',
      seed: 1,
    });
    expect(canonicalText(g)).toBe(canonicalText(si));
    const recording = parseVibrationDocument({ kind: 'recording', rate: '1 kHz', unit: 'g', acceleration: [0, 1] });
    expect(recording).toMatchObject({ rate: 1000, unit: 'm/s^2', acceleration: [0, 9.80665] });
    expect(canonicalText(parseVibrationDocument(JSON.parse(canonicalText(recording))))).toBe(canonicalText(recording));
  });
});

describe('digest', () => {
  test('is the SHA-256 of the canonical text', () => {
    const document = parseDesignDocument(reference);
    const expected = createHash('sha256').update(canonicalText(document)).digest('hex');
    expect(digestOfDocument(document)).toBe(expected);
    expect(expected).toMatch(/^[0-9a-f]{64}$/);
  });

  test('stays what it is: a change here changes the digest of every stored document', () => {
    expect(digestOfInputs(parseDesignDocument(reference), parseVibrationDocument(tone))).toBe(
      '98fdef927a3210c18deaae67d9a5d6b2fdc4b162c9e866364ba72d14404e5b8e',
    );
  });

  test('changes with either document', () => {
    const design = parseDesignDocument(reference);
    const other = parseDesignDocument(withValue(reference, 'temperature', 21));
    const fifty = parseVibrationDocument(tone);
    const louder = parseVibrationDocument({ ...tone, acceleration: 2 });
    expect(
      new Set([digestOfInputs(design, fifty), digestOfInputs(other, fifty), digestOfInputs(design, louder)]).size,
    ).toBe(3);
  });
});

describe('bad design documents name path, value and limit', () => {
  test.each<[path: string, value: unknown, message: RegExp, limit?: number]>([
    ['magnets.0.length', '-3 mm', /too small/, 1e-5],
    ['magnets.0.length', '3 kg', /“kg” measures a mass/],
    ['magnets.0.length', '5,5 mm', /decimal point/],
    ['magnets.0.length', undefined, /is missing/],
    ['magnets.0.length', NaN, /not a finite number/],
    ['magnets.0.length', Infinity, /not a finite number/],
    ['magnets.0.length', true, /must be a quantity/],
    ['magnets.0.length', '2 m', /too large/, 1],
    ['magnets.0.innerDiameter', '10 mm', /smaller than the outer diameter/, 0.01],
    ['magnets.0.polarity', 2, /must be 1 or -1/],
    ['magnets.0.shape', 'block', /must be cylinder/],
    ['magnets.0.material', 'NdFeB N99', /catalogue has no magnet material/],
    ['magnets.0.material', 'AlNiCo 5', /not straight/],
    ['magnets.0.material.name', 'Alnico 8', /not straight/],
    ['magnets.0.material.recoilPermeability', 3, /too large/, 1.5],
    ['magnets.0.colour', 'red', /key “colour” is not known/],
    ['magnets', [], /at least 1/, 1],
    ['magnets', 'one', /must be a list/],
    ['coils.0.outerDiameter', undefined, /is missing/],
    ['coils.0.innerDiameter', '20 mm', /smaller than the outer diameter/, 0.018],
    ['coils.0.turns', 1e9, /too large/, 1e6],
    ['coils.0.turns', 10.5, /whole number/],
    ['coils.0.turns', 0, /too small/, 1],
    ['coils.0.wire', 'AWG 99', /catalogue has no wire/],
    ['coils.0.wire.overallDiameter', '0.09 mm', /not be below the bare diameter/, 1e-4],
    ['conductivity', '58 kg', /measures a mass/],
    ['movingMass', { total: 1, added: 1 }, /not both/],
    ['movingMass', {}, /needs total or added/],
    ['movingMass.total', '-25 g', /too small/, 1e-6],
    ['suspension.kind', 'rubber', /must be one of spring, helical, levitated, table/],
    ['suspension.stiffness', undefined, /is missing/],
    ['suspension', { kind: 'table', displacement: [0, 1e-3], force: [0] }, /at least 2/],
    ['suspension', { kind: 'levitated', fixed: [] }, /at least 1/],
    ['damping', {}, /needs quality or coefficient/],
    ['damping', { quality: 150, coefficient: 1 }, /not both/],
    ['damping.quality', 0, /too small/, 0.01],
    ['stops', { stiffness: 1000 }, /needs lower, upper or both/],
    ['stops', { lower: '4 mm', upper: '-4 mm', stiffness: 1000 }, /must lie below/],
    ['circuit.kind', 'amplifier', /must be one of resistor, bridge/],
    ['circuit.resistance', 0, /too small/, 1e-3],
    ['circuit.resistance', '4k7 F', /not understood as a resistance/],
    ['asMeasured.coupling', 'strong', /does not start with a number/],
    ['asMeasured.coupling', { position: [0, 0], coupling: [1, 1] }, /must rise/],
    ['axisAngle', '700 deg', /too large/],
    ['format', 'tremolode-design/2', /must be tremolode-design\/1/],
    ['layout', 'sideways', /must be one of through, across/],
    ['title', 'x'.repeat(300), /takes at most 200/],
    ['recoil', 'yes', /true or false/],
    ['extra', 1, /key “extra” is not known/],
    ['misalignment.twist', 1, /key “twist” is not known/],
  ])('%s = %j', (path, value, message, limit) => {
    const reading = readDesignDocument(withValue(reference, path, value));
    if (reading.ok) throw new Error('was taken for a good document');
    const issue = reading.issues.find((one) => one.path === path || one.path.startsWith(`${path}.`));
    expect(issue?.message).toMatch(message);
    if (limit !== undefined) expect(issue?.limit).toBe(limit);
    if (typeof value === 'string' && value.length < 80) expect(issue?.value).toBe(value);
  });

  test.each([null, 3, 'text', [], true])('%j is no document', (input) => {
    expect(readDesignDocument(input)).toMatchObject({
      ok: false,
      issues: [{ path: '', message: 'must be an object' }],
    });
  });

  test('across: misalignment, levitation and cylinders belong to the through layout', () => {
    for (const [path, value] of [
      ['misalignment', { offset: 0 }],
      ['suspension', { kind: 'levitated', fixed: [] }],
      ['magnets.0.shape', 'cylinder'],
    ] as const) {
      const reading = readDesignDocument(withValue(across, path, value));
      expect(reading.ok ? [] : reading.issues.map((issue) => issue.path.split('.')[0])).toContain(path.split('.')[0]);
    }
  });

  test('all problems are told at once, in one error', () => {
    const broken = withValue(withValue(reference, 'coils.0.turns', -1), 'magnets.0.length', 'long');
    const thrown = (() => {
      try {
        return parseDesignDocument(broken);
      } catch (error) {
        return error;
      }
    })();
    expect(thrown).toBeInstanceOf(DocumentError);
    expect((thrown as DocumentError).issues.map((issue) => issue.path)).toEqual(['magnets.0.length', 'coils.0.turns']);
  });

  test('any JSON at all is answered within a second, without throwing', () => {
    fc.assert(
      fc.property(fc.json(), fc.constantFrom(...Object.keys(reference)), (text, key) => {
        expect(readDesignDocument(withValue(reference, key, JSON.parse(text)))).toHaveProperty('ok');
        expect(readVibrationDocument(JSON.parse(text))).toHaveProperty('ok');
      }),
      { numRuns: 500 },
    );
  });
});

describe('bad vibration documents', () => {
  test.each<[unknown, string, RegExp, number?]>([
    [{ kind: 'tone', frequency: 50, acceleration: 1 }, 'as', /must be peak or rms/],
    [{ kind: 'tone', frequency: '0 Hz', acceleration: 1, as: 'peak' }, 'frequency', /too small/, 0.01],
    [{ kind: 'tone', frequency: 50, acceleration: '1 kg', as: 'peak' }, 'acceleration', /measures a mass/],
    [{ kind: 'tone', frequency: 50, acceleration: 1, as: 'peak', colour: 1 }, 'colour', /not known/],
    [{ kind: 'tones', tones: [] }, 'tones', /at least 1/],
    [
      {
        kind: 'spectrum',
        points: [
          [10, 1],
          [5, 1],
        ],
        unit: 'g^2/Hz',
      },
      'points.1.0',
      /must rise/,
    ],
    [
      {
        kind: 'spectrum',
        points: [
          [10, 1],
          [20, -1],
        ],
        unit: 'g^2/Hz',
      },
      'points.1.1',
      /too small/,
    ],
    [
      {
        kind: 'spectrum',
        points: [
          [10, 1],
          [20, 1],
        ],
        unit: 'g',
      },
      'unit',
      /no unit of an acceleration density/,
    ],
    [{ kind: 'recording', rate: 1000, unit: 'kg', acceleration: [0, 1] }, 'unit', /no unit of an acceleration/],
    [{ kind: 'recording', rate: 1000, unit: 'g', acceleration: [0, null] }, 'acceleration.1', /finite number/],
    [{ kind: 'recording', rate: 1000, unit: 'g', acceleration: [0] }, 'acceleration', /at least 2/, 2],
    [{ kind: 'earthquake' }, 'kind', /must be one of tone, tones, spectrum, recording/],
  ])('%j', (input, path, message, limit) => {
    const reading = readVibrationDocument(input);
    if (reading.ok) throw new Error('was taken for a good document');
    const issue = reading.issues.find((one) => one.path === path);
    expect(issue?.message).toMatch(message);
    if (limit !== undefined) expect(issue?.limit).toBe(limit);
  });

  test('ten million samples are refused at once', () => {
    const acceleration = new Array<number>(1e7).fill(0);
    const started = performance.now();
    const reading = readVibrationDocument({ kind: 'recording', rate: 1000, unit: 'g', acceleration });
    expect(reading).toMatchObject({ ok: false, issues: [{ path: 'acceleration', limit: 2_000_000 }] });
    expect(performance.now() - started).toBeLessThan(1000);
  });

  test('the estimate says which document a problem is in', () => {
    try {
      estimate(withValue(reference, 'damping', {}), { kind: 'tone' });
      throw new Error('was computed');
    } catch (error) {
      if (!(error instanceof DocumentError)) throw error;
      expect(new Set(error.issues.map((issue) => issue.document))).toEqual(new Set(['design', 'vibration']));
    }
  });
});

describe('what cannot be built or rest', () => {
  test.each<[string, Json, string, RegExp, number?]>([
    [
      'magnet wider than the bore',
      withValue(reference, 'magnets.0.outerDiameter', '14 mm'),
      'magnets.0.outerDiameter',
      /14\.00 mm does not fit the bore of coils\.0, 12\.00 mm/,
      0.012,
    ],
    [
      'misaligned magnet',
      withValue(reference, 'misalignment.offset', '1.1 mm'),
      'magnets.0.outerDiameter',
      /sweeps 12\.20 mm with its misalignment/,
      0.012,
    ],
    [
      'more turns than the window takes',
      withValue(reference, 'coils.0.turns', 5000),
      'coils.0.turns',
      /takes at most 1518 turns/,
      1518,
    ],
    [
      'wire thicker than the window',
      withValue(reference, 'coils.0.wire', { diameter: '4 mm', overallDiameter: '4 mm' }),
      'coils.0.wire.overallDiameter',
      /thicker than the winding window/,
      0.003,
    ],
    [
      'block inside the coil',
      withValue(across, 'magnets.0.at.2', '2 mm'),
      'magnets.0.at.2',
      /reaches 1\.250 mm into coils\.0/,
      0.00325,
    ],
    [
      'stops far from the rest',
      withValue(reference, 'stops', { lower: '10 mm', upper: '12 mm', stiffness: 1000 }),
      'stops',
      /far beyond the stops/,
    ],
    [
      'spring that pushes away',
      withValue(reference, 'suspension', { kind: 'spring', stiffness: -100 }),
      'suspension',
      /no rest position is stable/,
    ],
  ])('%s', (_, design, path, message, limit) => {
    try {
      estimate(design, tone);
    } catch (error) {
      if (!(error instanceof DocumentError)) throw error;
      expect(error.issues[0]?.path).toBe(path);
      if (limit !== undefined) expect(error.issues[0]?.limit).toBeCloseTo(limit, 12);
      expect(error.issues[0]?.message).toMatch(message);
      return;
    }
    throw new Error('was computed');
  });

  test('a coil beside the travel may be narrower than the magnet', () => {
    const pancake = withValue(withValue(reference, 'coils.0.innerDiameter', '4 mm'), 'coils.0.at', '-20 mm');
    expect(estimate(pancake, tone).response.loadPower).toBeGreaterThan(0);
  });
});

describe('fields for a form', () => {
  test('each default and each unit is understood and within its limits', () => {
    for (const [name, field] of [...Object.entries(designFields), ...Object.entries(vibrationFields)]) {
      expect(Object.keys(dimensions), name).toContain(field.dimension);
      const reading = parseQuantity(`1 ${field.unit}`, field.dimension);
      expect(reading.ok, `${name} in ${field.unit}`).toBe(true);
      expect(field.minimum, name).toBeLessThan(field.maximum);
      const fallback = (field as DocumentField).default;
      if (fallback !== undefined) expect(fallback >= field.minimum && fallback <= field.maximum, name).toBe(true);
    }
  });

  test('every number of every reference document has its field', () => {
    const walk = (value: unknown, path: string, kind: string | undefined, missing: string[]): void => {
      if (typeof value === 'number') {
        const plain = /(polarity|sense)$/.test(path);
        if (!plain && !designField(path, kind)) missing.push(path);
      } else if (Array.isArray(value)) value.forEach((one, index) => walk(one, `${path}.${index}`, kind, missing));
      else if (value !== null && typeof value === 'object') {
        const { shape, kind: own } = value as { shape?: string; kind?: string };
        for (const [key, one] of Object.entries(value))
          walk(one, path === '' ? key : `${path}.${key}`, shape ?? own ?? kind, missing);
      }
    };
    const missing: string[] = [];
    for (const id of [
      'D1-01',
      'F3-03',
      'F3-04',
      'F3-08',
      'F6-01',
      'F6-06',
      'D3-06',
      'D4-01',
      'D4-05',
      'D4-06',
      'D5-04',
      'D6-01',
    ]) {
      walk(parseDesignDocument(referenceCase(id).design), '', undefined, missing);
    }
    expect(missing).toEqual([]);
  });
});

describe('catalogue', () => {
  test('keys are unique', () => {
    for (const entries of [catalogueMagnets, catalogueWires, catalogueDiodes]) {
      expect(new Set(entries.map((entry) => entry.key)).size).toBe(entries.length);
    }
  });

  // handbook/magnets.json#grade-… (P1, P2)
  test.each(['N35', 'N38', 'N40', 'N42', 'N45', 'N48', 'N50', 'N52'])('NdFeB %s as published', (grade) => {
    const { expected } = handbookValue('magnets', `grade-${grade}`);
    const entry = catalogueMagnets.find(({ key }) => key === `NdFeB ${grade}`);
    expect(entry?.remanenceRange).toEqual([expected['remanenceMin_T'], expected['remanenceMax_T']]);
    expect(entry?.material.intrinsicCoercivity).toBe(1000 * numberOf(expected, 'intrinsicCoercivityMin_kAPerM'));
    expect(entry?.material.maxTemperature).toBe(expected['maxWorkingTemperature_degC']);
    expect(entry?.material.remanencePerKelvin).toBe(numberOf(expected, 'remanenceTempCoeff_percentPerK') / 100);
  });

  // handbook/electronics.json#diode-… (the set, not the type)
  test.each(['1N4148', '1N4001', '1N5817', 'BAT54'])('%s as circulated', (key) => {
    const { given } = handbookValue('electronics', `diode-${key}`);
    expect(catalogueDiodes.find((entry) => entry.key === key)?.diode).toEqual({
      name: key,
      saturationCurrent: given['saturationCurrent_A'],
      emissionCoefficient: given['emissionCoefficient'],
      seriesResistance: given['seriesResistance_ohm'],
      temperature: 27,
    });
  });

  // handbook/wire.json#iec-… (P2), #awg-… (P1 bare, P2 overall)
  test.each([
    ['iec-0.100', 'IEC 0.100 grade 1', 'nominalDiameter_mm', 'maxOverallGrade1_mm'],
    ['iec-0.063', 'IEC 0.063 grade 2', 'nominalDiameter_mm', 'maxOverallGrade2_mm'],
    ['iec-0.355', 'IEC 0.355 grade 1', 'nominalDiameter_mm', 'maxOverallGrade1_mm'],
  ])('%s as published', (id, key, bare, overall) => {
    const row = handbookValue('wire', id);
    const entry = catalogueWires.find((wire) => wire.key === key);
    expect(entry?.diameter).toBe(Number(`${numberOf(row.given, bare)}e-3`));
    expect(entry?.overallDiameter).toBe(Number(`${numberOf(row.expected, overall)}e-3`));
  });

  test('AWG 38 single and heavy', () => {
    const bare = handbookValue('wire', 'awg-38').expected;
    const overall = handbookValue('wire', 'awg-38-overall').expected;
    for (const [build, key] of [
      ['single', 'singleMax_mm'],
      ['heavy', 'heavyMax_mm'],
    ] as const) {
      const entry = catalogueWires.find((wire) => wire.key === `AWG 38 ${build}`);
      expect(entry?.diameter).toBeCloseTo(numberOf(bare, 'formulaDiameter_mm') / 1000, 12);
      expect(entry?.overallDiameter).toBeCloseTo(numberOf(overall, key) / 1000, 12);
    }
  });

  test('a key may be typed carelessly', () => {
    const careless = withValue(
      withValue(reference, 'coils.0.wire', 'iec 0.1  Grade 1'),
      'magnets.0.material',
      'ndfeb n42',
    );
    const document = parseDesignDocument(careless);
    expect(document.coils[0]?.wire).toEqual({ name: 'IEC 0.100 grade 1', diameter: 1e-4, overallDiameter: 1.17e-4 });
    expect(document.magnets[0]?.material.name).toBe('NdFeB N42');
  });

  test('every entry makes a valid document', () => {
    for (const { key } of catalogueMagnets)
      expect(readDesignDocument(withValue(reference, 'magnets.0.material', key)).ok, key).toBe(true);
    for (const { key } of catalogueWires)
      expect(readDesignDocument(withValue(reference, 'coils.0.wire', key)).ok, key).toBe(true);
  });
});
