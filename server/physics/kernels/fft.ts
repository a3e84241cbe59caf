import { portableCirclesInto } from './portable';

/**
 * In-place discrete Fourier sum X_k = Σ x_n e^{±2πi kn/N} of N = 2^m complex values, unscaled; sign +1 or −1.
 * Twiddle factors and sums use portable arithmetic only, so the result is the same bit for bit everywhere.
 *
 * @throws RangeError where the lengths differ or are not a power of two.
 * Source: Cooley & Tukey, Math. Comput. 19 (1965) 297.
 */
export function fourierSum(re: Float64Array, im: Float64Array, sign: 1 | -1): void {
  const n = re.length;
  if (im.length !== n || n < 1 || (n & (n - 1)) !== 0)
    throw new RangeError(`length must be a power of two in both parts, got ${n} and ${im.length}`);
  for (let i = 1, j = 0; i < n; i++) {
    let bit = n >> 1;
    for (; j & bit; bit >>= 1) j ^= bit;
    j ^= bit;
    if (i < j) {
      const [r, m] = [re[i]!, im[i]!];
      re[i] = re[j]!;
      im[i] = im[j]!;
      re[j] = r;
      im[j] = m;
    }
  }
  const half = n >> 1;
  const cosine = new Float64Array(Math.max(1, half));
  const sine = new Float64Array(Math.max(1, half));
  const circle = new Float64Array(2);
  for (let k = 0; k < half; k++) {
    portableCirclesInto(k / n, circle);
    cosine[k] = circle[0]!;
    sine[k] = sign * circle[1]!;
  }
  for (let size = 2; size <= n; size <<= 1) {
    const middle = size >> 1;
    const stride = n / size;
    for (let start = 0; start < n; start += size)
      for (let k = 0, at = start, twiddle = 0; k < middle; k++, at++, twiddle += stride) {
        const other = at + middle;
        const c = cosine[twiddle]!;
        const s = sine[twiddle]!;
        const r = re[other]! * c - im[other]! * s;
        const m = re[other]! * s + im[other]! * c;
        re[other] = re[at]! - r;
        im[other] = im[at]! - m;
        re[at]! += r;
        im[at]! += m;
      }
  }
}
