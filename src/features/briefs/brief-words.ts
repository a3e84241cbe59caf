import type { BriefDocument, Envelope } from '#contracts/briefs';
import { formatNumber } from '../../lib/format';

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
