/** Nodes on (−1, 1) in rising order and their weights; the weights sum to 2. */
export interface QuadratureRule {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
}

const LARGEST_ORDER = 256;
const rules: (QuadratureRule | undefined)[] = [];

/**
 * Gauss–Legendre rule: exact for polynomials up to degree 2n − 1 on [−1, 1]. Rules are made once and shared: do not
 * write into them.
 *
 * @param n number of points, 1 to 256
 * @throws RangeError where n is not such an integer
 * Source: Newton iteration on the three-term recurrence from Tricomi's first guess (DLMF 3.5.15, 18.16.10).
 */
export function gaussLegendre(n: number): QuadratureRule {
  if (!Number.isInteger(n) || n < 1 || n > LARGEST_ORDER) {
    throw new RangeError(`n must be an integer from 1 to ${LARGEST_ORDER}, got ${n} (points)`);
  }
  const known = rules[n];
  if (known) return known;
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; i < (n + 1) >> 1; i++) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    for (let step = 0; step < 20; step++) {
      let below = 1;
      let value = x;
      for (let k = 2; k <= n; k++) {
        const next = ((2 * k - 1) * x * value - (k - 1) * below) / k;
        below = value;
        value = next;
      }
      const slope = (n * (below - x * value)) / ((1 - x) * (1 + x));
      const move = value / slope;
      x -= move;
      if (Math.abs(move) < 1e-15) break;
    }
    if (2 * i + 1 === n) x = 0;
    const weight = legendreWeight(n, x);
    nodes[i] = -x;
    nodes[n - 1 - i] = x;
    weights[i] = weight;
    weights[n - 1 - i] = weight;
  }
  const rule: QuadratureRule = { nodes, weights };
  rules[n] = rule;
  return rule;
}

/** w = 2 (1 − x²) / (n P_{n−1}(x))²: the form that stays accurate near the ends. */
function legendreWeight(n: number, x: number): number {
  let below = 1;
  let value = x;
  for (let k = 2; k < n; k++) {
    const next = ((2 * k - 1) * x * value - (k - 1) * below) / k;
    below = value;
    value = next;
  }
  const previous = n === 1 ? 1 : value;
  return (2 * (1 - x) * (1 + x)) / (n * previous * (n * previous));
}

/**
 * ∫ f over [from, to] with the n-point Gauss–Legendre rule. For smooth integrands; use panels for others.
 *
 * @param f integrand
 * @param n number of points, 1 to 256
 */
export function integrate(f: (x: number) => number, from: number, to: number, n: number): number {
  const { nodes, weights } = gaussLegendre(n);
  const middle = 0.5 * (from + to);
  const half = 0.5 * (to - from);
  let sum = 0;
  for (let i = 0; i < n; i++) sum += weights[i]! * f(middle + half * nodes[i]!);
  return half * sum;
}
