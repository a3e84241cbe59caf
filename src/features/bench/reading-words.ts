import { dimensions } from '#contracts/quantity';
import { requirementQuantities } from '#contracts/requirement';
import type { RequirementQuantity } from '#contracts/requirement';
import { unitScale } from '../../lib/quantities';
import type { Dimension } from '../../lib/quantities';

const isKnown = (quantity: string): quantity is RequirementQuantity => quantity in requirementQuantities;

/** A reading's quantity in words: the name of a result, or what was written. */
export const quantityWords = (quantity: string): string =>
  isKnown(quantity) ? requirementQuantities[quantity].label : quantity;

/** What a reading measures, by its quantity or else by the unit it was typed in. */
export function dimensionOf(quantity: string, unit: string): Dimension {
  if (isKnown(quantity)) return requirementQuantities[quantity].dimension;
  const names = Object.keys(dimensions) as Dimension[];
  if (unit === '°C') return 'temperature';
  return (unit === '' ? undefined : names.find((name) => unitScale(name, unit) !== null)) ?? 'number';
}

/** Unit that is meant where none is typed in a reading of this dimension. */
export const benchUnits: Partial<Record<Dimension, string>> = {
  power: 'mW',
  voltage: 'V',
  length: 'mm',
  current: 'mA',
  resistance: 'Ω',
  frequency: 'Hz',
  mass: 'g',
};
