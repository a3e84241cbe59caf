import { bracketedRoot } from '../kernels/bracketed-root';
import type { FlatMagnet } from './across-coupling';
import type { AxialMagnet } from './axial-magnet';
import { MAGNETIC_CONSTANT } from './constants';
import type { Magnet } from './magnet';
import { fieldOfBlock, fieldOfCylinder } from './magnet-field';
import type { Vector } from './magnet-field';
import { magnetisationOf, volumeOf } from './magnetisation';

/** Flux density at which active implants may be disturbed (T): the usual limit for keeping away. */
export const IMPLANT_LIMIT = 0.5e-3;

/** Limits of air transport for magnetised material (IATA DGR packing instruction 953): field strength at a distance. */
export const AIR_TRANSPORT = {
  /** Not treated as magnetised material if below this, A/m, at 2.1 m (7 ft). */
  free: { fieldStrength: 0.159, distance: 2.1 },
  /** Not accepted if above this, A/m, at 4.6 m (15 ft). */
  accepted: { fieldStrength: 0.418, distance: 4.6 },
} as const;

/** What the magnets do to their surroundings, magnets alone in air. */
export interface StrayField {
  /** Dipole moment of all magnets along x, y, z (A·m²). Moments cancel far away, not near by. */
  readonly moment: Vector;
  /** Where |B| falls to 0.5 mT for good, in the direction where that is farthest; null where it is below everywhere. */
  readonly implantDistance: { readonly fromCentre: number; readonly fromMagnets: number } | null;
  /** Largest field strength at 2.1 m and 4.6 m from the centre (A/m). */
  readonly fieldStrengthAtFree: number;
  readonly fieldStrengthAtAccepted: number;
  /** Which class of air transport the magnets alone, without package or shield, would fall into. */
  readonly airTransport: 'free' | 'magnetised material' | 'forbidden';
}

/** Directions sampled between pole and pole, and round the axis where there is no symmetry. */
const POLAR_STEPS = 36;
const ROUND_STEPS = 24;
const REFINEMENTS = 40;

interface Assembly {
  /** |B| at a place given by direction (unit vector) and distance from the centre (T). */
  strengthAt(direction: Vector, distance: number): number;
  /** Distance from the place to the nearest magnet's surface (m). */
  clearanceAt(direction: Vector, distance: number): number;
  /** Radius of the sphere about the centre that holds every magnet (m). */
  readonly radius: number;
  /** Sum of the moments' sizes (A·m²): bounds the far field. */
  readonly strength: number;
  readonly moment: Vector;
  readonly round: boolean;
}

/**
 * Stray field of magnets: moving and fixed ones together where they stand for x = 0.
 *
 * @param magnets all cylinders on one axis or all blocks
 * @param temperature °C
 * @throws RangeError where there is no magnet, or cylinders and blocks are mixed
 * Validity: no iron near by, no package. Exact fields, not dipoles.
 */
export function strayField(magnets: readonly Magnet[], temperature: number, recoil = true): StrayField {
  if (magnets.length === 0) throw new RangeError('magnets must not be empty');
  const assembly = assemblyOf(magnets, temperature, recoil);
  const directions = directionsOf(assembly.round);
  const strongest = (distance: number): number =>
    Math.max(...directions.map((direction) => assembly.strengthAt(direction, distance))) / MAGNETIC_CONSTANT;
  const fieldStrengthAtFree = strongest(AIR_TRANSPORT.free.distance);
  const fieldStrengthAtAccepted = strongest(AIR_TRANSPORT.accepted.distance);
  return {
    moment: assembly.moment,
    implantDistance: farthest(assembly, directions, IMPLANT_LIMIT),
    fieldStrengthAtFree,
    fieldStrengthAtAccepted,
    airTransport:
      fieldStrengthAtAccepted > AIR_TRANSPORT.accepted.fieldStrength
        ? 'forbidden'
        : fieldStrengthAtFree > AIR_TRANSPORT.free.fieldStrength
          ? 'magnetised material'
          : 'free',
  };
}

/**
 * Largest distance from the assembly's centre, in any direction, at which |B| still has the given size.
 *
 * @param limit T, positive
 * @returns m, from the centre and from the nearest magnet; null where |B| is below the limit all round the assembly
 */
export function distanceToField(
  magnets: readonly Magnet[],
  temperature: number,
  limit: number,
  recoil = true,
): { fromCentre: number; fromMagnets: number } | null {
  if (!(limit > 0)) throw new RangeError(`limit must be positive, got ${limit} T`);
  const assembly = assemblyOf(magnets, temperature, recoil);
  return farthest(assembly, directionsOf(assembly.round), limit);
}

function farthest(
  assembly: Assembly,
  directions: readonly Vector[],
  limit: number,
): { fromCentre: number; fromMagnets: number } | null {
  let best: { direction: Vector; distance: number } | null = null;
  for (const direction of directions) {
    const distance = levelAlong(assembly, direction, limit);
    if (distance !== null && (!best || distance > best.distance)) best = { direction, distance };
  }
  if (!best) return null;
  // walk uphill on the sphere with shrinking steps
  let step = Math.PI / POLAR_STEPS;
  for (let i = 0; i < REFINEMENTS && step > 1e-7; i++) {
    let improved = false;
    for (const turned of turns(best.direction, step, assembly.round)) {
      const distance = levelAlong(assembly, turned, limit);
      if (distance !== null && distance > best.distance * (1 + 1e-12)) {
        best = { direction: turned, distance };
        improved = true;
      }
    }
    if (!improved) step *= 0.4;
  }
  return { fromCentre: best.distance, fromMagnets: assembly.clearanceAt(best.direction, best.distance) };
}

/** Outermost distance along a direction at which |B| meets the limit; null where it stays below outside the magnets. */
function levelAlong(assembly: Assembly, direction: Vector, limit: number): number | null {
  const excess = (distance: number): number => assembly.strengthAt(direction, distance) - limit;
  // beyond this the sum of all dipoles, taken at the nearest point, is below the limit
  let outer =
    assembly.radius +
    1.2 * Math.cbrt((MAGNETIC_CONSTANT * assembly.strength) / (2 * Math.PI * limit)) +
    assembly.radius;
  while (outer > assembly.radius * 1.0001) {
    const inner = Math.max(assembly.radius * 1.0001, 0.96 * outer);
    if (excess(inner) >= 0) return excess(outer) >= 0 ? outer : bracketedRoot(excess, inner, outer, 1e-12);
    outer = inner;
  }
  return null;
}

function directionsOf(round: boolean): Vector[] {
  const directions: Vector[] = [];
  for (let i = 0; i <= POLAR_STEPS; i++) {
    const polar = (Math.PI * i) / POLAR_STEPS;
    const around = round || i === 0 || i === POLAR_STEPS ? 1 : ROUND_STEPS;
    for (let k = 0; k < around; k++) {
      const azimuth = (2 * Math.PI * k) / ROUND_STEPS;
      directions.push(pointing(polar, azimuth));
    }
  }
  return directions;
}

/** Unit vector at an angle from +x, turned about x. */
function pointing(polar: number, azimuth: number): Vector {
  return [Math.cos(polar), Math.sin(polar) * Math.cos(azimuth), Math.sin(polar) * Math.sin(azimuth)];
}

function turns(direction: Vector, step: number, round: boolean): Vector[] {
  const polar = Math.acos(Math.max(-1, Math.min(1, direction[0])));
  const azimuth = Math.atan2(direction[2], direction[1]);
  const around = round ? [] : [azimuth - step, azimuth + step].map((angle) => pointing(polar, angle));
  return [pointing(polar - step, azimuth), pointing(polar + step, azimuth), ...around];
}

function assemblyOf(magnets: readonly Magnet[], temperature: number, recoil: boolean): Assembly {
  const strengths = magnets.map((magnet) => magnetisationOf(magnet, temperature, recoil) * volumeOf(magnet));
  const total = strengths.reduce((sum, m) => sum + m, 0);
  const strength = strengths.reduce((sum, m) => sum + Math.abs(m), 0);
  const axial: AxialMagnet[] = [];
  const flat: FlatMagnet[] = [];
  for (const magnet of magnets) {
    const magnetisation = magnetisationOf(magnet, temperature, recoil);
    if (magnet.shape === 'block') flat.push({ size: magnet.size, at: magnet.at, magnetisation });
    else {
      axial.push({
        outerRadius: magnet.outerDiameter / 2,
        innerRadius: magnet.innerDiameter / 2,
        length: magnet.length,
        at: magnet.at,
        magnetisation,
      });
    }
  }
  if (axial.length > 0 && flat.length > 0) throw new RangeError('magnets must be all cylinders or all blocks');
  return axial.length > 0
    ? { ...axialAssembly(axial), strength, moment: [total, 0, 0] }
    : { ...flatAssembly(flat), strength, moment: [0, 0, total] };
}

type Shape = Omit<Assembly, 'strength' | 'moment'>;

function axialAssembly(magnets: readonly AxialMagnet[]): Shape {
  const low = Math.min(...magnets.map(({ at, length }) => at - length / 2));
  const high = Math.max(...magnets.map(({ at, length }) => at + length / 2));
  const centre = 0.5 * (low + high);
  const place = (direction: Vector, distance: number): { rho: number; x: number } => ({
    rho: distance * Math.hypot(direction[1], direction[2]),
    x: centre + distance * direction[0],
  });
  return {
    round: true,
    radius: Math.hypot(0.5 * (high - low), Math.max(...magnets.map(({ outerRadius }) => outerRadius))),
    strengthAt: (direction, distance) => {
      const { rho, x } = place(direction, distance);
      let radial = 0;
      let axial = 0;
      for (const magnet of magnets) {
        const field = fieldOfCylinder(magnet, rho, x);
        radial += field.radial;
        axial += field.axial;
      }
      return Math.hypot(radial, axial);
    },
    clearanceAt: (direction, distance) => {
      const { rho, x } = place(direction, distance);
      const gaps = magnets.map(({ at, length, outerRadius }) =>
        Math.hypot(Math.max(0, Math.abs(x - at) - length / 2), Math.max(0, rho - outerRadius)),
      );
      return Math.min(...gaps);
    },
  };
}

function flatAssembly(magnets: readonly FlatMagnet[]): Shape {
  const ends = [0, 1, 2].map((axis) => ({
    low: Math.min(...magnets.map(({ size, at }) => at[axis]! - size[axis]! / 2)),
    high: Math.max(...magnets.map(({ size, at }) => at[axis]! + size[axis]! / 2)),
  }));
  const centre = ends.map(({ low, high }) => 0.5 * (low + high));
  const place = (direction: Vector, distance: number): Vector => [
    centre[0]! + distance * direction[0],
    centre[1]! + distance * direction[1],
    centre[2]! + distance * direction[2],
  ];
  return {
    round: false,
    radius: Math.hypot(...ends.map(({ low, high }) => 0.5 * (high - low))),
    strengthAt: (direction, distance) => {
      const [x, y, z] = place(direction, distance);
      const sum: Vector = [0, 0, 0];
      for (const magnet of magnets) fieldOfBlock(magnet, x, y, z).forEach((part, axis) => (sum[axis]! += part));
      return Math.hypot(...sum);
    },
    clearanceAt: (direction, distance) => {
      const point = place(direction, distance);
      const gaps = magnets.map(({ size, at }) =>
        Math.hypot(...point.map((value, axis) => Math.max(0, Math.abs(value - at[axis]!) - size[axis]! / 2))),
      );
      return Math.min(...gaps);
    },
  };
}
