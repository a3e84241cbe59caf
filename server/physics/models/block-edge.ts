import type { FlatTurns } from './flat-turns';

/**
 * Integrals of 1/r over a charged quarter-plane: the face of a block is the difference of four of them, one per corner.
 *
 * With u, v, w the distances along x, y, z from the corner to a place on a turn and r² = u² + v² + w²:
 *   H  = u a + v b − w T,   a = asinh(v/√(u² + w²)), b = asinh(u/√(v² + w²)), T = atan(u v/(w r));   H_uv = 1/r
 *   H1 = ½ (u² − w²) a + u v b − u w T − ½ v r,                                                      ∂H1/∂u = H
 *   g  = ½ v (u² − w²) a + ½ u (v² − w²) b − u v w T − (r/6)(u² + v² − 2 w²),                        ∂g/∂v = H1
 * Sources: Furlani (2001) sec. 4.2; Yang et al., Supercond. Sci. Technol. 3 (1990) 591; G. Akoun, J.-P. Yonnet, IEEE
 * Trans. Magn. 20 (1984) 1962 (g).
 */

/** Entries that both functions add to: the term and its first, second and third derivative along the block's travel. */
export const EDGE_TERMS = 4;

/** Keeps √(u² + w²) from zero on the corner's own lines, where every product with it vanishes. */
const TINY = 1e-300;

/** asinh(x/√s) for r² = x² + s, by one logarithm: absolute error near 1e-16, a third of the time of Math.asinh. */
function areaSine(x: number, r: number, s: number): number {
  const size = Math.log((Math.abs(x) + r + TINY) / Math.sqrt(s));
  return x < 0 ? -size : size;
}

/**
 * Adds weight × (H1, −H, H_u, −H_uu) to `out[0..3]`: the flux through the strip left of a turn's line element and its
 * derivatives with respect to the corner's position along x.
 *
 * @param weight factor; for a line element: its extent along y (m)
 * @param u, v, w from the corner to the element (m)
 */
export function addEdgeOverElement(out: Float64Array, weight: number, u: number, v: number, w: number): void {
  const uu = u * u;
  const vv = v * v;
  const ww = w * w;
  const r = Math.sqrt(uu + vv + ww);
  const alongU = uu + ww + TINY;
  const a = areaSine(v, r, alongU);
  const b = areaSine(u, r, vv + ww + TINY);
  const wT = w === 0 ? 0 : w * Math.atan((u * v) / (w * r));
  out[0]! += weight * (0.5 * (uu - ww) * a + u * (v * b - wT) - 0.5 * v * r);
  out[1]! -= weight * (u * a + v * b - wT);
  out[2]! += weight * a;
  out[3]! += r === 0 ? 0 : (weight * u * v) / (alongU * r);
}

/**
 * Adds weight × (g, −g_u, g_uu, −g_uuu) to `out[0..3]`: the same for the end of a straight side along y.
 *
 * @param weight factor, ± for the two ends of a side
 * @param u, v, w from the corner to the side's end (m)
 */
export function addEdgeOverSide(out: Float64Array, weight: number, u: number, v: number, w: number): void {
  const uu = u * u;
  const vv = v * v;
  const ww = w * w;
  const r = Math.sqrt(uu + vv + ww);
  const alongU = uu + ww + TINY;
  const a = areaSine(v, r, alongU);
  const b = areaSine(u, r, vv + ww + TINY);
  const wT = w === 0 ? 0 : w * Math.atan((u * v) / (w * r));
  out[0]! += weight * (0.5 * v * (uu - ww) * a + 0.5 * u * (vv - ww) * b - u * v * wT - (r * (uu + vv - 2 * ww)) / 6);
  out[1]! -= weight * (0.5 * (vv - ww) * b + u * v * a - v * wT - 0.5 * u * r);
  out[2]! += weight * (v * a - r);
  out[3]! += (weight * u * r) / alongU;
}

/** Σ weight × (−H_uu) over line elements: the third entry of `addEdgeOverElement` for a whole coil. */
export function thirdOverElements(turns: FlatTurns, t: number, yEdge: number, w: number): number {
  const { x, y, extent } = turns;
  const ww = w * w;
  let sum = 0;
  for (let i = 0; i < x.length; i++) {
    const u = x[i]! - t;
    const v = y[i]! - yEdge;
    const alongU = u * u + ww;
    sum += (extent[i]! * u * v) / (alongU * Math.sqrt(alongU + v * v) + TINY);
  }
  return sum;
}

/** Σ weight × (−g_uuu) over the ends of straight sides. */
export function thirdOverSides(turns: FlatTurns, t: number, yEdge: number, w: number): number {
  const { endX, endY, endTurns } = turns;
  const ww = w * w;
  let sum = 0;
  for (let i = 0; i < endX.length; i++) {
    const u = endX[i]! - t;
    const v = endY[i]! - yEdge;
    const alongU = u * u + ww + TINY;
    sum += (endTurns[i]! * u * Math.sqrt(alongU + v * v)) / alongU;
  }
  return sum;
}
