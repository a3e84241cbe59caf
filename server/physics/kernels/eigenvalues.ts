/**
 * Largest modulus among the eigenvalues of a small real matrix (row-major n × n, n ≤ 6): the characteristic polynomial
 * by Faddeev and LeVerrier, its roots together by Durand and Kerner.
 *
 * @throws RangeError where n is not from 1 to 6.
 * Source: Householder, The Theory of Matrices in Numerical Analysis (1964), sec. 6.7; Kerner, Numer. Math. 8 (1966) 290.
 */
export function spectralRadius(matrix: Float64Array, n: number): number {
  if (!Number.isInteger(n) || n < 1 || n > 6) throw new RangeError(`n must be a whole number from 1 to 6, got ${n}`);
  // p(x) = x^n + c[1] x^(n-1) + … + c[n]
  const c = [1];
  let power = new Float64Array(n * n);
  for (let k = 1; k <= n; k++) {
    const next = new Float64Array(n * n);
    for (let r = 0; r < n; r++)
      for (let q = 0; q < n; q++) {
        let sum = 0;
        for (let m = 0; m < n; m++) {
          const held = power[m * n + q]! + (m === q ? c[k - 1]! : 0);
          sum += matrix[r * n + m]! * held;
        }
        next[r * n + q] = sum;
      }
    let trace = 0;
    for (let r = 0; r < n; r++) trace += next[r * n + r]!;
    c.push(-trace / k);
    power = next;
  }
  const bound = 1 + Math.max(...c.slice(1).map(Math.abs));
  const re = Float64Array.from({ length: n }, (_, k) => 0.5 * bound * Math.cos(0.4 + (2 * Math.PI * k) / n));
  const im = Float64Array.from({ length: n }, (_, k) => 0.5 * bound * Math.sin(0.4 + (2 * Math.PI * k) / n));
  for (let sweep = 0; sweep < 500; sweep++) {
    let change = 0;
    for (let k = 0; k < n; k++) {
      let [pr, pi] = [1, 0];
      for (let m = 1; m <= n; m++) [pr, pi] = [pr * re[k]! - pi * im[k]! + c[m]!, pr * im[k]! + pi * re[k]!];
      let [qr, qi] = [1, 0];
      for (let m = 0; m < n; m++) {
        if (m === k) continue;
        const dr = re[k]! - re[m]!;
        const di = im[k]! - im[m]!;
        [qr, qi] = [qr * dr - qi * di, qr * di + qi * dr];
      }
      const size = qr * qr + qi * qi || 1e-300;
      const sr = (pr * qr + pi * qi) / size;
      const si = (pi * qr - pr * qi) / size;
      re[k]! -= sr;
      im[k]! -= si;
      change = Math.max(change, Math.hypot(sr, si));
    }
    if (change < 1e-14 * bound) break;
  }
  let largest = 0;
  for (let k = 0; k < n; k++) largest = Math.max(largest, Math.hypot(re[k]!, im[k]!));
  return largest;
}
