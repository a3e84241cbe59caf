/** C = A B for row-major n × n matrices; `out` must be neither. */
export function multiplyInto(a: Float64Array, b: Float64Array, n: number, out: Float64Array): void {
  for (let r = 0; r < n; r++)
    for (let c = 0; c < n; c++) {
      let sum = 0;
      for (let k = 0; k < n; k++) sum += a[r * n + k]! * b[k * n + c]!;
      out[r * n + c] = sum;
    }
}

/** Largest row sum of magnitudes. */
function rowNorm(a: Float64Array, n: number): number {
  let largest = 0;
  for (let r = 0; r < n; r++) {
    let sum = 0;
    for (let c = 0; c < n; c++) sum += Math.abs(a[r * n + c]!);
    largest = Math.max(largest, sum);
  }
  return largest;
}

/** e^A for ‖A‖ ≤ 0.25 by its Taylor series to degree 12: the rest is below 1e-17. */
function smallExponential(a: Float64Array, n: number): Float64Array {
  let sum = new Float64Array(n * n);
  let next = new Float64Array(n * n);
  for (let k = 0; k < n; k++) sum[k * n + k] = 1;
  for (let degree = 12; degree >= 1; degree--) {
    multiplyInto(a, sum, n, next);
    for (let k = 0; k < n * n; k++) next[k]! /= degree;
    for (let k = 0; k < n; k++) next[k * n + k]! += 1;
    [sum, next] = [next, sum];
  }
  return sum;
}

/**
 * e^{A t} and, for each symmetric Q, ∫₀ᵗ e^{Aᵀs} Q e^{As} ds: the exact step of ẇ = A w and the exact integrals of
 * the quadratic forms wᵀQw over it, all by halving the step until ‖A‖t is small and doubling back, so that decays far
 * faster than the step do no harm.
 *
 * @param a row-major n × n; @param forms row-major n × n each; @param time t, above 0.
 * @throws RangeError where sizes do not fit or the time is not above 0.
 * Source: Moler & Van Loan, SIAM Rev. 45 (2003) 3 (scaling and squaring); doubling of Gramians as in Smith's method.
 */
export function exponentialStep(
  a: Float64Array,
  n: number,
  time: number,
  forms: readonly Float64Array[] = [],
): { step: Float64Array; integrals: Float64Array[] } {
  if (a.length !== n * n) throw new RangeError(`matrix must hold ${n * n} entries, got ${a.length}`);
  if (!(time > 0) || !Number.isFinite(time)) throw new RangeError(`time must be above 0, got ${time} s`);
  let doublings = 0;
  for (let size = rowNorm(a, n) * time; size > 0.25; size *= 0.5) doublings++;
  const small = time / 2 ** doublings;
  const scaled = (share: number): Float64Array => a.map((value) => value * small * share);
  let step = smallExponential(scaled(1), n);
  // Gauss–Legendre with 6 points: exact to degree 11 where the exponent is at most 2 · 0.25
  const nodes = [0.2386191860831969, 0.6612093864662645, 0.932469514203152];
  const weights = [0.467913934572691, 0.3607615730481386, 0.1713244923791704];
  const integrals = forms.map(() => new Float64Array(n * n));
  const product = new Float64Array(n * n);
  const congruenceInto = (e: Float64Array, q: Float64Array, factor: number, out: Float64Array): void => {
    multiplyInto(q, e, n, product);
    for (let r = 0; r < n; r++)
      for (let c = 0; c < n; c++) {
        let sum = 0;
        for (let k = 0; k < n; k++) sum += e[k * n + r]! * product[k * n + c]!;
        out[r * n + c]! += factor * sum;
      }
  };
  for (let k = 0; k < 3; k++)
    for (const sign of [-1, 1]) {
      if (forms.length === 0) break;
      const at = smallExponential(scaled(0.5 * (1 + sign * nodes[k]!)), n);
      forms.forEach((form, f) => congruenceInto(at, form, 0.5 * small * weights[k]!, integrals[f]!));
    }
  for (let d = 0; d < doublings; d++) {
    for (const integral of integrals) congruenceInto(step, Float64Array.from(integral), 1, integral);
    const squared = new Float64Array(n * n);
    multiplyInto(step, step, n, squared);
    step = squared;
  }
  return { step, integrals };
}
