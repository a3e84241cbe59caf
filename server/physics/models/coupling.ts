import { hermiteTable } from '../kernels/hermite-table';
import { monotoneCubic, monotoneCubicAt, monotoneCubicSlopeAt } from '../kernels/pchip';
import { acrossLinkage } from './across-coupling';
import type { FlatMagnet } from './across-coupling';
import { axialMagnetsOf } from './axial-magnet';
import type { CoilShape } from './coil';
import { LINKAGE_TERMS } from './linkage';
import type { Linkage } from './linkage';
import type { Magnet } from './magnet';
import { magnetisationOf } from './magnetisation';
import { misalignedLinkage } from './misalignment';
import { axialLinkage } from './through-coupling';
import type { AxialCoil } from './through-coupling';

/** Flux linkage (V·s) and coupling θ = dλ/dx (V·s/m) at the positions asked for. */
export interface CouplingCurve {
  readonly fluxLinkage: Float64Array;
  readonly coupling: Float64Array;
}

/** The coupling as the solvers use it: smooth, cheap to evaluate, good over [from, to] (m). */
export interface CouplingTable {
  readonly from: number;
  readonly to: number;
  /** θ(x), V·s/m. */
  at(x: number): number;
  /** dθ/dx, V·s/m². */
  slopeAt(x: number): number;
  /** λ(x), V·s; its derivative is `at`. */
  fluxAt(x: number): number;
}

/** The part of a design document that decides on the coupling (canonical form: SI, °C, rad). */
export interface MagneticDesign {
  readonly layout: 'through' | 'across';
  readonly temperature: number;
  readonly magnets: readonly Magnet[];
  readonly coils: readonly CoilShape[];
  readonly misalignment?: { readonly offset: number; readonly tilt: number } | null;
  readonly recoil?: boolean;
}

/** Error of the table relative to the largest coupling. */
const TABLE_TOLERANCE = 1e-9;

/** Number of positions from which tables of the linkage pay. */
const TABULATED_FROM = 40;

/**
 * The linkage of a design: every magnet with every coil, temperature and recoil included.
 *
 * @throws RangeError where the layout does not take the shape of a magnet or coil
 */
export function linkageOfDesign(design: MagneticDesign): Linkage {
  if (design.layout === 'across') return acrossLinkage(flatMagnetsOf(design), design.coils);
  const magnets = axialMagnetsOf(design.magnets, 'magnets', design.temperature, design.recoil ?? true);
  const coils = axialCoilsOf(design);
  const misalignment = design.misalignment;
  return misalignment && (misalignment.offset !== 0 || misalignment.tilt !== 0)
    ? misalignedLinkage(magnets, coils, misalignment)
    : axialLinkage(magnets, coils);
}

function flatMagnetsOf(design: MagneticDesign): FlatMagnet[] {
  return design.magnets.map((magnet, i) => {
    if (magnet.shape !== 'block') throw new RangeError(`magnets.${i}.shape must be block in the across layout`);
    const magnetisation = magnetisationOf(magnet, design.temperature, design.recoil ?? true);
    return { size: magnet.size, at: magnet.at, magnetisation };
  });
}

function axialCoilsOf(design: MagneticDesign): AxialCoil[] {
  return design.coils.map((coil, i) => {
    if (coil.shape !== 'round' || typeof coil.at !== 'number') {
      throw new RangeError(`coils.${i} must be round and stand on the axis in the through layout`);
    }
    return {
      innerRadius: coil.innerDiameter / 2,
      outerRadius: coil.outerDiameter / 2,
      length: coil.length,
      at: coil.at,
      signedTurns: coil.turns * coil.sense,
    };
  });
}

/**
 * Flux linkage and coupling of a design at given positions, evaluated exactly at each;
 * many of them through the linkage's tables, within 1e-9 of the largest value.
 *
 * @param positions of the moving assembly (m)
 * @returns two fresh arrays as long as `positions`
 */
export function couplingOfDevice(design: MagneticDesign, positions: Float64Array): CouplingCurve {
  const exact = linkageOfDesign(design);
  const linkage = positions.length > TABULATED_FROM ? exact.tabulated() : exact;
  const out = new Float64Array(LINKAGE_TERMS);
  const fluxLinkage = new Float64Array(positions.length);
  const coupling = new Float64Array(positions.length);
  for (let i = 0; i < positions.length; i++) {
    linkage.at(positions[i]!, out);
    fluxLinkage[i] = out[0]!;
    coupling[i] = out[1]!;
  }
  return { fluxLinkage, coupling };
}

/**
 * Tabulates the coupling of a design over [from, to].
 *
 * @param from, to range of the travel (m), from < to
 * @returns a table whose coupling is within 1e-9 of the largest value; outside the range it evaluates exactly, which is
 *   right but slow
 * @throws RangeError where the range is empty
 */
export function couplingTable(design: MagneticDesign, from: number, to: number): CouplingTable {
  return tableOfLinkage(linkageOfDesign(design), from, to);
}

/** Tabulates a linkage; see `couplingTable`. */
export function tableOfLinkage(linkage: Linkage, from: number, to: number): CouplingTable {
  const quick = linkage.tabulated();
  const table = hermiteTable((x, out) => quick.at(x, out), from, to, {
    tolerance: TABLE_TOLERANCE,
    breaks: linkage.passages,
  });
  const outside = new Float64Array(LINKAGE_TERMS);
  const exact = (x: number, term: number): number => {
    linkage.at(x, outside);
    return outside[term]!;
  };
  return {
    from,
    to,
    at: (x) => (x >= from && x <= to ? table.valueAt(x) : exact(x, 1)),
    slopeAt: (x) => (x >= from && x <= to ? table.slopeAt(x) : exact(x, 2)),
    fluxAt: (x) => (x >= from && x <= to ? table.integralAt(x) : exact(x, 0)),
  };
}

/**
 * The same coupling everywhere, as measured or assumed; its flux linkage is zero at x = 0.
 *
 * @param value θ (V·s/m), finite
 */
export function constantCoupling(value: number): CouplingTable {
  if (!Number.isFinite(value)) throw new RangeError(`coupling must be finite, got ${value} V s/m`);
  return { from: -Infinity, to: Infinity, at: () => value, slopeAt: () => 0, fluxAt: (x) => value * x };
}

/**
 * A measured curve of coupling over position, by a shape-preserving cubic (PCHIP); outside the measured range the end
 * value is held. The flux linkage is zero at the first position.
 *
 * @param position rising (m)
 * @param coupling θ there (V·s/m)
 * @throws RangeError where the lists differ in length, have fewer than two points, or positions do not rise
 */
export function measuredCoupling(position: ArrayLike<number>, coupling: ArrayLike<number>): CouplingTable {
  const curve = monotoneCubic(position, coupling);
  const { position: p, value, slope } = curve;
  const last = p.length - 1;
  const flux = new Float64Array(p.length);
  for (let i = 0; i < last; i++) {
    const h = p[i + 1]! - p[i]!;
    flux[i + 1] = flux[i]! + h * (0.5 * (value[i]! + value[i + 1]!) + (h * (slope[i]! - slope[i + 1]!)) / 12);
  }
  const from = p[0]!;
  const to = p[last]!;
  const at = (x: number): number => monotoneCubicAt(curve, x);
  const fluxAt = (x: number): number => {
    if (x <= from) return value[0]! * (x - from);
    if (x >= to) return flux[last]! + value[last]! * (x - to);
    let low = 0;
    let high = last;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (p[middle]! <= x) low = middle;
      else high = middle;
    }
    // Simpson is exact for the cubic of this panel
    const a = p[low]!;
    return flux[low]! + ((x - a) / 6) * (value[low]! + 4 * at(0.5 * (a + x)) + at(x));
  };
  return { from, to, at, slopeAt: (x) => monotoneCubicSlopeAt(curve, x), fluxAt };
}
