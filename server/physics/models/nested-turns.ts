import { gaussLegendre } from '../kernels/gauss-legendre';
import { nearLineRule } from '../kernels/graded-rule';
import { addEdgeOverElement, addEdgeOverSide, EDGE_TERMS } from './block-edge';
import type { RacetrackCoil, RectangularCoil } from './coil';
import { overDifference } from './winding-pairs';
import type { AxialEnd } from './winding-pairs';

/** Points across the mean of the two turns, along which the integrand is smooth for any difference of the turns. */
const ACROSS_POINTS = 8;
const LINE_TOLERANCE = 1e-8;
/** Least distance of two turns, relative to the outline, at which they still count as apart. */
const LEAST_DISTANCE = 1e-12;

/**
 * ∬∬ dl·dl′/r between two flat windings of the same outline and centre, averaged over their turns and summed over the
 * ends of their lengths (the difference of the turns and their mean as variables, as with round windings).
 *
 * @param ends of the second difference along z
 * @returns m³: times μ0 N N′/(4π l l′) it is the mutual inductance
 */
export function pairOfNestedTurns(coil: RacetrackCoil | RectangularCoil, ends: readonly AxialEnd[]): number {
  const pair = coil.shape === 'racetrack' ? racetrackPair(coil, ends) : rectangularPair(coil, ends);
  const build =
    coil.shape === 'racetrack'
      ? coil.outerEndRadius - coil.innerEndRadius
      : 0.5 * Math.max(coil.outer[0]! - coil.inner[0]!, coil.outer[1]! - coil.inner[1]!);
  const nearest = Math.min(...ends.map(({ distance }) => distance).filter((d) => d > 1e-9 * build)) / build;
  const across = gaussLegendre(ACROSS_POINTS);
  let sum = 0;
  // over the square of both shares of the build, symmetric: twice the half below the diagonal
  overDifference(0, 1, nearest, (v, weight) => {
    const half = 0.5 * (1 - v);
    for (let i = 0; i < ACROSS_POINTS; i++) {
      const share = v + half * (1 + across.nodes[i]!);
      sum += 2 * weight * half * across.weights[i]! * pair(share, share - v);
    }
  });
  return sum;
}

/** Two parallel sides, D apart, both centred at 0, of full lengths 2P and 2Q: ∬ dl dl′/r summed over the ends. */
function parallelSides(P: number, Q: number, D: number, ends: readonly AxialEnd[], scratch: Float64Array): number {
  scratch.fill(0);
  for (const { distance, sign } of ends) {
    addEdgeOverSide(scratch, 2 * sign, distance, P + Q, D);
    addEdgeOverSide(scratch, -2 * sign, distance, P - Q, D);
  }
  return scratch[0]!;
}

function rectangularPair(coil: RectangularCoil, ends: readonly AxialEnd[]): (s: number, t: number) => number {
  const scratch = new Float64Array(EDGE_TERMS);
  const side = (axis: number, share: number): number =>
    0.5 * (coil.inner[axis]! + (coil.outer[axis]! - coil.inner[axis]!) * share);
  return (s, t) => {
    let sum = 0;
    for (const [along, across] of [
      [1, 0],
      [0, 1],
    ] as const) {
      const P = side(along, s);
      const Q = side(along, t);
      const p = side(across, s);
      const q = side(across, t);
      // two sides each: same side with the current alike, opposite sides against it
      sum += 2 * parallelSides(P, Q, p - q, ends, scratch) - 2 * parallelSides(P, Q, p + q, ends, scratch);
    }
    return sum;
  };
}

/** 1/r averaged over both lengths, as a function of the distance ρ in the plane. */
function overLengths(rho: number, ends: readonly AxialEnd[]): number {
  let sum = 0;
  for (const { distance: z, sign } of ends) {
    sum += sign * ((z === 0 ? 0 : z * Math.asinh(z / rho)) - Math.hypot(rho, z));
  }
  return sum;
}

function racetrackPair(coil: RacetrackCoil, ends: readonly AxialEnd[]): (s: number, t: number) => number {
  const scratch = new Float64Array(EDGE_TERMS);
  const half = coil.straight / 2;
  const radius = (share: number): number => coil.innerEndRadius + (coil.outerEndRadius - coil.innerEndRadius) * share;
  const least = LEAST_DISTANCE * coil.outerEndRadius;

  /** Half circle of radius R with the sides x = ±Q of the other turn, both ends and both sides. */
  const arcWithSides = (R: number, Q: number): number => {
    const { nodes, weights } = nearLineRule(Math.PI, Math.max(Math.abs(R - Q), least) / R, LINE_TOLERANCE);
    scratch.fill(0);
    for (let i = 0; i < nodes.length; i++) {
      const x = R * Math.cos(nodes[i]!);
      const y = R * Math.sin(nodes[i]!);
      const weight = 4 * weights[i]! * x;
      for (const { distance, sign } of ends) {
        addEdgeOverElement(scratch, weight * sign, distance, y + 2 * half, x - Q);
        addEdgeOverElement(scratch, -weight * sign, distance, y, x - Q);
      }
    }
    return scratch[0]!;
  };
  /** Half circles at the same end: only the difference of the angles counts. Both ends. */
  const arcsTogether = (R: number, Q: number): number => {
    const { nodes, weights } = nearLineRule(
      Math.PI,
      Math.max(Math.abs(R - Q), least) / Math.sqrt(R * Q),
      LINE_TOLERANCE,
    );
    let sum = 0;
    for (let i = 0; i < nodes.length; i++) {
      const angle = nodes[i]!;
      const rho = Math.hypot(R - Q, 2 * Math.sqrt(R * Q) * Math.sin(angle / 2));
      sum += weights[i]! * (Math.PI - angle) * Math.cos(angle) * overLengths(rho, ends);
    }
    return 4 * R * Q * sum;
  };
  /** Half circles at opposite ends, both ways. Graded to where they come closest if the straight part is short. */
  const arcsApart = (R: number, Q: number): number => {
    const width = Math.max((2 * half + Math.abs(R - Q)) / Math.max(R, Q), 1e-6);
    const { nodes, weights } = nearLineRule(Math.PI / 2, width, 1e-7);
    let sum = 0;
    for (let i = 0; i < nodes.length; i++) {
      const above = { x: R * Math.cos(nodes[i]!), y: 2 * half + R * Math.sin(nodes[i]!) };
      for (let j = 0; j < nodes.length; j++) {
        const below = { x: Q * Math.cos(nodes[j]!), y: -Q * Math.sin(nodes[j]!) };
        const weight = weights[i]! * weights[j]!;
        const apart = above.y - below.y;
        // angles a and −b on the same side, a and π + b on the other; each mirrored in x
        sum += 2 * weight * Math.cos(nodes[i]! + nodes[j]!) * overLengths(Math.hypot(above.x - below.x, apart), ends);
        sum -= 2 * weight * Math.cos(nodes[i]! - nodes[j]!) * overLengths(Math.hypot(above.x + below.x, apart), ends);
      }
    }
    return 2 * R * Q * sum;
  };
  return (s, t) => {
    const R = radius(s);
    const Q = radius(t);
    const sides =
      2 * parallelSides(half, half, R - Q, ends, scratch) - 2 * parallelSides(half, half, R + Q, ends, scratch);
    return sides + arcWithSides(R, Q) + arcWithSides(Q, R) + arcsTogether(R, Q) + arcsApart(R, Q);
  };
}
