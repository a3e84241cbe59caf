const MOST_STEPS = 200;

/**
 * Root of a continuous function between two points where its signs differ: secant steps kept inside the bracket, with
 * bisection whenever a step does not halve it (Dekker–Brent idea, Illinois variant of regula falsi).
 *
 * @param f function of x
 * @param a, b ends of the bracket, in either order; f(a) and f(b) must differ in sign or one of them be zero
 * @param tolerance width of the bracket at which to stop, in the unit of x, positive
 * @returns x with a sign change within `tolerance`
 * @throws RangeError where the signs do not differ or f is not finite
 * Source: M. Dowell, P. Jarratt, BIT 11 (1971) 168.
 */
export function bracketedRoot(f: (x: number) => number, a: number, b: number, tolerance: number): number {
  let low = a;
  let high = b;
  let atLow = f(low);
  let atHigh = f(high);
  if (!Number.isFinite(atLow) || !Number.isFinite(atHigh)) throw new RangeError('f must be finite at both ends');
  if (atLow === 0) return low;
  if (atHigh === 0) return high;
  if (atLow > 0 === atHigh > 0) throw new RangeError(`f must change sign between ${a} and ${b}`);
  let kept = 0;
  for (let step = 0; step < MOST_STEPS && Math.abs(high - low) > tolerance; step++) {
    const bisect = step % 4 === 3;
    const x = bisect ? 0.5 * (low + high) : (low * atHigh - high * atLow) / (atHigh - atLow);
    const value = f(x);
    if (value === 0) return x;
    if (value > 0 === atHigh > 0) {
      high = x;
      atHigh = value;
      if (!bisect && kept === 1) atLow *= 0.5;
      kept = bisect ? 0 : 1;
    } else {
      low = x;
      atLow = value;
      if (!bisect && kept === -1) atHigh *= 0.5;
      kept = bisect ? 0 : -1;
    }
  }
  return 0.5 * (low + high);
}
