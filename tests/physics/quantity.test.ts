import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { dimensions, formatQuantity, parseQuantity, quantityParts } from '#physics/quantity';
import type { Dimension } from '#physics/quantity';
import { handbookValue } from '../support/handbook';

const understood: [text: string, dimension: Dimension, value: number][] = [
  ['12 mm', 'length', 0.012],
  ['12mm', 'length', 0.012],
  ['0.117 mm', 'length', 0.000117],
  ['-5.567299 mm', 'length', -0.005567299],
  ['−5.5 mm', 'length', -0.0055],
  ['+3 µm', 'length', 3e-6],
  ['3 μm', 'length', 3e-6],
  ['3 um', 'length', 3e-6],
  ['0.47 in', 'length', 0.011938],
  ['5"', 'length', 0.127],
  ['2 mil', 'length', 50.8e-6],
  ['1 ft', 'length', 0.3048],
  ['1.2e-3 m', 'length', 0.0012],
  ['1.2×10⁻³ m', 'length', 0.0012],
  ['1.2*10^-3 m', 'length', 0.0012],
  ['.5 cm', 'length', 0.005],
  ['5. mm', 'length', 0.005],
  ['0.012', 'length', 0.012],
  ['25 g', 'mass', 0.025],
  ['25\u00A0g', 'mass', 0.025],
  ['19.1 mg', 'mass', 19.1e-6],
  ['1 lb', 'mass', 0.45359237],
  ['1 oz', 'mass', 0.028349523125],
  ['0.5 g', 'acceleration', 4.903325],
  ['20 mg', 'acceleration', 0.196133],
  ['1 m/s^2', 'acceleration', 1],
  ['1 m/s²', 'acceleration', 1],
  ['1 m s^-2', 'acceleration', 1],
  ['1 g^2/Hz', 'accelerationDensity', 96.1703842225],
  ['1 (m/s^2)^2/Hz', 'accelerationDensity', 1],
  ['1 (m/s²)²/Hz', 'accelerationDensity', 1],
  ['1 m^2/s^3', 'accelerationDensity', 1],
  ['4k7', 'resistance', 4700],
  ['4K7', 'resistance', 4700],
  ['4k7 ohm', 'resistance', 4700],
  ['4R7', 'resistance', 4.7],
  ['10k', 'resistance', 10000],
  ['1M5', 'resistance', 1.5e6],
  ['4.7 kΩ', 'resistance', 4700],
  ['4.7 kohm', 'resistance', 4700],
  ['4.7 k\u2126', 'resistance', 4700],
  ['804.160706 ohm', 'resistance', 804.160706],
  ['804 Ohm', 'resistance', 804],
  ['4u7', 'capacitance', 4.7e-6],
  ['100 µF', 'capacitance', 1e-4],
  ['100n', 'capacitance', 1e-7],
  ['13.7 mH', 'inductance', 0.0137],
  ['20 degC', 'temperature', 20],
  ['20 °C', 'temperature', 20],
  ['-40 C', 'temperature', -40],
  ['176 degF', 'temperature', 80],
  ['293.15 K', 'temperature', 20],
  ['955 kA/m', 'fieldStrength', 955e3],
  ['1 kOe', 'fieldStrength', 79577.4715459476],
  ['58 MS/m', 'conductivity', 58e6],
  ['0.05 N*s/m', 'dampingCoefficient', 0.05],
  ['0.05 N s/m', 'dampingCoefficient', 0.05],
  ['0.05 N·s/m', 'dampingCoefficient', 0.05],
  ['50 g/s', 'dampingCoefficient', 0.05],
  ['2.467 kN/m', 'stiffness', 2467],
  ['1 lbf/in', 'stiffness', 175.1268352464764],
  ['0.2 N/mm^3', 'cubicStiffness', 2e8],
  ['0.01 N*s^2/m^2', 'quadraticDrag', 0.01],
  ['79.3 GPa', 'modulus', 79.3e9],
  ['1.3 T', 'fluxDensity', 1.3],
  ['13 kG', 'fluxDensity', 1.3],
  ['1 G', 'fluxDensity', 1e-4],
  ['7.5 g/cm^3', 'density', 7500],
  ['7500 kg m^-3', 'density', 7500],
  ['-0.12 %/K', 'perKelvin', -0.0012],
  ['-1200 ppm/K', 'perKelvin', -0.0012],
  ['90 deg', 'angle', Math.PI / 2],
  ['90°', 'angle', Math.PI / 2],
  ['1500 rpm', 'frequency', 25],
  ['1 kHz', 'frequency', 1000],
  ['2 min', 'time', 120],
  ['6.06 V s/m', 'coupling', 6.06],
  ['6.06 N/A', 'coupling', 6.06],
  ['59 mWb', 'fluxLinkage', 0.059],
  ['2.52 nA', 'current', 2.52e-9],
  ['85 %', 'number', 0.85],
  ['1000', 'number', 1000],
];

describe('texts that are understood', () => {
  test.each(understood)('%s as %s', (text, dimension, value) => {
    const reading = parseQuantity(text, dimension);
    if (!reading.ok) throw new Error(reading.message);
    expect(Math.abs(reading.value - value)).toBeLessThanOrEqual(1e-12 * Math.abs(value));
  });

  // A prefix is part of the decimal number: these must be the very doubles that SI numbers would be.
  test.each(understood.filter(([text]) => / ?(mm|um|g|MS\/m|kN\/m|nA|mH)$/.test(text) && !/lb|oz/.test(text)))(
    '%s as %s, to the last bit where the unit is decimal',
    (text, dimension, value) => {
      expect(parseQuantity(text, dimension)).toEqual({ ok: true, value });
    },
  );
});

describe('texts that are refused', () => {
  test.each<[string, Dimension, RegExp]>([
    ['-5,5 mm', 'length', /decimal point \(-5\.5 mm\)/],
    ['1,000', 'length', /not guessed/],
    ['3 kg', 'length', /“3 kg” is not understood as a length: “kg” measures a mass.*12 mm/],
    ['5 furlong', 'length', /unit “furlong” is not known/],
    ['3 constructor', 'length', /unit “constructor” is not known/],
    ['', 'length', /it is empty/],
    ['about 5 mm', 'length', /does not start with a number/],
    ['1 000 m', 'length', /write one number/],
    ['1/2 in', 'length', /not known/],
    ['5 mm/', 'length', /not known/],
    ['5 (mm', 'length', /not known/],
    ['5 mm)', 'length', /not known/],
    ['1e999 m', 'length', /too large/],
    ['NaN', 'length', /does not start with a number/],
    ['Infinity', 'length', /does not start with a number/],
    ['10 m', 'resistance', /“m” measures a length/],
    ['0.5 g', 'length', /measures a mass/],
    ['50 rad/s', 'frequency', /another dimension/],
    ['5 m^99', 'length', /not known/],
    ['20 V', 'temperature', /not one of temperature/],
    ['9'.repeat(200), 'length', /too long/],
  ])('%s as %s', (text, dimension, message) => {
    const reading = parseQuantity(text, dimension);
    expect(reading.ok).toBe(false);
    if (!reading.ok) expect(reading.message).toMatch(message);
  });

  test('any text at all is answered without throwing', () => {
    fc.assert(
      fc.property(
        fc.string({ unit: 'grapheme' }),
        fc.constantFrom(...(Object.keys(dimensions) as Dimension[])),
        (text, dimension) => {
          const reading = parseQuantity(text, dimension);
          expect(reading.ok ? Number.isFinite(reading.value) : reading.message.length > 0).toBe(true);
        },
      ),
      { numRuns: 2000 },
    );
  });
});

test('a field can lend its own unit to a bare number', () => {
  expect(parseQuantity('12', 'length', 'mm')).toEqual({ ok: true, value: 0.012 });
});

test('every example of every dimension is understood', () => {
  for (const [name, { examples }] of Object.entries(dimensions)) {
    for (const text of examples) expect([text, parseQuantity(text, name as Dimension).ok]).toEqual([text, true]);
  }
});

// handbook/electronics.json#convert-… (P1)
test('published unit conversions', () => {
  const expected = (id: string): number => Number(Object.values(handbookValue('electronics', id).expected)[0]);
  const checks: [string, string, Dimension, number][] = [
    ['convert-inch', '0.47 in', 'length', 1e3],
    ['convert-mil', '1 mil', 'length', 1e6],
    ['convert-gravity', '0.5 g', 'acceleration', 1],
    ['convert-g2', '1 g^2/Hz', 'accelerationDensity', 1],
    ['convert-oersted', '1 kOe', 'fieldStrength', 1e-3],
    ['convert-gauss', '1 G', 'fluxDensity', 1e3],
    ['convert-lbf-per-inch', '1 lbf/in', 'stiffness', 1],
    ['convert-rkm-4k7', '4k7', 'resistance', 1],
    ['convert-fahrenheit', '176 degF', 'temperature', 1],
  ];
  for (const [id, text, dimension, scale] of checks) {
    const reading = parseQuantity(text, dimension);
    expect(reading.ok && Math.abs((reading.value * scale) / expected(id) - 1) < 1e-11, id).toBe(true);
  }
});

describe('writing', () => {
  test.each<[number | null, Dimension, string]>([
    [0.00130013, 'power', '1.30 mW'],
    [0.9999, 'power', '1.00 W'],
    [0.00099996, 'power', '1.00 mW'],
    [0, 'power', '0 W'],
    [0.025, 'mass', '25.0 g'],
    [1.2, 'mass', '1.20 kg'],
    [0.01, 'length', '10.0 mm'],
    [0.5, 'length', '500 mm'],
    [-0.0055, 'length', '−5.50 mm'],
    [0.000117, 'length', '117 µm'],
    [804.16, 'resistance', '804 Ω'],
    [4700, 'resistance', '4.70 kΩ'],
    [Math.PI / 2, 'angle', '90.0°'],
    [20, 'temperature', '20.0 °C'],
    [2467.4, 'stiffness', '2.47 kN/m'],
    [5.8e7, 'conductivity', '58.0 MS/m'],
    [0.436332, 'number', '0.436'],
    [null, 'power', 'not computed'],
    [NaN, 'power', 'not computed'],
  ])('%s as %s is %s', (value, dimension, text) => {
    expect(formatQuantity(value, dimension)).toBe(text);
  });

  test('parts stand apart for columns', () => {
    expect(quantityParts(0.00130013, 'power', 4)).toEqual({ number: '1.300', unit: 'mW' });
  });

  test('what is written reads back to the value within its digits', () => {
    const names = Object.keys(dimensions) as Dimension[];
    fc.assert(
      fc.property(
        fc.constantFrom(...names),
        fc.double({ min: 1e-12, max: 1e9, noNaN: true }),
        fc.boolean(),
        (dimension, size, negative) => {
          const value = negative ? -size : size;
          const reading = parseQuantity(formatQuantity(value, dimension, 12), dimension);
          expect(
            reading.ok && Math.abs(reading.value - value) <= 2e-11 * Math.abs(value),
            formatQuantity(value, dimension, 12),
          ).toBe(true);
        },
      ),
      { numRuns: 3000 },
    );
  });
});
