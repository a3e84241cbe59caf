import type { CoilShape } from './coil';
import { mutualOfWindings } from './coaxial-inductance';
import type { AxialWinding } from './coaxial-inductance';

/** The part of a design document that decides on the coils' inductance. */
export interface CoilDesign {
  readonly layout: 'through' | 'across';
  readonly coils: readonly CoilShape[];
}

/**
 * Inductance of all coils of a design in series: self-inductances, and twice every mutual one with the sign of the two
 * senses. Low frequency, turns spread evenly over each window.
 *
 * @returns H
 * @throws RangeError where the layout does not take a coil's shape
 */
export function inductanceOfCoils(design: CoilDesign): number {
  const windings = design.coils.map(axialWinding);
  let total = 0;
  for (let i = 0; i < windings.length; i++) {
    total += mutualOfWindings(windings[i]!, windings[i]!);
    for (let j = 0; j < i; j++) {
      const sense = design.coils[i]!.sense * design.coils[j]!.sense;
      total += 2 * sense * mutualOfWindings(windings[i]!, windings[j]!);
    }
  }
  return total;
}

function axialWinding(coil: CoilShape, i: number): AxialWinding {
  if (coil.shape !== 'round' || typeof coil.at !== 'number') {
    throw new RangeError(`coils.${i} must be round and stand on the axis in the through layout`);
  }
  return {
    innerRadius: coil.innerDiameter / 2,
    outerRadius: coil.outerDiameter / 2,
    length: coil.length,
    at: coil.at,
    turns: coil.turns,
  };
}
