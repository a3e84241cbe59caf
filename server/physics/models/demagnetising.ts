import { addCoaxialCircles, CIRCLE_TERMS } from './coaxial-circles';
import { MAGNETIC_CONSTANT } from './constants';
import type { Magnet } from './magnet';

/**
 * Magnetometric (volume-averaged) demagnetising factor of a uniformly magnetised cylinder or ring along its axis.
 *
 * The mean of B over the volume is the flux linkage of the magnet's own sheets with themselves, so that
 * N = 1 − (L_aa − 2 L_ab + L_bb)/(μ0 V) with L the inductances of sheets of one ampere per metre; for a cylinder this is
 * 1 − K with Nagaoka's coefficient K.
 *
 * @param outerRadius positive (m)
 * @param innerRadius zero for a solid cylinder, below the outer radius (m)
 * @param length positive (m)
 * @returns N, dimensionless, in (0, 1)
 * @throws RangeError where the dimensions make no body
 * Sources: H. Nagaoka, J. Coll. Sci. Tokyo 27 (1909); D.-X. Chen, J. A. Brug, R. B. Goldfarb, IEEE Trans. Magn. 27
 * (1991) 3601 (susceptibility 0).
 */
export function demagnetisingFactorOfRing(outerRadius: number, innerRadius: number, length: number): number {
  if (!(outerRadius > innerRadius) || !(innerRadius >= 0) || !(length > 0)) {
    throw new RangeError(
      `ring must have outer radius above inner radius and positive length, got ${outerRadius}, ${innerRadius}, ${length} m`,
    );
  }
  const volume = Math.PI * (outerRadius - innerRadius) * (outerRadius + innerRadius) * length;
  let linkage = inductanceOfSheets(outerRadius, outerRadius, length);
  if (innerRadius > 0) {
    linkage +=
      inductanceOfSheets(innerRadius, innerRadius, length) - 2 * inductanceOfSheets(outerRadius, innerRadius, length);
  }
  return 1 - linkage / (MAGNETIC_CONSTANT * volume);
}

/** Mutual inductance of coaxial sheets of equal extent, per (turn per metre)², H·m². */
function inductanceOfSheets(a: number, b: number, length: number): number {
  const ends = new Float64Array(CIRCLE_TERMS);
  addCoaxialCircles(ends, 2, a, b, length);
  addCoaxialCircles(ends, -2, a, b, 0);
  return ends[0]!;
}

/**
 * Magnetometric demagnetising factor of a uniformly magnetised block along its third side.
 *
 * @param x, y, z full sides, positive (m); magnetised along z
 * @returns N, dimensionless; the factors along the three sides add to 1
 * @throws RangeError where a side is not positive
 * Sources: A. Aharoni, J. Appl. Phys. 83 (1998) 3432; in the equivalent form of a second difference as in A. J. Newell,
 * W. Williams, D. J. Dunlop, J. Geophys. Res. 98 (1993) 9551, eqs. 27 and 19.
 */
export function demagnetisingFactorOfBlock(x: number, y: number, z: number): number {
  if (!(x > 0) || !(y > 0) || !(z > 0)) throw new RangeError(`sides must be positive, got ${x}, ${y}, ${z} m`);
  const scale = Math.cbrt(x * y * z);
  const a = z / scale;
  const b = x / scale;
  const c = y / scale;
  // eight times the second difference of an even function over one body: values at 0 and at the side
  let sum = 0;
  for (const i of [0, 1]) {
    for (const j of [0, 1]) {
      for (const k of [0, 1]) sum += (i + j + k) % 2 === 0 ? newell(i * a, j * b, k * c) : -newell(i * a, j * b, k * c);
    }
  }
  return (2 * sum) / (Math.PI * a * b * c);
}

/** Newell's f for non-negative arguments; the limits at zero arguments are zero for each product. */
function newell(x: number, y: number, z: number): number {
  const xx = x * x;
  const yy = y * y;
  const zz = z * z;
  const R = Math.sqrt(xx + yy + zz);
  let f = ((2 * xx - yy - zz) * R) / 6;
  if (y > 0) f += 0.5 * y * (zz - xx) * (xx + zz > 0 ? Math.asinh(y / Math.sqrt(xx + zz)) : 0);
  if (z > 0) f += 0.5 * z * (yy - xx) * (xx + yy > 0 ? Math.asinh(z / Math.sqrt(xx + yy)) : 0);
  if (x > 0 && y > 0 && z > 0) f -= x * y * z * Math.atan((y * z) / (x * R));
  return f;
}

/** Magnetometric demagnetising factor of a magnet along its magnetisation. */
export function demagnetisingFactor(magnet: Magnet): number {
  if (magnet.shape === 'block') {
    return demagnetisingFactorOfBlock(magnet.size[0]!, magnet.size[1]!, magnet.size[2]!);
  }
  return demagnetisingFactorOfRing(magnet.outerDiameter / 2, magnet.innerDiameter / 2, magnet.length);
}
