import { bracketedRoot } from '../kernels/bracketed-root';
import { hermiteTable } from '../kernels/hermite-table';
import type { HermiteTable } from '../kernels/hermite-table';
import { axialMagnetsOf } from './axial-magnet';
import type { AxialMagnet } from './axial-magnet';
import { STANDARD_GRAVITY } from './constants';
import type { Suspension } from './device';
import type { Magnet } from './magnet';
import { axialForce, FORCE_TERMS } from './magnet-force';
import type { AxialForce } from './magnet-force';

/** Where the assembly may move without a magnet meeting a fixed one (m); infinite where nothing is in the way. */
export interface Reach {
  readonly from: number;
  readonly to: number;
}

/** Rest of an assembly held by fixed magnets: F(u) = −k u − k2 u² − k3 u³ about it. */
export interface LevitatedRest {
  /** x of rest (m). */
  readonly position: number;
  /** k (N/m), positive. */
  readonly stiffness: number;
  /** k2 (N/m²). */
  readonly quadratic: number;
  /** k3 = −F‴/6 (N/m³). */
  readonly cubic: number;
  /**
   * Sideways stiffness (N/m): −k/2 by Earnshaw's theorem, whatever the magnets. Negative: the assembly needs a guide,
   * whose friction is not modelled.
   */
  readonly sidewaysStiffness: number;
  /** Every stable and unstable rest within reach, rising (m). */
  readonly equilibria: readonly number[];
}

/** A levitated suspension, or why there is none. */
export type Levitation =
  | { readonly found: true; readonly rest: LevitatedRest; readonly reach: Reach; readonly suspension: Suspension }
  | { readonly found: false; readonly reason: string };

/** Places looked at for a rest, per side. */
const SCAN = 400;
const ROOT_TOLERANCE = 1e-13;
/** Potential energies this close (relative to the force scale times the reach) count as equal wells. */
const EQUAL_WELLS = 1e-9;
/** Error of the tabulated force relative to its largest value: the rest may lie where forces are far smaller. */
const FORCE_TOLERANCE = 1e-11;

/**
 * Suspension by magnetic repulsion (or any coaxial magnets): rest under a constant force, stiffness there and the
 * force at any displacement.
 *
 * @param moving magnets of the assembly, `at` for x = 0
 * @param fixed magnets in the coil's frame
 * @param load constant force along +x, gravity: −m g sin ψ (N)
 * @returns the rest with the lowest potential energy within reach of x = 0, of equal ones the one on the + side;
 *   `found: false` where no rest is stable along the axis
 * @throws RangeError where a magnet overlaps a fixed one at x = 0
 * Source: force after Robertson et al. (2011), see magnet-force; S. Earnshaw, Trans. Camb. Phil. Soc. 7 (1842) 97.
 */
export function levitation(moving: readonly AxialMagnet[], fixed: readonly AxialMagnet[], load: number): Levitation {
  const force = axialForce(moving, fixed);
  const reach = reachOf(moving, fixed);
  const out = new Float64Array(FORCE_TERMS);
  const total = (x: number): number => {
    force.at(x, out);
    return out[1]! + load;
  };
  const places = scanPlaces(moving, fixed, reach);
  const equilibria: number[] = [];
  let before = total(places[0]!);
  let largest = Math.abs(before);
  for (let i = 1; i < places.length; i++) {
    const here = total(places[i]!);
    largest = Math.max(largest, Math.abs(here));
    if (here === 0) equilibria.push(places[i]!);
    else if (before !== 0 && here > 0 !== before > 0) {
      equilibria.push(bracketedRoot(total, places[i - 1]!, places[i]!, ROOT_TOLERANCE));
    }
    before = here;
  }
  const wells = equilibria.map((x) => restAt(force, x, load)).filter(({ stiffness }) => stiffness > 0);
  if (wells.length === 0) {
    return {
      found: false,
      reason: 'the fixed magnets hold the assembly nowhere within reach: no stable rest position',
    };
  }
  const same = EQUAL_WELLS * largest * (places.at(-1)! - places[0]!);
  const lowest = Math.min(...wells.map(({ energy }) => energy));
  const chosen = wells.filter(({ energy }) => energy <= lowest + same).at(-1)!;
  const rest: LevitatedRest = {
    position: chosen.position,
    stiffness: chosen.stiffness,
    quadratic: chosen.quadratic,
    cubic: chosen.cubic,
    sidewaysStiffness: -0.5 * chosen.stiffness,
    equilibria,
  };
  return { found: true, rest, reach, suspension: suspensionAbout(rest, force, load, reach, extentOf(moving, fixed)) };
}

/** The part of a design document that decides on its levitation (canonical form: SI, °C, rad). */
export interface LevitatedDesign {
  readonly axisAngle: number;
  readonly temperature: number;
  readonly magnets: readonly Magnet[];
  readonly recoil?: boolean;
}

/**
 * Levitation of a design's moving magnets between fixed ones, gravity along the travel included.
 *
 * @param fixed magnets of the suspension, in the coil's frame
 * @param movingMass kg
 * @throws RangeError where a magnet is no cylinder or overlaps a fixed one at x = 0
 */
export function levitationOfDesign(design: LevitatedDesign, fixed: readonly Magnet[], movingMass: number): Levitation {
  const recoil = design.recoil ?? true;
  return levitation(
    axialMagnetsOf(design.magnets, 'magnets', design.temperature, recoil),
    axialMagnetsOf(fixed, 'suspension.fixed', design.temperature, recoil),
    -movingMass * STANDARD_GRAVITY * Math.sin(design.axisAngle),
  );
}

/** Range of x in which no moving magnet meets a fixed one that it cannot pass. */
export function reachOf(moving: readonly AxialMagnet[], fixed: readonly AxialMagnet[]): Reach {
  let from = -Infinity;
  let to = Infinity;
  moving.forEach((m, i) => {
    fixed.forEach((f, j) => {
      const passes = m.outerRadius < f.innerRadius || f.outerRadius < m.innerRadius;
      if (passes) return;
      const free = Math.abs(f.at - m.at) - 0.5 * (m.length + f.length);
      if (free < 0) throw new RangeError(`fixed magnet ${j} must not overlap magnet ${i} at x = 0, does by ${-free} m`);
      if (f.at > m.at) to = Math.min(to, free);
      else from = Math.max(from, -free);
    });
  });
  return { from, to };
}

/** Largest dimension of all magnets together (m): the scale on which the force falls off. */
function extentOf(moving: readonly AxialMagnet[], fixed: readonly AxialMagnet[]): number {
  const all = [...moving, ...fixed];
  const ends = all.flatMap(({ at, length }) => [at - length / 2, at + length / 2]);
  return Math.max(...ends) - Math.min(...ends) + Math.max(...all.map(({ outerRadius }) => outerRadius));
}

/** Places dense near contact and, on an open side, ever wider apart until the force has long died away. */
function scanPlaces(moving: readonly AxialMagnet[], fixed: readonly AxialMagnet[], reach: Reach): number[] {
  const extent = extentOf(moving, fixed);
  const places: number[] = [];
  for (let i = 0; i <= SCAN; i++) {
    const s = i / SCAN;
    const below = Number.isFinite(reach.from)
      ? reach.from * Math.sin((Math.PI / 2) * s)
      : (-extent * Math.sinh(6 * s)) / 2;
    const above = Number.isFinite(reach.to) ? reach.to * Math.sin((Math.PI / 2) * s) : (extent * Math.sinh(6 * s)) / 2;
    places.push(below, above);
  }
  return [...new Set(places)].sort((p, q) => p - q);
}

function restAt(force: AxialForce, x: number, load: number) {
  const out = new Float64Array(FORCE_TERMS);
  force.at(x, out);
  return {
    position: x,
    energy: -out[0]! - load * x,
    stiffness: -out[2]!,
    quadratic: -out[3]! / 2,
    cubic: -out[4]! / 6,
  };
}

/** The force about rest from a table, exact beyond it. The table keeps clear of contact, where the slope is infinite. */
function suspensionAbout(
  rest: LevitatedRest,
  force: AxialForce,
  load: number,
  reach: Reach,
  extent: number,
): Suspension {
  const start = rest.position;
  const clear = (end: number): number => start + 0.995 * Math.max(-extent, Math.min(extent, end - start));
  const out = new Float64Array(FORCE_TERMS);
  const table: HermiteTable = hermiteTable(
    (x, sample) => {
      force.at(x, out);
      sample[0] = out[0]! + load * x;
      sample[1] = out[1]! + load;
      sample[2] = out[2]!;
      sample[3] = out[3]!;
    },
    clear(reach.from),
    clear(reach.to),
    { tolerance: FORCE_TOLERANCE },
  );
  const exact = (x: number, term: number): number => {
    force.at(Math.min(reach.to, Math.max(reach.from, x)), out);
    return out[term]! + (term === 1 ? load : term === 0 ? load * x : 0);
  };
  const inside = (x: number): boolean => x >= table.from && x <= table.to;
  const restEnergy = table.integralAt(start);
  return {
    force: (u) => (inside(start + u) ? table.valueAt(start + u) : exact(start + u, 1)),
    forceSlope: (u) => (inside(start + u) ? table.slopeAt(start + u) : exact(start + u, 2)),
    energy: (u) => restEnergy - (inside(start + u) ? table.integralAt(start + u) : exact(start + u, 0)),
    polynomial: null,
    equilibria: rest.equilibria.map((x) => x - start),
    from: reach.from - start,
    to: reach.to - start,
  };
}
