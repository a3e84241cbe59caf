import { dimensions, formatQuantity, parseQuantity } from '#contracts/quantity';
import type { Dimension, QuantityReading } from '#contracts/quantity';
import { formatNumber } from './format';

export type { Dimension, QuantityReading } from '#contracts/quantity';
export { formatQuantity, parseQuantity, quantityParts } from '#contracts/quantity';

/** Signs of arithmetic, where the text is not one plain quantity: `12 mm/2`, `2*(3 mm + 0.5 in)`. */
const arithmetic = /[-−+*/×·()^]/;

/**
 * Reads what was typed at once. `pending` says that the text holds arithmetic, which `readQuantityFully` can work out.
 */
export function readQuantity(text: string, dimension: Dimension, bareUnit: string): QuantityReading | 'pending' {
  const reading = parseQuantity(text, dimension, bareUnit);
  if (reading.ok || dimension === 'temperature') return reading;
  return arithmetic.test(text.trim().slice(1)) && /\d/.test(text) ? 'pending' : reading;
}

/** Reads what was typed, working out arithmetic; the calculator is fetched when the first such text is met. */
export async function readQuantityFully(
  text: string,
  dimension: Dimension,
  bareUnit: string,
): Promise<QuantityReading> {
  const reading = readQuantity(text, dimension, bareUnit);
  if (reading !== 'pending') return reading;
  const calculator = await import('./calculator').catch(() => null);
  if (calculator === null)
    return { ok: false, message: `“${text.trim()}” needs the calculator, which could not be loaded: type the result.` };
  const { calculate } = calculator;
  const result = calculate(text, dimension);
  if (result.kind === 'number') return parseQuantity(String(result.value), dimension, bareUnit);
  if (result.kind === 'quantity') return { ok: true, value: result.value };
  const plain = parseQuantity(text, dimension, bareUnit);
  return plain.ok ? plain : { ok: false, message: result.message || plain.message };
}

/** How many SI units one `unit` is; null for scales with an own zero (°C) and unknown units. */
export function unitScale(dimension: Dimension, unit: string): number | null {
  if (dimension === 'temperature') return null;
  const one = parseQuantity('1', dimension, unit);
  return one.ok && one.value > 0 ? one.value : null;
}

/** An SI value in the unit a person thinks in: `0.012` as mm is `12.0 mm`. */
export function formatInUnit(value: number | null, dimension: Dimension, unit: string, digits = 3): string {
  const scale = unitScale(dimension, unit);
  if (value === null || scale === null) return formatQuantity(value, dimension, digits);
  return unit === '' ? formatNumber(value / scale, digits) : `${formatNumber(value / scale, digits)} ${unit}`;
}

/** The number alone, as it stands in a field with that unit beside it: full precision, plain characters. */
export function textInUnit(value: number, dimension: Dimension, unit: string): string {
  const scale = unitScale(dimension, unit);
  return String(Number((scale === null ? value : value / scale).toPrecision(12)));
}

/** What a text was understood to be, in SI as the document holds it: `0.0120 m`. */
export function formatSi(value: number, dimension: Dimension, digits = 3): string {
  if (dimension === 'temperature') return formatQuantity(value, dimension, digits);
  const { unit } = dimensions[dimension] as { unit: string };
  return unit === '' ? formatNumber(value, digits) : `${formatNumber(value, digits)} ${unit}`;
}
