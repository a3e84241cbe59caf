import { hermiteTable } from './kernels/hermite-table';
import type { HermiteTable } from './kernels/hermite-table';
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

/** Error of what is drawn, relative to the largest coupling: below what a screen shows and a document asks for. */
const drawnTolerance = 2e-7;

/** The curve over everything that is drawn and everywhere that the peak may be. */
function drawnTable(linkage: Linkage, rest: number, half: number): HermiteTable {
  return hermiteTable((x, out) => linkage.at(x, out), rest - half, rest + half, {
    tolerance: drawnTolerance,
    breaks: linkage.passages,
  });
}

/** Largest |θ| over all travel, and where: of equal peaks the one nearest to rest, then the one on the + side. */
function peakOfLinkage(linkage: Linkage, table: HermiteTable, rest: number): { value: number; at: number } {
  const steps = 800;
  const size = new Float64Array(steps + 1);
  const half = (table.to - table.from) / 2;
  const at = (index: number): number => rest + half * ((2 * index) / steps - 1);
  let largest = 0;
  for (let index = 0; index <= steps; index += 1) {
    const value = Math.abs(table.valueAt(at(index)));
    size[index] = value;
    largest = Math.max(largest, value);
  }
  const out = new Float64Array(LINKAGE_TERMS);
  let best = { value: 0, at: rest };
  for (let index = 1; index < steps; index += 1) {
    const here = size[index] ?? 0;
    // What the samples miss between two of them is far less than this
    if (here < 0.98 * largest || here < (size[index - 1] ?? 0) || here <= (size[index + 1] ?? 0)) continue;
    const x = turningPoint(linkage, at(index - 1), at(index + 1), out);
    linkage.at(x, out);
    const value = Math.abs(out[1] ?? 0);
    const equal = Math.abs(value - best.value) <= 1e-9 * value;
    const nearer = Math.abs(x - rest) - Math.abs(best.at - rest);
    const wins = equal ? nearer < -1e-9 * half || (nearer < 1e-9 * half && x > best.at) : value > best.value;
    if (wins) best = { value, at: x };
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
 * @param exact true evaluates each position by itself, false draws it within 2e-7 of the peak
 */
export function curveOf(prepared: PreparedDevice, positions: Float64Array, exact: boolean): EstimateCurve {
  const { device, linkage, reach } = prepared;
  const { restPosition, coupling: table } = device;
  const fluxLinkage = new Float64Array(positions.length);
  const coupling = new Float64Array(positions.length);
  if (linkage === null) {
    positions.forEach((x, index) => {
      fluxLinkage[index] = table.fluxAt(x);
      coupling[index] = table.at(x);
    });
    const { value, at } = peakOfTable(prepared);
    const couplingAtRest = table.at(restPosition);
    return { position: positions, fluxLinkage, coupling, couplingAtRest, couplingPeak: value, couplingPeakAt: at };
  }
  const out = new Float64Array(LINKAGE_TERMS);
  let half = reach;
  if (!exact) for (const x of positions) half = Math.max(half, Math.abs(x - restPosition));
  const drawn = drawnTable(linkage, restPosition, half);
  positions.forEach((x, index) => {
    if (exact) linkage.at(x, out);
    else drawn.allAt(x, out);
    fluxLinkage[index] = out[0] ?? 0;
    coupling[index] = out[1] ?? 0;
  });
  linkage.at(restPosition, out);
  const couplingAtRest = out[1] ?? 0;
  const { value, at } = peakOfLinkage(linkage, drawn, restPosition);
  return { position: positions, fluxLinkage, coupling, couplingAtRest, couplingPeak: value, couplingPeakAt: at };
}
