/**
 * Magnetic constant, H/m. The value of the published tables (4π·10⁻⁷); CODATA 2018 is 5.5e-10 higher, far below any
 * tolerance of a magnet.
 */
export const MAGNETIC_CONSTANT = 4e-7 * Math.PI;

/** Standard gravity, m/s² (ISO 80000-3). */
export const STANDARD_GRAVITY = 9.80665;
