import type { BriefDocument, Envelope } from '#contracts/briefs';
import { comparisonSign, requirementQuantities } from '#contracts/requirement';
import type { Requirement } from '#contracts/requirement';
import { formatNumber } from '../../lib/format';
import { formatInUnit, formatQuantity } from '../../lib/quantities';

const millimetres = (value: number) => formatNumber(value * 1000, 3);

export const envelopeWords = (envelope: Envelope): string =>
  envelope.shape === 'cylinder'
    ? `cylinder, ⌀ ${millimetres(envelope.diameter)} × ${millimetres(envelope.length)} mm`
    : `box, ${envelope.size.map(millimetres).join(' × ')} mm`;

export const orientationWords: Record<BriefDocument['orientation'], string> = {
  horizontal: 'travel horizontal',
  vertical: 'travel vertical',
  any: 'any',
};

/** “≥ 1.00 mW” */
export function limitWords({ quantity, comparison, limit, unit }: Requirement): string {
  const { dimension } = requirementQuantities[quantity];
  const figure = unit === '' ? formatQuantity(limit, dimension) : formatInUnit(limit, dimension, unit);
  return `${comparisonSign[comparison]} ${figure}`;
}
