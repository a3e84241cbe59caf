/**
 * Complete elliptic integrals by the arithmetic-geometric mean.
 *
 * All three take the complementary modulus `kc` (kc² = 1 − k² = 1 − m): near k = 1, where coaxial circles almost
 * touch, kc is what is known exactly and 1 − k² would lose every digit.
 */

/** Where consecutive means differ by less than this, the next step is exact in double precision. */
const MEAN_SETTLED = 1e-8;

/** Value and meaning of one argument that a kernel cannot accept. */
function refuse(name: string, requirement: string, value: number): never {
  throw new RangeError(`${name} must be ${requirement}, got ${value} (no unit)`);
}

/**
 * Complete elliptic integral of the first kind, K = ∫₀^{π/2} dψ / √(1 − k² sin²ψ).
 *
 * @param kc complementary modulus √(1 − k²), in (0, 1] for real k, above 1 for imaginary k
 * @returns K, dimensionless
 * @throws RangeError where kc is not a positive finite number (K is infinite at kc = 0)
 * Source: DLMF 19.8.5.
 */
export function completeK(kc: number): number {
  if (!(kc > 0) || !Number.isFinite(kc)) refuse('kc', 'positive and finite', kc);
  let a = 1;
  let g = kc;
  while (Math.abs(a - g) > MEAN_SETTLED * a) {
    const mean = 0.5 * (a + g);
    g = Math.sqrt(a * g);
    a = mean;
  }
  return Math.PI / (a + g);
}

/**
 * Complete elliptic integral of the second kind, E = ∫₀^{π/2} √(1 − k² sin²ψ) dψ.
 *
 * @param kc complementary modulus √(1 − k²), zero or positive
 * @returns E, dimensionless; E(kc = 0) = 1
 * @throws RangeError where kc is negative or not finite
 * Source: DLMF 19.8.6, E = K (1 − Σ 2^{n−1} c_n²).
 */
export function completeE(kc: number): number {
  if (!(kc >= 0) || !Number.isFinite(kc)) refuse('kc', 'zero or positive and finite', kc);
  if (kc === 0) return 1;
  let a = 1;
  let g = kc;
  let sum = 0.5 * (1 - kc) * (1 + kc);
  let power = 0.5;
  while (Math.abs(a - g) > MEAN_SETTLED * a) {
    const c = 0.5 * (a - g);
    const mean = 0.5 * (a + g);
    g = Math.sqrt(a * g);
    a = mean;
    power *= 2;
    sum += power * c * c;
  }
  return (Math.PI / (a + g)) * (1 - sum);
}

/**
 * Complete elliptic integral of the third kind, Π = ∫₀^{π/2} dψ / ((1 − n sin²ψ) √(1 − k² sin²ψ)).
 *
 * @param n characteristic, below 1 (negative allowed)
 * @param kc complementary modulus, positive
 * @returns Π(n, k), dimensionless
 * @throws RangeError where n ≥ 1 (principal values are not offered) or kc is not positive and finite
 * Source: DLMF 19.8.7–19.8.9. The sum over Q_n is closed exactly once the means have met, since Π(n, 0) is elementary;
 * without that it would converge only linearly for n near 1.
 */
export function completePi(n: number, kc: number): number {
  if (!(n < 1)) refuse('n', 'below 1', n);
  if (!(kc > 0) || !Number.isFinite(kc)) refuse('kc', 'positive and finite', kc);
  let a = 1;
  let g = kc;
  let p = Math.sqrt(1 - n);
  let q = 1;
  let sum = 0;
  while (Math.abs(a - g) > MEAN_SETTLED * a) {
    const ag = a * g;
    const pp = p * p;
    sum += q;
    q *= (0.5 * (pp - ag)) / (pp + ag);
    p = (0.5 * (pp + ag)) / p;
    a = 0.5 * (a + g);
    g = Math.sqrt(ag);
  }
  const mean = 0.5 * (a + g);
  sum += (q * 2 * p) / (mean + p);
  return (Math.PI / (4 * mean)) * (2 + (n / (1 - n)) * sum);
}

/**
 * Bulirsch's general complete elliptic integral
 * cel(kc, p, c, s) = ∫₀^{π/2} (c cos²ψ + s sin²ψ) / ((cos²ψ + p sin²ψ) √(cos²ψ + kc² sin²ψ)) dψ for p > 0.
 *
 * @param kc complementary modulus, not zero
 * @param p positive
 * @returns the integral, dimensionless
 * @throws RangeError where kc is zero or p is not positive
 * Source: R. Bulirsch, Numer. Math. 13 (1969) 305; form as in Derby & Olbert, Am. J. Phys. 78 (2010) 229, appendix.
 */
export function generalComplete(kc: number, p: number, c: number, s: number): number {
  if (kc === 0 || !Number.isFinite(kc)) refuse('kc', 'finite and not zero', kc);
  if (!(p > 0)) refuse('p', 'positive', p);
  let k = Math.abs(kc);
  let pp = Math.sqrt(p);
  let cc = c;
  let ss = s / pp;
  let f = cc;
  cc += ss / pp;
  let g = k / pp;
  ss = 2 * (ss + f * g);
  pp += g;
  g = 1;
  let em = 1;
  em += k;
  let kk = k;
  while (Math.abs(g - k) > g * MEAN_SETTLED) {
    k = 2 * Math.sqrt(kk);
    kk = k * em;
    f = cc;
    cc += ss / pp;
    g = kk / pp;
    ss = 2 * (ss + f * g);
    pp += g;
    g = em;
    em += k;
  }
  return ((Math.PI / 2) * (ss + cc * em)) / (em * (em + pp));
}
