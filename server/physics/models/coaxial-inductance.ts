import { gaussLegendre } from '../kernels/gauss-legendre';
import { axialEnds, overDifference } from './winding-pairs';
import { addCoaxialCircles, CIRCLE_TERMS } from './coaxial-circles';

/** A thick round winding on a common axis; current spread evenly over the window. SI. */
export interface AxialWinding {
  readonly innerRadius: number;
  readonly outerRadius: number;
  readonly length: number;
  /** Centre on the axis (m). */
  readonly at: number;
  readonly turns: number;
}

/** Points across the mean of the two radii, along which the integrand is smooth for any difference of the radii. */
const ACROSS_POINTS = 10;

/**
 * Mutual inductance of two coaxial thick round windings; self-inductance where both are the same.
 *
 * Over both axes the integral is the second difference of G (closed form). Over both radii r, r′ it is done in their
 * difference v = r − r′, where the integrand has its only singular points (v = 0 ± i z), and their mean, along which it
 * is smooth: one graded and one plain rule.
 *
 * @returns H, positive
 * @throws RangeError where a window has no area
 * Accuracy: 1e-10. Sources: Rosa & Grover, Bull. Bur. Stand. 8 (1912); S. I. Babic, C. Akyel, IEEE Trans. Magn. 42
 * (2006) 1661.
 */
export function mutualOfWindings(p: AxialWinding, q: AxialWinding): number {
  for (const w of [p, q]) {
    if (!(w.outerRadius > w.innerRadius) || !(w.innerRadius >= 0) || !(w.length > 0)) {
      throw new RangeError(
        `winding must have outer radius above inner radius and positive length, got ${w.innerRadius}, ${w.outerRadius}, ${w.length} m`,
      );
    }
  }
  const ends = axialEnds(p, q);
  const total = new Float64Array(CIRCLE_TERMS);
  const across = gaussLegendre(ACROSS_POINTS);
  const addStrip = (v: number, weight: number): void => {
    const low = Math.max(p.innerRadius, q.innerRadius + v);
    const half = 0.5 * (Math.min(p.outerRadius, q.outerRadius + v) - low);
    for (let i = 0; i < ACROSS_POINTS; i++) {
      const r = low + half * (1 + across.nodes[i]!);
      const w = weight * half * across.weights[i]!;
      for (const { distance, sign } of ends) addCoaxialCircles(total, w * sign, r, r - v, distance);
    }
  };

  const from = p.innerRadius - q.outerRadius;
  const to = p.outerRadius - q.innerRadius;
  const alike = p.innerRadius === q.innerRadius && p.outerRadius === q.outerRadius;
  const nearest = Math.min(...ends.map(({ distance }) => distance).filter((d) => d > 1e-9 * (to - from)));
  // the strip's limits turn where an edge of one window passes an edge of the other; v = 0 is singular
  const breaks = alike
    ? [0, to]
    : [from, p.innerRadius - q.innerRadius, p.outerRadius - q.outerRadius, to, 0].sort((a, b) => a - b);
  for (let k = 1; k < breaks.length; k++) {
    const left = Math.max(from, breaks[k - 1]!);
    const right = Math.min(to, breaks[k]!);
    if (right - left > 1e-12 * (to - from)) overDifference(left, right, nearest, addStrip);
  }
  const area = (w: AxialWinding): number => w.length * (w.outerRadius - w.innerRadius);
  return ((alike ? 2 : 1) * p.turns * q.turns * total[0]!) / (area(p) * area(q));
}
