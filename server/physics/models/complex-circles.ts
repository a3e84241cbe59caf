import { MAGNETIC_CONSTANT } from './constants';

/** Entries that `addComplexCircles` adds to: real parts of weight × G, F, M, M′. */
export const COMPLEX_CIRCLE_TERMS = 4;

const MEAN_SETTLED = 1e-8;

/**
 * The functions of two coaxial circles (see coaxial-circles) continued to a complex radius a and distance z: adds the
 * real parts of weight × (G, F, M, M′) to `out[0..3]`. The same arithmetic-geometric mean in complex numbers, written
 * out in real and imaginary parts (names ending in i are imaginary) so that nothing is allocated.
 *
 * @param out at least four numbers
 * @param w, wi weight
 * @param a, ai one radius, Re a > 0 (m)
 * @param r other radius, real and positive (m)
 * @param z, zi axial distance (m)
 * Validity: the straight line from (a − r)² + z² to (a + r)² + z² must not meet the negative real axis; it does not
 * while a tilted magnet keeps clear of the winding.
 */
export function addComplexCircles(
  out: Float64Array,
  w: number,
  wi: number,
  a: number,
  ai: number,
  r: number,
  z: number,
  zi: number,
): void {
  const zz = z * z - zi * zi;
  const zzi = 2 * z * zi;
  const sum = a + r;
  const far = sum * sum - ai * ai + zz;
  const fari = 2 * sum * ai + zzi;
  const gap = r - a;
  const near = gap * gap - ai * ai + zz;
  const neari = -2 * gap * ai + zzi;

  // P = √far, kc = √near / P, m = 4 a r / far
  const farAbs = Math.hypot(far, fari);
  const P = Math.sqrt(0.5 * (farAbs + Math.abs(far)));
  const [Pr, Pi] = far >= 0 ? [P, (0.5 * fari) / P] : [(0.5 * Math.abs(fari)) / P, Math.sign(fari) * P];
  const nearAbs = Math.hypot(near, neari);
  const N = Math.max(Math.sqrt(0.5 * (nearAbs + Math.abs(near))), 1e-150);
  const [Nr, Ni] = near >= 0 ? [N, (0.5 * neari) / N] : [(0.5 * Math.abs(neari)) / N, (neari < 0 ? -1 : 1) * N];
  const PP = Pr * Pr + Pi * Pi;
  const kc = (Nr * Pr + Ni * Pi) / PP;
  const kci = (Ni * Pr - Nr * Pi) / PP;
  const farSquare = far * far + fari * fari;
  const m = (4 * r * (a * far + ai * fari)) / farSquare;
  const mi = (4 * r * (ai * far - a * fari)) / farSquare;

  // p0 = ±(r − a)/(r + a), the sign that has a positive real part
  const sumSquare = sum * sum + ai * ai;
  let p = (gap * sum - ai * ai) / sumSquare;
  let pi = (-ai * sum - gap * ai) / sumSquare;
  if (p < 0) {
    p = -p;
    pi = -pi;
  }
  // equal radii: the limit, by a number whose fourth power still is one
  if (p === 0 && pi === 0) p = 1e-60;

  // first step of the means: a0 = 1, g0 = kc
  let A = 0.5 * (1 + kc);
  let Ai = 0.5 * kci;
  let g = Math.sqrt(0.5 * (Math.hypot(kc, kci) + kc));
  let gi = g === 0 ? 0 : (0.5 * kci) / g;
  const onePlus = (1 + kc) * (1 + kc) + kci * kci;
  let c = (0.5 * (m * (1 + kc) + mi * kci)) / onePlus;
  let ci = (0.5 * (mi * (1 + kc) - m * kci)) / onePlus;
  let S = c * c - ci * ci;
  let Si = 2 * c * ci;
  // ε = (p² − a g)/(p² + a g), p ← (p² + a g)/(2p), Q ← Q ε / 2
  let ag = kc;
  let agi = kci;
  let q = 1;
  let qi = 0;
  let Q = 0;
  let Qi = 0;
  let power = 1;
  for (let step = 0; ; step++) {
    const pp = p * p - pi * pi;
    const ppi = 2 * p * pi;
    const up = pp - ag;
    const upi = ppi - agi;
    const down = pp + ag;
    const downi = ppi + agi;
    const downSquare = down * down + downi * downi;
    const e = (0.5 * (up * down + upi * downi)) / downSquare;
    const ei = (0.5 * (upi * down - up * downi)) / downSquare;
    if (step > 0) {
      Q += q;
      Qi += qi;
    }
    const nextQ = q * e - qi * ei;
    qi = q * ei + qi * e;
    q = nextQ;
    const pSquare = p * p + pi * pi;
    const nextP = (0.5 * (down * p + downi * pi)) / pSquare;
    pi = (0.5 * (downi * p - down * pi)) / pSquare;
    p = nextP;
    if (c * c + ci * ci <= MEAN_SETTLED * MEAN_SETTLED * (A * A + Ai * Ai)) break;
    // next means; g is the root of a g whose real part, seen from the mean, is positive
    ag = A * g - Ai * gi;
    agi = A * gi + Ai * g;
    const nextA = 0.5 * (A + g);
    const nextAi = 0.5 * (Ai + gi);
    const agAbs = Math.hypot(ag, agi);
    g = Math.sqrt(0.5 * (agAbs + Math.abs(ag)));
    gi = (0.5 * agi) / g;
    if (ag < 0) [g, gi] = [Math.abs(gi), agi < 0 ? -g : g];
    if (g * nextA + gi * nextAi < 0) {
      g = -g;
      gi = -gi;
    }
    A = nextA;
    Ai = nextAi;
    // c ← c² / (4 a)
    const cc = c * c - ci * ci;
    const cci = 2 * c * ci;
    const aSquare = 4 * (A * A + Ai * Ai);
    c = (cc * A + cci * Ai) / aSquare;
    ci = (cci * A - cc * Ai) / aSquare;
    power *= 2;
    S += power * (c * c - ci * ci);
    Si += power * 2 * c * ci;
  }
  // tail of the third-kind sum, exact once the means have met: Q · 2p/(a + p)
  {
    const down = A + p;
    const downi = Ai + pi;
    const square = down * down + downi * downi;
    const t = (2 * (p * down + pi * downi)) / square;
    const ti = (2 * (pi * down - p * downi)) / square;
    Q += q * t - qi * ti;
    Qi += q * ti + qi * t;
  }

  // K times weight and μ0
  const aSquare = A * A + Ai * Ai;
  const scale = (MAGNETIC_CONSTANT * Math.PI) / (2 * aSquare);
  const K = scale * (w * A + wi * Ai);
  const Ki = scale * (wi * A - w * Ai);
  const mSquare = m * m + mi * mi;
  const S1 = (S * m + Si * mi) / mSquare; // sum1 / m
  const S1i = (Si * m - S * mi) / mSquare;
  const S2 = (S1 * m + S1i * mi) / mSquare; // sum1 / m²
  const S2i = (S1i * m - S1 * mi) / mSquare;
  const W = 0.5 - ((2 - m) * S2 + mi * S2i);
  const Wi = -((2 - m) * S2i - mi * S2);

  // K/P
  const KP = (K * Pr + Ki * Pi) / PP;
  const KPi = (Ki * Pr - K * Pi) / PP;
  // F = 2 a r z (K/P) (S1 − Q/2)
  const az = 2 * r * (a * z - ai * zi);
  const azi = 2 * r * (a * zi + ai * z);
  const T = S1 - 0.5 * Q;
  const Ti = S1i - 0.5 * Qi;
  const KT = KP * T - KPi * Ti;
  const KTi = KP * Ti + KPi * T;
  const F = az * KT - azi * KTi;
  const Fi = az * KTi + azi * KT;
  // G = z F + (8/3) a² r² (K/P) W
  const KW = KP * W - KPi * Wi;
  const KWi = KP * Wi + KPi * W;
  const aa = (8 / 3) * r * r * (a * a - ai * ai);
  const aai = (16 / 3) * r * r * a * ai;
  out[0]! += z * F - zi * Fi + aa * KW - aai * KWi;
  out[1]! += F;
  // M = K P sum1
  const PS = Pr * S - Pi * Si;
  const PSi = Pr * Si + Pi * S;
  out[2]! += K * PS - Ki * PSi;
  // M′ = −½ z (K/P) W m² / kc²
  const kk = kc * kc - kci * kci;
  const kki = 2 * kc * kci;
  const kkSquare = kk * kk + kki * kki;
  const mm = m * m - mi * mi;
  const mmi = 2 * m * mi;
  const ratio = (mm * kk + mmi * kki) / kkSquare;
  const ratioi = (mmi * kk - mm * kki) / kkSquare;
  const V = KW * ratio - KWi * ratioi;
  const Vi = KW * ratioi + KWi * ratio;
  out[3]! -= 0.5 * (z * V - zi * Vi);
}
