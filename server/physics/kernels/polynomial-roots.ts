/**
 * Real roots of a x³ + b x² + c x + d, ascending, each polished by Newton; degenerate leading terms are allowed.
 * Multiple roots are returned once. No roots for a constant.
 * Source: Press et al., Numerical Recipes, 3rd ed. (2007), sec. 5.6.
 */
export function realRootsOfCubic(a: number, b: number, c: number, d: number): number[] {
  const roots = a === 0 ? rootsOfQuadratic(b, c, d) : cubicRoots(b / a, c / a, d / a);
  const polished = roots.map((root) => {
    let x = root;
    for (let n = 0; n < 3; n++) {
      const slope = (3 * a * x + 2 * b) * x + c;
      if (slope === 0) break;
      const next = x - (((a * x + b) * x + c) * x + d) / slope;
      if (!Number.isFinite(next)) break;
      x = next;
    }
    return x === 0 ? 0 : x;
  });
  polished.sort((p, q) => p - q);
  const size = Math.max(...polished.map(Math.abs), 0);
  return polished.filter((x, n) => n === 0 || x - polished[n - 1]! > 1e-9 * size);
}

function rootsOfQuadratic(a: number, b: number, c: number): number[] {
  if (a === 0) return b === 0 ? [] : [-c / b];
  const disc = b * b - 4 * a * c;
  if (disc < 0) return [];
  const q = -0.5 * (b + (b < 0 ? -1 : 1) * Math.sqrt(disc));
  return q === 0 ? [0] : [q / a, c / q];
}

function cubicRoots(a: number, b: number, c: number): number[] {
  const q = (a * a - 3 * b) / 9;
  const r = (2 * a * a * a - 9 * a * b + 27 * c) / 54;
  if (r * r < q * q * q) {
    const angle = Math.acos(Math.max(-1, Math.min(1, r / Math.sqrt(q * q * q))));
    const size = -2 * Math.sqrt(q);
    return [0, 1, -1].map((turn) => size * Math.cos((angle + 2 * Math.PI * turn) / 3) - a / 3);
  }
  const s = -Math.sign(r) * Math.cbrt(Math.abs(r) + Math.sqrt(Math.max(0, r * r - q * q * q)));
  return [s + (s === 0 ? 0 : q / s) - a / 3];
}
