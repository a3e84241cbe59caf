import type { Magnet } from './magnet';
import { magnetisationOf } from './magnetisation';

/** A cylinder or ring on the axis of travel, magnetised along it, seen as the current sheets on its mantle surfaces. */
export interface AxialMagnet {
  readonly outerRadius: number;
  /** Zero for a solid cylinder. */
  readonly innerRadius: number;
  readonly length: number;
  /** Centre on the axis (m). */
  readonly at: number;
  /** Magnetisation along +x, signed (A/m): the sheet current per length of axis. */
  readonly magnetisation: number;
}

/** Radius and sign of each current sheet: one for a cylinder, two for a ring. */
export function sheetsOf(magnet: AxialMagnet): readonly (readonly [radius: number, sign: number])[] {
  const outer = [magnet.outerRadius, 1] as const;
  return magnet.innerRadius > 0 ? [outer, [magnet.innerRadius, -1]] : [outer];
}

/**
 * Magnets of a document as axial magnets, at a temperature.
 *
 * @param path where they stand in the document, for the message
 * @param temperature °C
 * @param recoil false leaves the recoil line out
 * @throws RangeError where a magnet is no cylinder
 */
export function axialMagnetsOf(
  magnets: readonly Magnet[],
  path: string,
  temperature: number,
  recoil: boolean,
): AxialMagnet[] {
  return magnets.map((magnet, i) => {
    if (magnet.shape !== 'cylinder') throw new RangeError(`${path}.${i}.shape must be cylinder in the through layout`);
    return {
      outerRadius: magnet.outerDiameter / 2,
      innerRadius: magnet.innerDiameter / 2,
      length: magnet.length,
      at: magnet.at,
      magnetisation: magnetisationOf(magnet, temperature, recoil),
    };
  });
}
