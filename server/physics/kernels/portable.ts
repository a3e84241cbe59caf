/*
 * Elementary functions from additions, multiplications, divisions and square roots alone, which IEEE 754 fixes to the
 * last bit: signals made with them are the same on every machine and engine. Accurate to about 2 ulp.
 */

const bits = new DataView(new ArrayBuffer(8));
const LN2_HIGH = 0.6931471803691238;
const LN2_LOW = 1.9082149292705877e-10;

/** 2^k exactly, for −1022 ≤ k ≤ 1023. */
function powerOfTwo(k: number): number {
  bits.setUint32(0, (k + 1023) << 20);
  bits.setUint32(4, 0);
  return bits.getFloat64(0);
}

/** ln x. @throws RangeError where x is not a normal number above 0. */
export function portableLog(x: number): number {
  if (!(x >= 2.2250738585072014e-308 && x < Infinity)) throw new RangeError(`x must be above 0 and finite, got ${x}`);
  bits.setFloat64(0, x);
  let exponent = (bits.getUint32(0) >>> 20) - 1023;
  let mantissa = x / powerOfTwo(exponent);
  if (mantissa > Math.SQRT2) {
    mantissa *= 0.5;
    exponent++;
  }
  // ln m = 2 artanh((m − 1)/(m + 1)), |s| < 0.172
  const s = (mantissa - 1) / (mantissa + 1);
  const square = s * s;
  let sum = 0;
  for (let k = 23; k >= 3; k -= 2) sum = (sum + 1 / k) * square;
  return exponent * LN2_HIGH + (2 * s * (1 + sum) + exponent * LN2_LOW);
}

/** e^x; 0 below −708, and no larger argument than 709. @throws RangeError where x is above that or not a number. */
export function portableExp(x: number): number {
  if (!(x <= 709)) throw new RangeError(`x must be at most 709, got ${x}`);
  if (x < -708) return 0;
  const k = Math.round(x / Math.LN2);
  const rest = x - k * LN2_HIGH - k * LN2_LOW;
  let sum = 1;
  for (let n = 14; n >= 1; n--) sum = 1 + (rest * sum) / n;
  return sum * powerOfTwo(k);
}

/** cos and sin of 2π · turns, into `out`. */
export function portableCirclesInto(turns: number, out: Float64Array): void {
  const whole = turns - Math.floor(turns);
  const quarter = Math.round(4 * whole);
  const angle = 2 * Math.PI * (whole - quarter / 4);
  const square = angle * angle;
  let cosine = 1;
  let sine = 1;
  for (let n = 18; n >= 2; n -= 2) {
    cosine = 1 - (square * cosine) / (n * (n - 1));
    sine = 1 - (square * sine) / (n * (n + 1));
  }
  sine *= angle;
  const turned = quarter % 4;
  out[0] = turned === 0 ? cosine : turned === 1 ? -sine : turned === 2 ? -cosine : sine;
  out[1] = turned === 0 ? sine : turned === 1 ? cosine : turned === 2 ? -sine : -cosine;
}
