import { generalComplete } from '../kernels/elliptic';
import { sheetsOf } from './axial-magnet';
import type { AxialMagnet } from './axial-magnet';
import type { FlatMagnet } from './across-coupling';
import { MAGNETIC_CONSTANT } from './constants';

/** Smallest parameter of the third-kind integral: stands for zero at the sheet's own radius. */
const LEAST_PARAMETER = 1e-24;

/**
 * Flux density of an axially magnetised cylinder or ring outside its edges.
 *
 * @param rho distance from the axis, zero or positive (m)
 * @param x place along the axis (m)
 * @returns radial and axial component (T); inside the magnet this is B, not μ0 H
 * @throws RangeError where rho is negative, or the place lies on an edge (B is infinite there)
 * Source: N. Derby, S. Olbert, Am. J. Phys. 78 (2010) 229, eqs. for B_ρ and B_z with Bulirsch's cel.
 */
export function fieldOfCylinder(magnet: AxialMagnet, rho: number, x: number): { radial: number; axial: number } {
  if (!(rho >= 0)) throw new RangeError(`rho must be zero or positive, got ${rho} m`);
  let radial = 0;
  let axial = 0;
  for (const [a, sign] of sheetsOf(magnet)) {
    const scale = (sign * MAGNETIC_CONSTANT * magnet.magnetisation) / Math.PI;
    const gamma = (a - rho) / (a + rho);
    for (const end of [1, -1]) {
      const z = x - magnet.at + 0.5 * end * magnet.length;
      const far = Math.hypot(z, a + rho);
      const kc = Math.hypot(z, a - rho) / far;
      if (kc === 0) throw new RangeError('place must not lie on an edge of the magnet: the field is infinite there');
      radial += ((scale * end * a) / far) * generalComplete(kc, 1, 1, -1);
      const parameter = Math.max(gamma * gamma, LEAST_PARAMETER);
      axial += ((scale * end * a * z) / ((a + rho) * far)) * generalComplete(kc, parameter, 1, gamma);
    }
  }
  return { radial, axial };
}

/**
 * Flux density of a block magnetised along z, outside its edges and outside the block itself.
 *
 * @returns components along x, y, z (T)
 * Sources: E. P. Furlani (2001) sec. 4.2; Z. J. Yang et al., Supercond. Sci. Technol. 3 (1990) 591.
 */
export function fieldOfBlock({ size, at, magnetisation }: FlatMagnet, x: number, y: number, z: number): Vector {
  const field: Vector = [0, 0, 0];
  for (const i of [-1, 1]) {
    for (const j of [-1, 1]) {
      for (const k of [-1, 1]) {
        const u = x - at[0]! - 0.5 * i * size[0]!;
        const v = y - at[1]! - 0.5 * j * size[1]!;
        const w = z - at[2]! - 0.5 * k * size[2]!;
        const r = Math.hypot(u, v, w);
        const sign = i * j * k;
        // −∂/∂x and −∂/∂y of the charged rectangle's potential are single logarithms
        field[0] -= sign * Math.asinh(v / Math.hypot(u, w));
        field[1] -= sign * Math.asinh(u / Math.hypot(v, w));
        field[2] += sign * Math.atan2(u * v, w * r);
      }
    }
  }
  const scale = (MAGNETIC_CONSTANT * magnetisation) / (4 * Math.PI);
  return [scale * field[0], scale * field[1], scale * field[2]];
}

export type Vector = [number, number, number];
