import { describe, expect, it } from 'vitest';
import { formatInUnit, readQuantity, readQuantityFully, textInUnit } from '../../../src/lib/quantities';
import type { Dimension } from '../../../src/lib/quantities';

const value = async (text: string, dimension: Dimension, unit: string) => {
  const reading = await readQuantityFully(text, dimension, unit);
  return reading.ok ? reading.value : reading.message;
};

describe('quantities as typed', () => {
  it.each([
    ['12mm/2', 'length', 'mm', 0.006],
    ['12/2', 'length', 'mm', 0.006],
    ['2*(3 mm + 0.5 in)', 'length', 'mm', 0.0314],
    ['10 − 4', 'length', 'mm', 0.006],
    ['-5 + 1', 'length', 'mm', -0.004],
    ['0.5 g / 2', 'acceleration', 'm/s²', 0.5 * 9.80665 * 0.5],
    ['500 mg * 2', 'acceleration', 'm/s²', 9.80665],
    ['25 g * 2', 'mass', 'g', 0.05],
    ['2 × 4.7 kΩ', 'resistance', 'Ω', 9400],
    ['2.467 N/mm * 2', 'stiffness', 'N/m', 4934],
  ] as const)('works out %s as %s', async (text, dimension, unit, expected) => {
    expect(await value(text, dimension, unit)).toBeCloseTo(expected, 12);
  });

  it('reads plain quantities at once, without the calculator', () => {
    expect(readQuantity('0.47 in', 'length', 'mm')).toEqual({ ok: true, value: 0.011938 });
    expect(readQuantity('4k7', 'resistance', 'Ω')).toEqual({ ok: true, value: 4700 });
    expect(readQuantity('-5.567', 'length', 'mm')).toEqual({ ok: true, value: -0.005567 });
    expect(readQuantity('12mm/2', 'length', 'mm')).toBe('pending');
  });

  it.each([
    ['3 mm * 2 s', 'length', 'not to a length'],
    ['1/0', 'length', 'does not work out'],
    ['import("x")', 'length', 'not understood'],
    ['12 mm +', 'length', 'could not be worked out'],
    ['twelve', 'length', 'not understood'],
  ] as const)('refuses %s in words', async (text, dimension, words) => {
    expect(await value(text, dimension, 'mm')).toContain(words);
  });

  it('shows values in the unit a person thinks in', () => {
    expect(formatInUnit(0.012, 'length', 'mm')).toBe('12.0 mm');
    expect(formatInUnit(0.0013001, 'power', 'mW')).toBe('1.30 mW');
    expect(formatInUnit(null, 'power', 'mW')).toBe('not computed');
    expect(textInUnit(0.000117, 'length', 'mm')).toBe('0.117');
    expect(textInUnit(20, 'temperature', '°C')).toBe('20');
  });
});
