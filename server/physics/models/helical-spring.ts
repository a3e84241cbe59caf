/** A cylindrical compression spring of round wire. SI. */
export interface HelicalSpring {
  wireDiameter: number;
  /** Mean diameter of the coils. */
  meanDiameter: number;
  activeTurns: number;
  shearModulus: number;
  density: number;
}

/** Rate R = G d⁴/(8 D³ n), N/m. Source: EN 13906-1:2013, eq. 5. */
export function springRate(spring: HelicalSpring): number {
  const { wireDiameter: d, meanDiameter: D, activeTurns, shearModulus } = spring;
  return (shearModulus * d ** 4) / (8 * D ** 3 * activeTurns);
}

/** Mass of the active wire, ρ (π d²/4) π D n, kg; the pitch of the coils is neglected. */
export function activeWireMass(spring: HelicalSpring): number {
  const { wireDiameter: d, meanDiameter: D, activeTurns, density } = spring;
  return density * ((Math.PI * d * d) / 4) * Math.PI * D * activeTurns;
}

/**
 * Part of the springs' mass that moves with the assembly: a third of the active wire (Rayleigh's energy argument, straight
 * line of motion from the fixed to the moving end), kg.
 */
export function movingSpringMass(spring: HelicalSpring, springs: number): number {
  return (springs * activeWireMass(spring)) / 3;
}

/** Stress correction for the curvature of the wire, k = (w + 0.5)/(w − 0.75), w = D/d. Source: EN 13906-1:2013. */
export function curvatureFactor(spring: Pick<HelicalSpring, 'wireDiameter' | 'meanDiameter'>): number {
  const index = spring.meanDiameter / spring.wireDiameter;
  return (index + 0.5) / (index - 0.75);
}

/** Shear stress 8 D F/(π d³) at a force (N), Pa, without curvature factor. Source: EN 13906-1:2013. */
export function shearStress(spring: Pick<HelicalSpring, 'wireDiameter' | 'meanDiameter'>, force: number): number {
  return (8 * spring.meanDiameter * force) / (Math.PI * spring.wireDiameter ** 3);
}

/** First surge frequency with both ends held, ½ √(R/m), Hz. Source: EN 13906-1:2013; Wahl, Mechanical Springs (1963). */
export function surgeFrequency(spring: HelicalSpring): number {
  return 0.5 * Math.sqrt(springRate(spring) / activeWireMass(spring));
}

/** Length with all coils touching, two dead turns and ground ends taken, (n + 2) d, m. Source: EN 13906-1:2013. */
export function solidLength(spring: HelicalSpring): number {
  return (spring.activeTurns + 2) * spring.wireDiameter;
}

/**
 * Deflection at which a spring of free length L0 buckles, m; null where it does not.
 *
 * @param seating ν: 0.5 both ends held parallel and clamped, 1 hinged, 2 one end free.
 * @param poissonRatio of the wire; G/E = 1/(2(1 + poissonRatio)).
 * Source: EN 13906-1:2013, buckling: s_K = L0 · 0.5/(1 − G/E) · [1 − √(1 − (1 − G/E)/(0.5 + G/E) (π D/(ν L0))²)].
 */
export function bucklingDeflection(
  spring: Pick<HelicalSpring, 'meanDiameter'>,
  freeLength: number,
  seating: number,
  poissonRatio = 0.3,
): number | null {
  const ratio = 1 / (2 * (1 + poissonRatio));
  const slenderness = (Math.PI * spring.meanDiameter) / (seating * freeLength);
  const inside = 1 - ((1 - ratio) / (0.5 + ratio)) * slenderness * slenderness;
  return inside < 0 ? null : ((freeLength * 0.5) / (1 - ratio)) * (1 - Math.sqrt(inside));
}

/**
 * Safety by Goodman's straight line from the endurance amplitude to the shear strength, 1/n = τa/τe + τm/τu.
 * Source: Shigley, Mechanical Engineering Design.
 */
export function goodmanSafety(
  stress: { mean: number; amplitude: number },
  strength: { enduranceAmplitude: number; shear: number },
): number {
  return 1 / (stress.amplitude / strength.enduranceAmplitude + Math.abs(stress.mean) / strength.shear);
}
