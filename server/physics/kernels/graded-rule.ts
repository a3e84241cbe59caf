import { gaussLegendre } from './gauss-legendre';
import type { QuadratureRule } from './gauss-legendre';

/** Largest length of a panel in the logarithmic variable; longer ranges are cut. */
const PANEL_LENGTH = 2.8;
/** Part of the range next to a singularity inside it that is left out: x ln x is below 1e-11 there. */
const CUT = 1e-13;

/**
 * Quadrature rule on [from, to] for functions that are analytic except near the vertical line through `singularity`:
 * at `singularity` itself, or at `singularity` ± i·δ for any δ, as the fields of a wire, a sheet or a charged edge are.
 *
 * With t = ln|x − singularity| every such point lies on Im t = ±π/2, whatever δ and however close the singularity is to
 * the range: Gauss–Legendre in t converges at a rate that depends on the range's length in t alone.
 *
 * @param from, to range, from < to
 * @param singularity real part of the singular points; inside the range the singularity must be integrable
 *   (logarithmic, or weaker)
 * @param tolerance relative error aimed at, above 1e-15
 * @returns nodes in [from, to] and weights that sum to to − from (to within the part left out)
 * @throws RangeError where the range is empty
 */
export function gradedRule(from: number, to: number, singularity: number, tolerance: number): QuadratureRule {
  if (!(to > from)) throw new RangeError(`to must be above from = ${from}, got ${to}`);
  const nodes: number[] = [];
  const weights: number[] = [];
  if (singularity <= from) appendSide(nodes, weights, from - singularity, to - singularity, singularity, 1, tolerance);
  else if (singularity >= to) {
    appendSide(nodes, weights, singularity - to, singularity - from, singularity, -1, tolerance);
  } else {
    appendSide(nodes, weights, 0, singularity - from, singularity, -1, tolerance);
    appendSide(nodes, weights, 0, to - singularity, singularity, 1, tolerance);
  }
  return { nodes: Float64Array.from(nodes), weights: Float64Array.from(weights) };
}

/** Points of a rule whose panel has the given length in t: the ellipse of analyticity reaches to Im t = π/2. */
function pointsFor(length: number, tolerance: number): number {
  const q = Math.PI / length;
  const rho = q + Math.sqrt(1 + q * q);
  return Math.max(3, Math.ceil(-Math.log(tolerance) / (2 * Math.log(rho))) + 1);
}

function appendSide(
  nodes: number[],
  weights: number[],
  near: number,
  far: number,
  singularity: number,
  direction: 1 | -1,
  tolerance: number,
): void {
  const start = Math.log(Math.max(near, far * CUT));
  const range = Math.log(far) - start;
  const panels = Math.max(1, Math.ceil(range / PANEL_LENGTH));
  const length = range / panels;
  const rule = gaussLegendre(Math.min(64, pointsFor(length, tolerance)));
  for (let k = 0; k < panels; k++) {
    const left = start + k * length;
    for (let i = 0; i < rule.nodes.length; i++) {
      const distance = Math.exp(left + 0.5 * length * (1 + rule.nodes[i]!));
      nodes.push(singularity + direction * distance);
      weights.push(0.5 * length * rule.weights[i]! * distance);
    }
  }
}

/**
 * Quadrature rule on [0, to] for functions that are analytic except near ± i·width: the nearly singular case of a place
 * beside a line.
 *
 * @param to end of the range, positive
 * @param width distance of the singular points from the real axis, positive
 * @param tolerance relative error aimed at
 * @returns nodes and weights that sum to `to`
 * @throws RangeError where `to` or `width` is not positive
 * Method: x = width sinh t puts the singular points on Im t = ±π/2, whatever the width.
 */
export function nearLineRule(to: number, width: number, tolerance: number): QuadratureRule {
  if (!(to > 0) || !(width > 0)) throw new RangeError(`to and width must be positive, got ${to} and ${width}`);
  const range = Math.asinh(to / width);
  const panels = Math.max(1, Math.ceil(range / PANEL_LENGTH));
  const length = range / panels;
  const rule = gaussLegendre(Math.min(64, pointsFor(length, tolerance)));
  const points = rule.nodes.length;
  const nodes = new Float64Array(panels * points);
  const weights = new Float64Array(panels * points);
  for (let k = 0; k < panels; k++) {
    for (let i = 0; i < points; i++) {
      const t = length * (k + 0.5 * (1 + rule.nodes[i]!));
      nodes[k * points + i] = width * Math.sinh(t);
      weights[k * points + i] = 0.5 * length * rule.weights[i]! * width * Math.cosh(t);
    }
  }
  return { nodes, weights };
}
