/**
 * Wright's omega function for real z: the solution ω > 0 of ω + ln ω = z, to rounding over the whole line.
 *
 * @returns ω(z); e^z to first order for very negative z, 0 where that underflows.
 * Source: Lawrence, Corless & Jeffrey, ACM Trans. Math. Softw. 38 (2012) 20 (Fritsch–Shafer–Crowley iteration, fourth
 * order, from asymptotic starts).
 */
export function wrightOmega(z: number): number {
  if (z < -40) return Math.exp(z);
  let w: number;
  if (z < -2) {
    const e = Math.exp(z);
    w = e * (1 - e * (1 - 1.5 * e));
  } else if (z < 2.5) {
    // Taylor about z = 1, where ω = 1
    const x = z - 1;
    w =
      1 +
      x * (0.5 + x * (0.0625 - x * (0.005208333333333333 + x * (0.00032552083333333337 - x * 0.00021158854166666667))));
  } else {
    const log = Math.log(z);
    const inverse = 1 / z;
    w = z - log + log * inverse * (1 + inverse * (0.5 * log - 1));
  }
  for (let n = 0; n < 2; n++) {
    const r = z - w - Math.log(w);
    const s = 1 + w;
    const t = s * (s + (2 / 3) * r);
    const step = (w * r * (t - 0.5 * r)) / (s * (t - r));
    w += step;
    if (Math.abs(r) < 1e-4) break;
  }
  return w;
}
