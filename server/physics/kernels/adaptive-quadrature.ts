/** Positive abscissae of the 15-point Kronrod rule, descending; every second one belongs to the 7-point Gauss rule. */
const NODES = [
  0.9914553711208126, 0.9491079123427585, 0.8648644233597691, 0.7415311855993945, 0.5860872354676911,
  0.4058451513773972, 0.20778495500789848, 0,
];
const KRONROD = [
  0.022935322010529224, 0.06309209262997856, 0.10479001032225019, 0.14065325971552592, 0.1690047266392679,
  0.19035057806478542, 0.20443294007529889, 0.20948214108472782,
];
const GAUSS = [0.1294849661688697, 0.27970539148927664, 0.3818300505051189, 0.4179591836734694];
const MOST_INTERVALS = 4000;

/**
 * Integrals of several functions at once over [from, to] with breaks, by adaptive Gauss–Kronrod (7, 15) bisection.
 *
 * @param evaluateInto writes the `count` integrands at t into `out`.
 * @param breaks ascending interior points where the integrands have kinks or sharp peaks; the interval is cut there.
 * @param tolerance wanted error of each integral relative to its own magnitude.
 * @returns the integrals, the sum of the error estimates relative to each, and whether the tolerance was met.
 * @throws RangeError where an end is not finite or the tolerance is not positive.
 * Source: Piessens et al., QUADPACK (1983), rule QK15. Order: exact for polynomials of degree 22.
 */
export function integrateAdaptively(
  evaluateInto: (t: number, out: Float64Array) => void,
  count: number,
  breaks: readonly number[],
  tolerance: number,
): { integrals: Float64Array; error: number; converged: boolean } {
  if (!(tolerance > 0)) throw new RangeError(`tolerance must be above 0, got ${tolerance}`);
  if (breaks.length < 2) throw new RangeError(`breaks must hold both ends, got ${breaks.length} points`);
  const totals = new Float64Array(count);
  const errors = new Float64Array(count);
  const value = new Float64Array(count);
  type Piece = { from: number; to: number; integrals: Float64Array; errors: Float64Array; worst: number };
  const measure = (from: number, to: number): Piece => {
    const integrals = new Float64Array(count);
    const coarse = new Float64Array(count);
    const centre = 0.5 * (from + to);
    const half = 0.5 * (to - from);
    for (let n = 0; n < 8; n++) {
      const offset = NODES[n]! * half;
      const gauss = n % 2 === 1 ? GAUSS[(n - 1) / 2]! : 0;
      for (let side = n === 7 ? 1 : -1; side <= 1; side += 2) {
        evaluateInto(centre + side * offset, value);
        for (let k = 0; k < count; k++) {
          integrals[k]! += half * KRONROD[n]! * value[k]!;
          coarse[k]! += half * gauss * value[k]!;
        }
      }
    }
    const gap = coarse.map((c, k) => Math.abs(c - integrals[k]!));
    return { from, to, integrals, errors: gap, worst: 0 };
  };
  const pieces: Piece[] = [];
  for (let n = 1; n < breaks.length; n++) {
    const from = breaks[n - 1]!;
    const to = breaks[n]!;
    if (!Number.isFinite(from) || !Number.isFinite(to))
      throw new RangeError(`break must be finite, got ${from}, ${to}`);
    if (to > from) pieces.push(measure(from, to));
  }
  const sum = (): void => {
    totals.fill(0);
    errors.fill(0);
    for (const piece of pieces)
      for (let k = 0; k < count; k++) {
        totals[k]! += piece.integrals[k]!;
        errors[k]! += piece.errors[k]!;
      }
  };
  const relativeError = (of: Float64Array): number => {
    let worst = 0;
    for (let k = 0; k < count; k++)
      if (of[k]! > 0) worst = Math.max(worst, of[k]! / Math.max(Math.abs(totals[k]!), 1e-300));
    return worst;
  };
  sum();
  while (relativeError(errors) > tolerance && pieces.length < MOST_INTERVALS) {
    let worst = 0;
    let worstError = -1;
    for (let n = 0; n < pieces.length; n++) {
      const error = relativeError(pieces[n]!.errors);
      if (error > worstError) {
        worstError = error;
        worst = n;
      }
    }
    const piece = pieces[worst]!;
    const centre = 0.5 * (piece.from + piece.to);
    if (!(centre > piece.from && centre < piece.to)) break;
    pieces[worst] = measure(piece.from, centre);
    pieces.push(measure(centre, piece.to));
    sum();
  }
  const error = relativeError(errors);
  return { integrals: totals, error, converged: error <= tolerance };
}
