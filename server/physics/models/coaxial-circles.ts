import { MAGNETIC_CONSTANT } from './constants';

/**
 * Two coaxial circular currents and everything along their common axis that follows from them.
 *
 * With M(z) Maxwell's mutual inductance of circles of radius a and r, z apart, the kernel of everything coaxial is the
 * even function G with G″ = M: coils and magnets that extend along the axis are second differences of G, coupling and
 * force are differences of F = G′, their slopes of M, and so on. All five come out of one arithmetic-geometric mean:
 *
 *   G = μ0 a² r² ∫₀^π sin²φ (R/ρ²) dφ,   F = μ0 a² r² z ∫₀^π sin²φ / (ρ² R) dφ,   M = μ0 a r ∫₀^π cosφ / R dφ
 *   ρ² = a² + r² − 2 a r cosφ,   R² = ρ² + z²
 *
 * Sources: Maxwell, Treatise art. 701 (M); Rosa & Grover, Bull. Bur. Stand. 8 (1912) 1 (coaxial sheets); DLMF 19.8
 * (means). The usual forms in K, E and Π lose digits for unlike radii; here the leading terms of the three series are
 * cancelled by hand, so that what is left are sums of terms of one sign.
 */

/** Entries that `addCoaxialCircles` adds to: G (H·m²), F (H·m), M (H), M′ (H/m), M″ (H/m²). */
export const CIRCLE_TERMS = 5;

const MEAN_SETTLED = 1e-8;
/** Stands for equal radii in the third-kind sum, whose limit is finite. */
const LEAST_RATIO = 1e-100;

/**
 * Adds weight × (G, F, M, M′, M″) of two coaxial circles to `out[0..4]`.
 *
 * @param out at least five numbers
 * @param weight factor of all five
 * @param a radius of one circle, positive (m)
 * @param r radius of the other, positive (m)
 * @param z axial distance, signed (m); at z = 0 with a = r, M and its derivatives are infinite: nothing is added to
 *   them, and callers must not put a quadrature point there
 */
export function addCoaxialCircles(out: Float64Array, weight: number, a: number, r: number, z: number): void {
  const zz = z * z;
  const sum = a + r;
  const difference = Math.abs(a - r);
  const pp = sum * sum + zz;
  const P = Math.sqrt(pp);
  const m = (4 * a * r) / pp;
  const kcSquared = (difference * difference + zz) / pp;
  if (kcSquared < 1e-300) {
    // touching circles: G is finite, F is zero by oddness
    out[0]! += (weight * MAGNETIC_CONSTANT * 4 * a * a * a) / 3;
    return;
  }
  const kc = Math.sqrt(kcSquared);

  // first step by hand: a0 = 1, g0 = kc
  const p0 = Math.max(difference / sum, LEAST_RATIO);
  const pp0 = p0 * p0;
  let mean = 0.5 * (1 + kc);
  let g = Math.sqrt(kc);
  let c = (0.5 * m) / (1 + kc);
  // sum1 = Σ_{n≥1} 2^{n−1} c_n², the part of 1 − E/K beyond m/2
  let sum1 = c * c;
  let q = (0.5 * (pp0 - kc)) / (pp0 + kc);
  let p = (0.5 * (pp0 + kc)) / p0;
  let sumQ = 0;
  let power = 1;
  while (c > MEAN_SETTLED * mean) {
    const ag = mean * g;
    const square = p * p;
    sumQ += q;
    q *= (0.5 * (square - ag)) / (square + ag);
    p = (0.5 * (square + ag)) / p;
    const next = 0.5 * (mean + g);
    c = (0.25 * c * c) / next;
    g = Math.sqrt(ag);
    mean = next;
    power *= 2;
    sum1 += power * c * c;
  }
  sumQ += (q * 2 * p) / (mean + p);
  const K = Math.PI / (2 * mean);

  const ar = a * r;
  const scale = weight * MAGNETIC_CONSTANT * K;
  // W = ½ − (2 − m) sum1/m² tends to 3/8 for distant circles
  const W = 0.5 - ((2 - m) * sum1) / (m * m);
  const F = ((scale * 2 * ar * z) / P) * (sum1 / m - 0.5 * sumQ);
  const V = (scale * m * m * W) / kcSquared;
  const curvatureTerm = (scale * m * (0.5 * m * (3 - m) - (1 + m) * sum1)) / (kcSquared * kcSquared);
  out[0]! += z * F + (scale * 8 * ar * ar * W) / (3 * P);
  out[1]! += F;
  out[2]! += scale * P * sum1;
  out[3]! -= (0.5 * z * V) / P;
  out[4]! += ((0.5 * zz) / (pp * P)) * (curvatureTerm + V) - (0.5 * V) / P;
}

/**
 * Adds weight × F of two coaxial circles to `out[0]`: all that the coupling alone needs.
 *
 * @param a radius of one circle, positive (m)
 * @param r radius of the other, positive (m)
 * @param z axial distance, signed (m)
 */
export function addCoaxialFlux(out: Float64Array, weight: number, a: number, r: number, z: number): void {
  const zz = z * z;
  const sum = a + r;
  const difference = Math.abs(a - r);
  const pp = sum * sum + zz;
  const P = Math.sqrt(pp);
  const kc = Math.sqrt((difference * difference + zz) / pp);
  if (kc < 1e-150) return;
  // F = 2 μ0 a r (z/P) (1/n) [∫ sin²ψ/Δ − p² ∫ sin²ψ/((1 − n sin²ψ) Δ)], both by one mean: sums of c_n² and of Q_n
  const p0 = Math.max(difference / sum, LEAST_RATIO);
  const pp0 = p0 * p0;
  let mean = 0.5 * (1 + kc);
  let g = Math.sqrt(kc);
  let c = 0.5 * (1 - kc);
  let down = pp0 + kc;
  let q = (0.5 * (pp0 - kc)) / down;
  let p = (0.5 * down) / p0;
  let sumC = c * c;
  let sumQ = 0;
  let power = 1;
  while (c > MEAN_SETTLED * mean) {
    const ag = mean * g;
    const square = p * p;
    sumQ += q;
    // one division for both Q and p
    down = square + ag;
    const inverse = 0.5 / (down * p);
    q *= (square - ag) * inverse * p;
    p = down * down * inverse;
    c = 0.5 * (mean - g);
    mean -= c;
    g = Math.sqrt(ag);
    power *= 2;
    sumC += power * c * c;
  }
  sumQ += (q * 2 * p) / (mean + p);
  const m = (4 * a * r) / pp;
  out[0]! += ((weight * MAGNETIC_CONSTANT * Math.PI * a * r * z) / (mean * P)) * (sumC / m - 0.5 * sumQ);
}

/**
 * Maxwell's mutual inductance of two coaxial circular filaments.
 *
 * @param a radius, positive (m)
 * @param r radius, positive (m)
 * @param z axial distance (m)
 * @returns M (H)
 * @throws RangeError where a radius is not positive or the circles coincide (M is infinite)
 * Source: Maxwell, Treatise art. 701.
 */
export function mutualOfCircles(a: number, r: number, z: number): number {
  if (!(a > 0) || !(r > 0)) throw new RangeError(`radii must be positive, got ${a} m and ${r} m`);
  if (a === r && z === 0) throw new RangeError('circles must not coincide: their mutual inductance is infinite');
  const out = new Float64Array(CIRCLE_TERMS);
  addCoaxialCircles(out, 1, a, r, z);
  return out[2]!;
}
