import { LINKAGE_TERMS } from './models/linkage';
import type { Linkage } from './models/linkage';
import type { PreparedDevice } from './estimate-device';

/** Coupling and flux linkage over position, with the figures drawn from it. */
export interface EstimateCurve {
  readonly position: Float64Array;
  readonly fluxLinkage: Float64Array;
  readonly coupling: Float64Array;
  readonly couplingAtRest: number;
  /** Largest magnitude over all travel. */
  readonly couplingPeak: number;
  readonly couplingPeakAt: number;
}

const pointsShown = 201;

/** A little over the excursion, and at least past the magnets' own length: the window that shows what happens. */
export function shownPositions(prepared: PreparedDevice, displacementPeak: number | null): Float64Array {
  const { reach, device, linkage } = prepared;
  const { from, to } = device.coupling;
  const span =
    linkage === null && Number.isFinite(to - from)
      ? Math.max(to - device.restPosition, device.restPosition - from)
      : reach;
  const half = Math.min(Math.max(4 * (displacementPeak ?? 0), 0.6 * span), 2 * span);
  const positions = new Float64Array(pointsShown);
  for (let index = 0; index < pointsShown; index += 1) {
    positions[index] = device.restPosition + half * ((2 * index) / (pointsShown - 1) - 1);
  }
  return positions;
}

/** Zero of dθ/dx between two positions where it changes sign, by bisection and Newton's step where it stays inside. */
function turningPoint(linkage: Linkage, low: number, high: number, out: Float64Array): number {
  let a = low;
  let b = high;
  linkage.at(a, out);
  const rising = (out[2] ?? 0) > 0;
  let x = (a + b) / 2;
  for (let step = 0; step < 60 && b - a > 1e-15 * (1 + Math.abs(x)); step += 1) {
    linkage.at(x, out);
    const slope = out[2] ?? 0;
    if (slope === 0) return x;
    if (slope > 0 === rising) a = x;
    else b = x;
    const next = x - slope / (out[3] ?? 0);
    const newton = next > a && next < b;
    if (newton && Math.abs(next - x) < 1e-14 * (1 + Math.abs(x))) return next;
    x = newton ? next : (a + b) / 2;
  }
  return x;
}

/** Largest |θ| over all travel, and where: of equal peaks the one nearest to rest, then the one on the + side. */
function peakOfLinkage(linkage: Linkage, rest: number, reach: number): { value: number; at: number } {
  const steps = 160;
  const out = new Float64Array(LINKAGE_TERMS);
  const size = new Float64Array(steps + 1);
  const at = (index: number): number => rest + reach * ((2 * index) / steps - 1);
  for (let index = 0; index <= steps; index += 1) {
    linkage.at(at(index), out);
    size[index] = Math.abs(out[1] ?? 0);
  }
  let largest = 0;
  for (const value of size) largest = Math.max(largest, value);
  let best = { value: 0, at: rest };
  for (let index = 1; index < steps; index += 1) {
    const here = size[index] ?? 0;
    // A peak of the samples below this cannot hold the largest between them
    if (here < 0.8 * largest || here < (size[index - 1] ?? 0) || here < (size[index + 1] ?? 0)) continue;
    const x = turningPoint(linkage, at(index - 1), at(index + 1), out);
    linkage.at(x, out);
    const value = Math.abs(out[1] ?? 0);
    const equal = Math.abs(value - best.value) <= 1e-9 * value;
    const nearer = Math.abs(x - rest) - Math.abs(best.at - rest);
    if (equal ? nearer < -1e-9 * reach || (nearer < 1e-9 * reach && x > best.at) : value > best.value)
      best = { value, at: x };
  }
  return best;
}

/** Largest |θ| of a measured curve at its points and on a fine grid between them. */
function peakOfTable(prepared: PreparedDevice): { value: number; at: number } {
  const { coupling, restPosition } = prepared.device;
  if (!Number.isFinite(coupling.from) || !Number.isFinite(coupling.to)) {
    return { value: Math.abs(coupling.at(restPosition)), at: restPosition };
  }
  const steps = 4000;
  let best = { value: 0, at: restPosition };
  for (let index = 0; index <= steps; index += 1) {
    const x = coupling.from + ((coupling.to - coupling.from) * index) / steps;
    const value = Math.abs(coupling.at(x));
    if (value > best.value) best = { value, at: x };
  }
  return best;
}

/**
 * Evaluates the coupling curve.
 *
 * @param positions where asked for (m); those of `shownPositions` otherwise
 * @param exact true evaluates each position by itself, false takes the table where it reaches
 */
export function curveOf(prepared: PreparedDevice, positions: Float64Array, exact: boolean): EstimateCurve {
  const { device, linkage, reach } = prepared;
  const fluxLinkage = new Float64Array(positions.length);
  const coupling = new Float64Array(positions.length);
  const out = new Float64Array(LINKAGE_TERMS);
  positions.forEach((x, index) => {
    const tabulated = x >= device.coupling.from && x <= device.coupling.to;
    if (linkage && (exact || !tabulated)) {
      linkage.at(x, out);
      fluxLinkage[index] = out[0] ?? 0;
      coupling[index] = out[1] ?? 0;
    } else {
      fluxLinkage[index] = device.coupling.fluxAt(x);
      coupling[index] = device.coupling.at(x);
    }
  });
  let atRest = device.coupling.at(device.restPosition);
  if (linkage) {
    linkage.at(device.restPosition, out);
    atRest = out[1] ?? 0;
  }
  const peak = linkage ? peakOfLinkage(linkage, device.restPosition, reach) : peakOfTable(prepared);
  return {
    position: positions,
    fluxLinkage,
    coupling,
    couplingAtRest: atRest,
    couplingPeak: peak.value,
    couplingPeakAt: peak.at,
  };
}
