/**
 * Value at the turning point inside a step of length h at whose ends value, slope and curvature are given and the slopes
 * have opposite signs: the extremum of the quintic Hermite.
 */
export function innerTurn(h: number, u0: number, v0: number, a0: number, u1: number, v1: number, a1: number): number {
  const d0 = h * v0;
  const d1 = h * v1;
  const s0 = 0.5 * h * h * a0;
  const s1 = 0.5 * h * h * a1;
  const gap = u1 - u0 - d0 - s0;
  const turn = d1 - d0 - 2 * s0;
  const bend = s1 - s0;
  const c3 = 10 * gap - 4 * turn + bend;
  const c4 = -15 * gap + 7 * turn - 2 * bend;
  const c5 = 6 * gap - 3 * turn + bend;
  const slope = (t: number): number => d0 + t * (2 * s0 + t * (3 * c3 + t * (4 * c4 + t * 5 * c5)));
  let [low, high] = [0, 1];
  for (let n = 0; n < 50; n++) {
    const middle = 0.5 * (low + high);
    if (slope(middle) * d0 > 0) low = middle;
    else high = middle;
  }
  return u0 + low * (d0 + low * (s0 + low * (c3 + low * (c4 + low * c5))));
}

/** Size at the extremum inside a step at whose ends the slopes have opposite signs: that of the cubic Hermite. */
export function innerPeak(h: number, v0: number, a0: number, v1: number, a1: number): number {
  const d0 = h * a0;
  const d1 = h * a1;
  const c2 = 3 * (v1 - v0) - 2 * d0 - d1;
  const c3 = d0 + d1 - 2 * (v1 - v0);
  let [low, high] = [0, 1];
  for (let n = 0; n < 50; n++) {
    const middle = 0.5 * (low + high);
    if ((d0 + middle * (2 * c2 + middle * 3 * c3)) * d0 > 0) low = middle;
    else high = middle;
  }
  return Math.abs(v0 + low * (d0 + low * (c2 + low * c3)));
}
