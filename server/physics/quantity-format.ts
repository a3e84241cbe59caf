import { dimensions } from './quantity-dimensions';
import type { Dimension, DimensionDescription } from './quantity-dimensions';

const prefixSymbols: Readonly<Record<number, string>> = {
  [-15]: 'f',
  [-12]: 'p',
  [-9]: 'n',
  [-6]: 'µ',
  [-3]: 'm',
  0: '',
  3: 'k',
  6: 'M',
  9: 'G',
};

/** A quantity's text in two parts, so that columns can align the numbers. */
export interface QuantityParts {
  readonly number: string;
  readonly unit: string;
}

function plainNumber(value: number, digits: number): string {
  if (value === 0) return '0';
  const rounded = Number(value.toPrecision(digits));
  const magnitude = Math.floor(Math.log10(Math.abs(rounded)));
  if (magnitude >= 7 || magnitude < -4)
    return rounded
      .toExponential(digits - 1)
      .replace('e+', 'e')
      .replace('-', '−');
  return rounded.toFixed(Math.min(20, Math.max(0, digits - 1 - magnitude))).replace('-', '−');
}

/**
 * Writes an SI value as number and unit, with the prefix an engineer would choose (0.00130013 W → 1.30 mW).
 * Temperatures are in °C, angles are shown in degrees.
 * @param value SI value; not finite or null gives "not computed" without unit.
 * @param digits significant digits, 1 to 15.
 */
export function quantityParts(value: number | null, dimension: Dimension, digits = 3): QuantityParts {
  if (value === null || !Number.isFinite(value)) return { number: 'not computed', unit: '' };
  const description: DimensionDescription = dimensions[dimension];
  if (dimension === 'angle') return { number: plainNumber((value * 180) / Math.PI, digits), unit: '°' };
  const range = description.prefixes;
  if (!range) return { number: plainNumber(value, digits), unit: description.unit };
  const own = description.prefixedUnit ?? description.unit;
  const scaled = Number(value.toPrecision(digits)) * 10 ** -(description.prefixedUnitExponent ?? 0);
  const rounded = Number(scaled.toPrecision(digits));
  const wanted = rounded === 0 ? 0 : 3 * Math.floor(Math.log10(Math.abs(rounded)) / 3);
  const prefix = Math.min(range[1], Math.max(range[0], rounded === 0 ? Math.min(0, range[1]) : wanted));
  return {
    number: plainNumber(prefix < 0 ? rounded * 10 ** -prefix : rounded / 10 ** prefix, digits),
    unit: `${prefixSymbols[prefix] ?? ''}${own}`,
  };
}

/** `quantityParts` as one text, "1.30 mW". */
export function formatQuantity(value: number | null, dimension: Dimension, digits = 3): string {
  const parts = quantityParts(value, dimension, digits);
  if (parts.unit === '') return parts.number;
  return parts.unit === '°' ? `${parts.number}°` : `${parts.number} ${parts.unit}`;
}
