import type { Estimate } from '#contracts/estimates';
import { formatCount, formatNumber } from '../../lib/format';
import type { StripDevice } from './device';
import { formatTurns } from './drawing';

const mm = (value: number) => `${formatNumber(value)} mm`;

function magnetWords(device: StripDevice): string[] {
  if (device.layout === 'across')
    return device.magnets.map(
      ({ size, at, polarity }) =>
        `block magnet ${size.map((side) => formatNumber(side)).join(' × ')} mm at ${at.map((place) => formatNumber(place)).join(', ')} mm, north pole ${polarity > 0 ? 'up' : 'down'}`,
    );
  return device.magnets.map(({ outerRadius, innerRadius, length, at, polarity }) => {
    const bore = innerRadius > 0 ? `, bore ${mm(2 * innerRadius)}` : '';
    return `magnet Ø${formatNumber(2 * outerRadius)} × ${mm(length)}${bore} centred at ${mm(at)}, north pole on the ${polarity > 0 ? 'right' : 'left'}`;
  });
}

function coilWords(device: StripDevice): string[] {
  const turns = (count: number | null) => (count === null ? '' : ` of ${formatTurns(count)} turns`);
  if (device.layout === 'across')
    return device.coils.map(
      (coil) =>
        `${coil.shape} coil${turns(coil.turns)}, ${formatNumber(2 * coil.outer[0])} × ${formatNumber(2 * coil.outer[1])} × ${mm(coil.length)}`,
    );
  return device.coils.map(
    (coil) =>
      `coil${turns(coil.turns)}, Ø${formatNumber(2 * coil.innerRadius)} to Ø${formatNumber(2 * coil.outerRadius)} × ${mm(coil.length)} centred at ${mm(coil.at)}`,
  );
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);

/** The picture in sentences, for those who do not see it. */
export function describeStrip(device: StripDevice, estimate: Estimate | null): string {
  const shown = device.layout === 'through' ? 'Section through the axis, to scale.' : 'Side view and plan, to scale.';
  const parts = [...magnetWords(device), ...coilWords(device)];
  const listed = parts.length > 0 ? `${parts.slice(0, 8).map(capital).join('. ')}.` : 'Nothing can be drawn yet.';
  const more = parts.length > 8 ? ` And ${formatCount(parts.length - 8, 'more part')}.` : '';
  if (!estimate) return `${shown} ${listed}${more} Flux linkage and coupling are not computed.`;
  const { curve, mechanics, response } = estimate;
  const figures = [
    mechanics.restPosition === null ? null : `Rest at ${mm(mechanics.restPosition * 1000)}`,
    response.displacementPeak === null
      ? 'travel not computed'
      : `estimated travel ${mm(response.displacementPeak * 1000)} either way`,
    curve.couplingAtRest === null
      ? null
      : `coupling at rest ${formatNumber(curve.couplingAtRest)} volt seconds per metre`,
    curve.couplingPeak === null || curve.couplingPeakAt === null
      ? null
      : `largest coupling ${formatNumber(curve.couplingPeak)} at ${mm(curve.couplingPeakAt * 1000)}`,
  ].filter((part) => part !== null);
  return `${shown} ${listed}${more} ${figures.join(', ')}.`;
}
