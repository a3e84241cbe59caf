import type { Estimate } from '#contracts/estimates';
import { ticksOf } from './domain';
import type { Domain } from './domain';

/** A curve over position (mm): flux linkage in V·s, coupling in V·s/m. */
export interface Curve {
  position: number[];
  fluxLinkage: number[];
  coupling: number[];
}

/** The curve of an estimate; null where it was not computed or asked for without its arrays. */
export function curveOf(estimate: Pick<Estimate, 'curve'> | null | undefined): Curve | null {
  const { position, fluxLinkage, coupling } = estimate?.curve ?? {};
  if (!position || !fluxLinkage || !coupling) return null;
  const count = Math.min(position.length, fluxLinkage.length, coupling.length);
  if (count < 2) return null;
  return {
    position: position.slice(0, count).map((metres) => metres * 1000),
    fluxLinkage: fluxLinkage.slice(0, count),
    coupling: coupling.slice(0, count),
  };
}

/**
 * Flux linkage and coupling at one position; null outside the curve. Coupling is the slope of the flux linkage, so the cubic
 * through two points takes its slopes from there.
 */
export function curveAt(curve: Curve, x: number): { fluxLinkage: number; coupling: number } | null {
  const { position, fluxLinkage, coupling } = curve;
  const last = position.length - 1;
  const first = position[0] ?? 0;
  const final = position[last] ?? 0;
  const slack = 1e-9 * (final - first);
  if (!(x >= first - slack && x <= final + slack)) return null;
  let low = 0;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((position[middle] ?? 0) <= x) low = middle;
    else high = middle;
  }
  const [x0 = 0, x1 = 0] = [position[low], position[high]];
  const [f0 = 0, f1 = 0] = [fluxLinkage[low], fluxLinkage[high]];
  const [c0 = 0, c1 = 0] = [coupling[low], coupling[high]];
  const width = x1 - x0;
  const t = Math.min(1, Math.max(0, (x - x0) / width));
  const scale = width / 1000;
  const flux =
    (2 * t ** 3 - 3 * t ** 2 + 1) * f0 +
    (t ** 3 - 2 * t ** 2 + t) * scale * c0 +
    (3 * t ** 2 - 2 * t ** 3) * f1 +
    (t ** 3 - t ** 2) * scale * c1;
  const before = low > 0 ? (c1 - (coupling[low - 1] ?? c0)) / (x1 - (position[low - 1] ?? x0)) : (c1 - c0) / width;
  const after = high < last ? ((coupling[high + 1] ?? c1) - c0) / ((position[high + 1] ?? x1) - x0) : (c1 - c0) / width;
  const slope =
    (2 * t ** 3 - 3 * t ** 2 + 1) * c0 +
    (t ** 3 - 2 * t ** 2 + t) * width * before +
    (3 * t ** 2 - 2 * t ** 3) * c1 +
    (t ** 3 - t ** 2) * width * after;
  return { fluxLinkage: flux, coupling: slope };
}

export interface Lane {
  values: number[];
  /** Shown range with zero in it, in `unit`. */
  from: number;
  to: number;
  ticks: number[];
  /** Factor from SI to `unit`. */
  scale: number;
  unit: string;
  /** Decimals that show the peak to three digits; near a zero of the curve more would be noise. */
  decimals: number;
}

const prefixes = ['n', 'µ', 'm', '', 'k'] as const;

/** Range and unit of one curve: the prefix that makes its largest value a number between 1 and 1000. */
export function laneOf(values: readonly number[], unit: string, from: 'milli' | 'automatic' = 'automatic'): Lane {
  const peak = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  let power = peak > 0 ? Math.floor(Math.log10(peak) / 3) : 0;
  // One habitual unit within its useful range keeps neighbouring designs comparable at a glance.
  if (from === 'milli' && peak < 1 && peak >= 1e-4) power = -1;
  power = Math.max(-3, Math.min(1, power));
  const scale = 10 ** (-3 * power);
  const shown = values.map((value) => value * scale);
  const low = Math.min(0, ...shown);
  const high = Math.max(0, ...shown);
  const span = high - low || 1;
  const [bottom, top] = [low - 0.06 * span * (low < 0 ? 1 : 0), high + 0.1 * span];
  return {
    values: shown,
    from: bottom,
    to: top,
    ticks: ticksOf(bottom, top, 3.6),
    decimals: Math.max(0, Math.min(6, 2 - Math.floor(Math.log10(peak * scale || 1)))),
    scale,
    unit: `${prefixes[power + 3] ?? ''}${unit}`,
  };
}

/** The points of a lane that lie in the shown stretch, as [mm, value in the lane's unit]. */
export function pointsOf(curve: Curve, lane: Lane, domain: Domain): [number, number][] {
  return curve.position.flatMap((x, index): [number, number][] => {
    const value = lane.values[index];
    return value === undefined || x < domain.from - 1e-9 || x > domain.to + 1e-9 ? [] : [[x, value]];
  });
}

/** A value of the curve in the lane's unit, with the lane's decimals: read-outs keep their width while the cursor moves. */
export function laneText(lane: Lane, value: number): string {
  const text = (value * lane.scale).toFixed(lane.decimals);
  return (Number(text) === 0 ? (0).toFixed(lane.decimals) : text).replace('-', '−');
}
