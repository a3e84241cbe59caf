/**
 * Solves A x = b in place by LU with partial pivoting; `a` (row-major n × n) and `b` are overwritten, b with x.
 *
 * @returns the sign of det A, or 0 where a pivot vanishes (then b is not a solution).
 * @throws RangeError where the sizes do not fit.
 * Source: Golub & Van Loan, Matrix Computations, algorithm 3.4.1.
 */
export function solveInPlace(a: Float64Array, b: Float64Array, n: number): number {
  if (a.length < n * n || b.length < n) throw new RangeError(`matrix of ${n} needs ${n * n} entries, got ${a.length}`);
  let sign = 1;
  for (let column = 0; column < n; column++) {
    let pivot = column;
    let largest = Math.abs(a[column * n + column]!);
    for (let row = column + 1; row < n; row++) {
      const size = Math.abs(a[row * n + column]!);
      if (size > largest) {
        largest = size;
        pivot = row;
      }
    }
    if (!(largest > 0) || !Number.isFinite(largest)) return 0;
    if (pivot !== column) {
      sign = -sign;
      for (let k = column; k < n; k++) {
        const held = a[column * n + k]!;
        a[column * n + k] = a[pivot * n + k]!;
        a[pivot * n + k] = held;
      }
      const held = b[column]!;
      b[column] = b[pivot]!;
      b[pivot] = held;
    }
    const diagonal = a[column * n + column]!;
    if (diagonal < 0) sign = -sign;
    const inverse = 1 / diagonal;
    for (let row = column + 1; row < n; row++) {
      const factor = a[row * n + column]! * inverse;
      if (factor === 0) continue;
      for (let k = column + 1; k < n; k++) a[row * n + k]! -= factor * a[column * n + k]!;
      b[row]! -= factor * b[column]!;
    }
  }
  for (let row = n - 1; row >= 0; row--) {
    let sum = b[row]!;
    for (let k = row + 1; k < n; k++) sum -= a[row * n + k]! * b[k]!;
    b[row] = sum / a[row * n + row]!;
  }
  return sign;
}
