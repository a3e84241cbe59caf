import type { CoilShape } from './coil';
import { mutualOfWindings } from './coaxial-inductance';
import type { AxialWinding } from './coaxial-inductance';
import { mutualOfFlatCoils } from './flat-inductance';

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
  const { coils } = design;
  const mutual = design.layout === 'across' ? mutualOfFlatCoils : mutualOnAxis;
  let total = 0;
  for (let i = 0; i < coils.length; i++) {
    total += mutual(coils[i]!, coils[i]!);
    for (let j = 0; j < i; j++) total += 2 * coils[i]!.sense * coils[j]!.sense * mutual(coils[i]!, coils[j]!);
  }
  return total;
}

function mutualOnAxis(p: CoilShape, q: CoilShape): number {
  return mutualOfWindings(axialWinding(p), axialWinding(q));
}

function axialWinding(coil: CoilShape): AxialWinding {
  if (coil.shape !== 'round' || typeof coil.at !== 'number') {
    throw new RangeError('coils must be round and stand on the axis in the through layout');
  }
  return {
    innerRadius: coil.innerDiameter / 2,
    outerRadius: coil.outerDiameter / 2,
    length: coil.length,
    at: coil.at,
    turns: coil.turns,
  };
}
