import { gaussLegendre } from './gauss-legendre';

/**
 * Coefficients of the Legendre series Σ c_k P_k(t) on [−1, 1] that passes through values at the Gauss nodes.
 *
 * @param values at the nodes of `gaussLegendre(values.length)`, in their order
 * @returns as many coefficients
 * Source: discrete orthogonality, DLMF 18.3; exact for polynomials below the number of nodes.
 */
export function legendreSeries(values: Float64Array): Float64Array {
  const n = values.length;
  const { nodes, weights } = gaussLegendre(n);
  const series = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const x = nodes[i]!;
    const f = weights[i]! * values[i]!;
    let below = 0;
    let here = 1;
    for (let k = 0; k < n; k++) {
      series[k]! += (k + 0.5) * f * here;
      const next = ((2 * k + 1) * x * here - k * below) / (k + 1);
      below = here;
      here = next;
    }
  }
  return series;
}

/**
 * Series of the integral from −1, times a factor, plus a start: start + factor ∫₋₁ᵗ Σ c_k P_k.
 *
 * @param factor half the length of the panel that [−1, 1] stands for
 * @param start value at −1
 * @returns one coefficient more than given
 * Source: (2k + 1) P_k = P′_{k+1} − P′_{k−1}, DLMF 18.9.
 */
export function integratedSeries(series: Float64Array, factor: number, start: number): Float64Array {
  const n = series.length;
  const integral = new Float64Array(n + 1);
  for (let k = 0; k < n; k++) {
    const share = (factor * series[k]!) / (2 * k + 1);
    integral[k + 1]! += share;
    if (k > 0) integral[k - 1]! -= share;
  }
  // value at −1: Σ (−1)^k c_k
  let atStart = 0;
  for (let k = n; k >= 0; k--) atStart += k % 2 === 0 ? integral[k]! : -integral[k]!;
  integral[0]! += start - atStart;
  return integral;
}

/** Value of Σ c_k P_k(t), by Clenshaw's recurrence. */
export function legendreSeriesAt(series: Float64Array, t: number): number {
  let above = 0;
  let here = 0;
  for (let k = series.length - 1; k >= 1; k--) {
    const next = series[k]! + ((2 * k + 1) / (k + 1)) * t * here - ((k + 1) / (k + 2)) * above;
    above = here;
    here = next;
  }
  return series[0]! + t * here - 0.5 * above;
}
