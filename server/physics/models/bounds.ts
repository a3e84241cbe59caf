/** Highest powers that a device could deliver, and its best resistive load. SI. */

/**
 * Most power that can be taken from a resonator limited by its own loss, driven at resonance: (m A)²/(8 c).
 *
 * @param mass kg
 * @param acceleration peak of the base acceleration, m/s²
 * @param damping mechanical damping coefficient c, N s/m
 * @returns W; null without damping, where no bound of this kind exists
 */
export function resonantBound(mass: number, acceleration: number, damping: number): number | null {
  return damping > 0 ? (mass * acceleration) ** 2 / (8 * damping) : null;
}

/**
 * Most power where the travel is the limit: ½ m ω³ Y Z = ½ m ω A Z.
 *
 * @param frequency Hz
 * @param acceleration peak A, m/s²; the base's amplitude is Y = A/ω²
 * @param travel amplitude Z of the relative motion, m
 * Source: P. D. Mitcheson et al., Proc. IEEE 96 (2008) 1457.
 */
export function travelLimitedBound(mass: number, frequency: number, acceleration: number, travel: number): number {
  return 0.5 * mass * 2 * Math.PI * frequency * acceleration * travel;
}

/**
 * Power that white base acceleration puts into any device of this mass: m G/4.
 *
 * @param density one-sided, (m/s²)²/Hz
 * Source: R. S. Langley, J. Sound Vib. 333 (2014) 927.
 */
export function broadbandBound(mass: number, density: number): number {
  return (mass * density) / 4;
}

/** Best resistive load at resonance without inductance, and the power there. */
export interface BestLoad {
  /** Ω */
  readonly resistance: number;
  /** W */
  readonly power: number;
}

/**
 * Best resistive load under parasitic damping, R = Rc + θ²/c, and the power it takes at the undamped natural frequency:
 * (m A)²/(8 c) · (θ²/c)/(Rc + θ²/c).
 *
 * @param coupling θ at rest, V s/m
 * @returns null where θ or c is zero
 * Source: N. G. Stephen, J. Sound Vib. 293 (2006) 409.
 */
export function bestResistiveLoad(
  mass: number,
  acceleration: number,
  damping: number,
  coupling: number,
  coilResistance: number,
): BestLoad | null {
  const bound = resonantBound(mass, acceleration, damping);
  if (bound === null || coupling === 0) return null;
  const reflected = coupling ** 2 / damping;
  return { resistance: coilResistance + reflected, power: (bound * reflected) / (coilResistance + reflected) };
}

/**
 * Normalised power density P/(V a²), a the rms acceleration.
 *
 * @param volume of the device, m³
 * @returns kg s/m³
 * Source: S. P. Beeby et al., J. Micromech. Microeng. 17 (2007) 1257.
 */
export function normalisedPowerDensity(power: number, volume: number, accelerationRms: number): number | null {
  return volume > 0 && accelerationRms > 0 ? power / (volume * accelerationRms ** 2) : null;
}
