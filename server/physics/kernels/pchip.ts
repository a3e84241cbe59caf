/**
 * Shape-preserving piecewise cubic through tabulated points: monotone where the data are, no overshoot, C¹.
 *
 * `position` rises strictly; `value`, `slope` belong to its points. Panel i runs from position[i] to position[i + 1].
 */
export interface MonotoneCubic {
  readonly position: Float64Array;
  readonly value: Float64Array;
  readonly slope: Float64Array;
}

/**
 * Slopes after Fritsch and Butland: the weighted harmonic mean of the neighbouring secants inside, the three-point
 * formula limited to preserve shape at the ends. Two points give a straight line.
 *
 * @param position abscissae, at least two, strictly rising, finite
 * @param value ordinates, as many, finite
 * @throws RangeError where lengths differ, fewer than two points are given, or positions do not rise
 * Source: F. N. Fritsch & J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300; ends as in PCHIM (Fritsch & Carlson,
 * SIAM J. Numer. Anal. 17 (1980) 238).
 */
export function monotoneCubic(position: ArrayLike<number>, value: ArrayLike<number>): MonotoneCubic {
  const n = position.length;
  if (n < 2) throw new RangeError(`position must have at least 2 points, got ${n}`);
  if (value.length !== n) throw new RangeError(`value must have ${n} points as position has, got ${value.length}`);
  const x = Float64Array.from(position);
  const y = Float64Array.from(value);
  const h = new Float64Array(n - 1);
  const secant = new Float64Array(n - 1);
  for (let i = 0; i < n; i++) {
    if (!Number.isFinite(x[i]) || !Number.isFinite(y[i])) {
      throw new RangeError(`point ${i} must be finite, got (${x[i]}, ${y[i]})`);
    }
  }
  for (let i = 0; i < n - 1; i++) {
    h[i] = x[i + 1]! - x[i]!;
    if (!(h[i]! > 0))
      throw new RangeError(`position must rise strictly, got ${x[i]} then ${x[i + 1]} at point ${i + 1}`);
    secant[i] = (y[i + 1]! - y[i]!) / h[i]!;
  }
  const slope = new Float64Array(n);
  if (n === 2) {
    slope.fill(secant[0]!);
    return { position: x, value: y, slope };
  }
  for (let i = 1; i < n - 1; i++) {
    const before = secant[i - 1]!;
    const after = secant[i]!;
    if (before * after > 0) {
      const w1 = 2 * h[i]! + h[i - 1]!;
      const w2 = h[i]! + 2 * h[i - 1]!;
      slope[i] = (w1 + w2) / (w1 / before + w2 / after);
    }
  }
  slope[0] = endSlope(h[0]!, h[1]!, secant[0]!, secant[1]!);
  slope[n - 1] = endSlope(h[n - 2]!, h[n - 3]!, secant[n - 2]!, secant[n - 3]!);
  return { position: x, value: y, slope };
}

function endSlope(h0: number, h1: number, s0: number, s1: number): number {
  const slope = ((2 * h0 + h1) * s0 - h0 * s1) / (h0 + h1);
  if (Math.sign(slope) !== Math.sign(s0)) return 0;
  if (Math.sign(s0) !== Math.sign(s1) && Math.abs(slope) > 3 * Math.abs(s0)) return 3 * s0;
  return slope;
}

/** Panel that holds x: the last one whose start is not above x, clamped to the table. */
function panelOf(position: Float64Array, x: number): number {
  let low = 0;
  let high = position.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (position[middle]! <= x) low = middle;
    else high = middle;
  }
  return low;
}

/** Value at x; outside the table the end panels' cubics are not trusted and the end value is held. */
export function monotoneCubicAt(curve: MonotoneCubic, x: number): number {
  const { position, value, slope } = curve;
  const last = position.length - 1;
  if (x <= position[0]!) return value[0]!;
  if (x >= position[last]!) return value[last]!;
  const i = panelOf(position, x);
  const h = position[i + 1]! - position[i]!;
  const t = (x - position[i]!) / h;
  const u = 1 - t;
  return (
    u * u * (1 + 2 * t) * value[i]! +
    t * t * (1 + 2 * u) * value[i + 1]! +
    h * t * u * (u * slope[i]! - t * slope[i + 1]!)
  );
}

/** Slope at x; zero outside the table, where the end value is held. */
export function monotoneCubicSlopeAt(curve: MonotoneCubic, x: number): number {
  const { position, value, slope } = curve;
  const last = position.length - 1;
  if (x < position[0]! || x > position[last]!) return 0;
  const i = panelOf(position, x);
  const h = position[i + 1]! - position[i]!;
  const t = (x - position[i]!) / h;
  const u = 1 - t;
  const secant = (value[i + 1]! - value[i]!) / h;
  return 6 * t * u * secant + u * (u - 2 * t) * slope[i]! + t * (t - 2 * u) * slope[i + 1]!;
}
