import type { Diode } from './device';
import { seriesCurrent } from './diode';

/**
 * Two rectifying paths that share a source: with κ diodes in each,
 * a11 p + a12 q + κ v(p) = s1 and a12 p + a22 q + κ v(q) = s2.
 */
export interface TwoPaths {
  a11: number;
  a12: number;
  a22: number;
  s1: number;
  s2: number;
}

const MOST_SWEEPS = 60;

/**
 * Solves the two paths for their currents, into `out` (p, q). The first path's current alone remains when the second is
 * put in terms of it; its equation rises everywhere, so Newton with a bracket of sign cannot fail.
 * Fixed drops make a complementarity problem of four cases, tried in turn.
 */
export function solveTwoPaths(diode: Diode, count: number, paths: TwoPaths, out: Float64Array): void {
  if (diode.kind === 'drop') {
    solveDrops(paths, paths.s1 - count * diode.drop, paths.s2 - count * diode.drop, out);
    return;
  }
  // the path that is driven harder is the first one here
  const swapped = paths.s1 < paths.s2;
  const a12 = paths.a12;
  const a11 = swapped ? paths.a22 : paths.a11;
  const a22 = swapped ? paths.a11 : paths.a22;
  const s1 = swapped ? paths.s2 : paths.s1;
  const s2 = swapped ? paths.s1 : paths.s2;
  const floor = -diode.saturationCurrent;
  // sweep between the paths: the blocked one hardly depends on the other, so one sweep usually settles it
  let p = 0;
  let q = floor;
  const smallest = 1e-15 * (Math.abs(s1) + Math.abs(s2)) + 1e-24;
  let change = Infinity;
  for (let sweep = 0; sweep < 4; sweep++) {
    const before = q;
    p = seriesCurrent(diode, count, a11, s1 - a12 * q);
    q = seriesCurrent(diode, count, a22, s2 - a12 * p);
    // what the first path would make of the second one's change, V
    change = Math.abs(a12 * (q - before));
    if (change <= smallest) break;
  }
  if (change > smallest) {
    p = settle(diode, count, a11, a12, a22, s1, s2, p);
    q = seriesCurrent(diode, count, a22, s2 - a12 * p);
  }
  out[0] = swapped ? q : p;
  out[1] = swapped ? p : q;
}

/** Newton on the first path's current, the second in terms of it. */
function settle(
  diode: Extract<Diode, { kind: 'shockley' }>,
  count: number,
  a11: number,
  a12: number,
  a22: number,
  s1: number,
  s2: number,
  start: number,
): number {
  const slope = count * diode.emissionCoefficient * diode.thermalVoltage;
  const series = count * diode.seriesResistance;
  const floor = -diode.saturationCurrent;
  let p = start;
  for (let sweep = 0; sweep < MOST_SWEEPS; sweep++) {
    const q = seriesCurrent(diode, count, a22, s2 - a12 * p);
    const lift = p - floor;
    const rest = a11 * p + a12 * q + series * p + slope * Math.log(lift / -floor) - s1;
    const fall = (a12 * a12) / (a22 + series + slope / Math.max(q - floor, 1e-300));
    const step = rest / (a11 + series + slope / lift - fall);
    const next = p - step;
    p = next > floor ? next : floor + 0.1 * lift;
    if (Math.abs(step) <= 1e-14 * lift) break;
  }
  return p;
}

function solveDrops({ a11, a12, a22 }: TwoPaths, r1: number, r2: number, out: Float64Array): void {
  out[0] = 0;
  out[1] = 0;
  if (r1 <= 0 && r2 <= 0) return;
  if (r1 > 0) {
    const p = r1 / a11;
    if (r2 - a12 * p <= 0) {
      out[0] = p;
      return;
    }
  }
  if (r2 > 0) {
    const q = r2 / a22;
    if (r1 - a12 * q <= 0) {
      out[1] = q;
      return;
    }
  }
  const det = a11 * a22 - a12 * a12;
  if (det > 1e-14 * a11 * a22) {
    out[0] = Math.max(0, (a22 * r1 - a12 * r2) / det);
    out[1] = Math.max(0, (a11 * r2 - a12 * r1) / det);
  } else if (r1 >= r2) out[0] = r1 / a11;
  else out[1] = r2 / a22;
}
