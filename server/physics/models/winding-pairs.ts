import { gaussLegendre } from '../kernels/gauss-legendre';
import { gradedRule } from '../kernels/graded-rule';

/** One end of the second difference along the axis that two windings' lengths make of an even function. */
export interface AxialEnd {
  /** Distance (m), zero or positive. */
  readonly distance: number;
  /** Whole-numbered factor. */
  readonly sign: number;
}

/** Relative error of the rule over the difference of two turns. */
const TOLERANCE = 1e-12;
/** Points of the first stretch beside v = 0, where v = s t³ turns v² ln v into a function smooth enough for Gauss. */
const FIRST_POINTS = 14;

/**
 * ∬ f(z − z′) over the lengths of two windings is Σ sign F(distance) with F″ = f even: the four ends, equal distances
 * merged.
 *
 * @param p, q length (m) and centre along the axis (m)
 */
export function axialEnds(p: { length: number; at: number }, q: { length: number; at: number }): AxialEnd[] {
  const offset = p.at - q.at;
  const rounding = 1e-13 * (p.length + q.length);
  const ends: { distance: number; sign: number }[] = [];
  for (const i of [1, -1]) {
    for (const j of [1, -1]) {
      const exact = Math.abs(offset + 0.5 * (i * p.length + j * q.length));
      const distance = exact < rounding ? 0 : exact;
      const same = ends.find((end) => Math.abs(end.distance - distance) < rounding);
      if (same) same.sign += i * j;
      else ends.push({ distance, sign: i * j });
    }
  }
  return ends.filter(({ sign }) => sign !== 0);
}

/**
 * Rule over the difference v of two turns in [left, right] for integrands singular at v = 0 ± i z, z one of the ends.
 *
 * @param left, right range; v = 0 may be one of its ends but not lie inside
 * @param nearest smallest distance z > 0 of the ends, in the unit of v
 * @param add called with v and weight of each point
 */
export function overDifference(
  left: number,
  right: number,
  nearest: number,
  add: (v: number, weight: number) => void,
): void {
  if (left > 0 || right < 0) {
    const { nodes, weights } = gradedRule(left, right, 0, TOLERANCE);
    for (let i = 0; i < nodes.length; i++) add(nodes[i]!, weights[i]!);
    return;
  }
  const direction = right > 0 ? 1 : -1;
  const reach = Math.max(right, -left);
  const first = Math.min(reach, nearest);
  const { nodes, weights } = gaussLegendre(FIRST_POINTS);
  for (let i = 0; i < FIRST_POINTS; i++) {
    const t = 0.5 * (1 + nodes[i]!);
    add(direction * first * t * t * t, 1.5 * weights[i]! * first * t * t);
  }
  if (reach > first) {
    const rest = gradedRule(first, reach, 0, TOLERANCE);
    for (let i = 0; i < rest.nodes.length; i++) add(direction * rest.nodes[i]!, rest.weights[i]!);
  }
}
