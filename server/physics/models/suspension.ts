import { realRootsOfCubic } from '../kernels/polynomial-roots';
import { STANDARD_GRAVITY } from './constants';
import type { Suspension } from './device';

/** A suspension placed at its rest position. */
export interface RestingSuspension {
  /** x at rest, m. */
  restPosition: number;
  /** Small-signal stiffness at rest, N/m. */
  stiffness: number;
  /** −F‴/6 at rest, N/m³. */
  cubic: number;
  suspension: Suspension;
}

/** Thrown where the assembly has no place to stay; the message says why. */
export class NoRestError extends Error {}

/**
 * Rest position and force law of a spring with a cubic term, F = −k y − k3 y³ with y = x − neutralAt, under the part of
 * gravity along the travel, −m g sin ψ. Of several stable rests the deepest is taken; of two equal wells the + one.
 *
 * @param axisAngle ψ, rad above horizontal.
 * @throws NoRestError where no stable equilibrium exists.
 */
export function springSuspension(
  spring: { stiffness: number; cubic: number; neutralAt: number },
  mass: number,
  axisAngle: number,
): RestingSuspension {
  const { stiffness: k, cubic: k3, neutralAt } = spring;
  const weight = weightAlongTravel(mass, axisAngle);
  const zeros = realRootsOfCubic(k3, 0, k, weight);
  const energyAt = (y: number): number => (0.5 * k + 0.25 * k3 * y * y) * y * y + weight * y;
  const slopeAt = (y: number): number => k + 3 * k3 * y * y;
  const stable = zeros.filter((y) => slopeAt(y) > 0 || (slopeAt(y) === 0 && k3 > 0));
  if (stable.length === 0)
    throw new NoRestError(
      k <= 0 && k3 <= 0
        ? 'The spring pushes away from its neutral position: no rest position is stable.'
        : 'The softening spring cannot hold the weight: no rest position is stable.',
    );
  const depth = Math.max(...stable.map((y) => Math.abs(energyAt(y))));
  let rest = stable[0]!;
  for (const y of stable) if (energyAt(y) <= energyAt(rest) + 1e-9 * depth) rest = y;
  const polynomial = { k: slopeAt(rest), k2: 3 * k3 * rest, k3 };
  return {
    restPosition: neutralAt + rest,
    stiffness: polynomial.k,
    cubic: k3,
    suspension: polynomialSuspension(
      polynomial,
      zeros.map((y) => (y === rest ? 0 : y - rest)),
    ),
  };
}

/** −m g sin ψ is the force; this is its size with the sign of ψ, N; exactly 0 on a level axis. */
export function weightAlongTravel(mass: number, axisAngle: number): number {
  return mass * STANDARD_GRAVITY * Math.sin(axisAngle);
}

/** F = −k u − k2 u² − k3 u³ about a rest position, exact everywhere. */
export function polynomialSuspension(
  polynomial: { k: number; k2: number; k3: number },
  equilibria: number[],
): Suspension {
  const { k, k2, k3 } = polynomial;
  return {
    force: (u) => -((k3 * u + k2) * u + k) * u,
    forceSlope: (u) => -((3 * k3 * u + 2 * k2) * u + k),
    energy: (u) => ((0.25 * k3 * u + k2 / 3) * u + 0.5 * k) * u * u,
    polynomial,
    equilibria,
    from: -Infinity,
    to: Infinity,
  };
}
