import type { AxialMagnet } from './axial-magnet';
import { addEdgeOverSide, EDGE_TERMS } from './block-edge';
import { demagnetisingFactor } from './demagnetising';
import type { BlockMagnet, Magnet, MagnetMaterial } from './magnet';
import { axialForce, FORCE_TERMS } from './magnet-force';
import { magnetisationOf, REFERENCE_TEMPERATURE, volumeOf } from './magnetisation';

/** What the check of the operating point needs of a material besides its remanence. */
export interface CoerciveMaterial extends MagnetMaterial {
  /** Intrinsic coercivity at 20 °C (A/m). */
  readonly intrinsicCoercivity: number;
  /** Its relative change per kelvin: negative for rare earths, positive for hard ferrite; absent where not known. */
  readonly intrinsicCoercivityPerKelvin?: number | null;
}

/** Where a magnet works on its demagnetisation curve, averaged over its volume. */
export interface OperatingPoint {
  readonly demagnetisingFactor: number;
  /** M at the temperature (A/m), its size. */
  readonly magnetisation: number;
  /** Own mean demagnetising field N M (A/m). */
  readonly ownField: number;
  /** Mean field of the other magnets against the magnetisation (A/m); negative where they help. */
  readonly neighbourField: number;
  /** Both together (A/m). */
  readonly demagnetisingField: number;
  /** Intrinsic coercivity at the temperature (A/m); null where its temperature coefficient is not known. */
  readonly coercivity: number | null;
  /** 1 − field/coercivity: what is left before the magnet loses magnetisation for good; null with the coercivity. */
  readonly reserve: number | null;
}

/** Intrinsic coercivity at a temperature (A/m); null where the coefficient is needed but not known. */
export function coercivityAt(material: CoerciveMaterial, temperature: number): number | null {
  const difference = temperature - REFERENCE_TEMPERATURE;
  if (difference === 0) return material.intrinsicCoercivity;
  const coefficient = material.intrinsicCoercivityPerKelvin;
  if (coefficient === undefined || coefficient === null) return null;
  return Math.max(0, material.intrinsicCoercivity * (1 + coefficient * difference));
}

/**
 * Operating point of every magnet against its intrinsic coercivity.
 *
 * Means over each magnet's volume; the limit is the intrinsic coercivity itself, while the knee of a real curve lies
 * somewhat before it and the face centre of a disc is worse off than its mean: a small reserve is none.
 *
 * @param magnets all on one axis, or all blocks
 * @param temperature °C; rare earths are worst at the hottest, hard ferrite at the coldest temperature of the brief
 * @param others further magnets near by (fixed ones) that act but are not judged
 * Source: linear recoil and temperature laws; demagnetising factors as in demagnetising.
 */
export function operatingPoints(
  magnets: readonly Magnet<CoerciveMaterial>[],
  temperature: number,
  recoil = true,
  others: readonly Magnet[] = [],
): OperatingPoint[] {
  return magnets.map((magnet, i) => {
    const factor = demagnetisingFactor(magnet);
    const signed = magnetisationOf(magnet, temperature, recoil);
    const magnetisation = Math.abs(signed);
    let along = 0;
    for (const [j, other] of [...magnets, ...others].entries()) {
      if (j !== i) along += meanFieldOf(other, magnetisationOf(other, temperature, recoil), magnet);
    }
    const neighbourField = -Math.sign(signed) * along;
    const ownField = factor * magnetisation;
    const demagnetisingField = ownField + neighbourField;
    const coercivity = coercivityAt(magnet.material, temperature);
    const reserve = coercivity === null ? null : coercivity === 0 ? -Infinity : 1 - demagnetisingField / coercivity;
    return {
      demagnetisingFactor: factor,
      magnetisation,
      ownField,
      neighbourField,
      demagnetisingField,
      coercivity,
      reserve,
    };
  });
}

/** Mean of H along the axis of magnetisation that `source` (A/m) makes over the volume of `target` (A/m). */
function meanFieldOf(source: Magnet, magnetisation: number, target: Magnet): number {
  if (source.shape === 'cylinder' && target.shape === 'cylinder') {
    const out = new Float64Array(FORCE_TERMS);
    // energy of a target of 1 A/m in the source's field: its volume times the mean of B
    axialForce([axialOf(target, 1)], [axialOf(source, magnetisation)]).at(0, out);
    return out[0]! / (4e-7 * Math.PI * volumeOf(target));
  }
  if (source.shape === 'block' && target.shape === 'block') {
    return (magnetisation * facePairs(source, target)) / (4 * Math.PI * volumeOf(target));
  }
  throw new RangeError('magnets must be all cylinders or all blocks');
}

function axialOf(magnet: Magnet & { shape: 'cylinder' }, magnetisation: number): AxialMagnet {
  return {
    outerRadius: magnet.outerDiameter / 2,
    innerRadius: magnet.innerDiameter / 2,
    length: magnet.length,
    at: magnet.at,
    magnetisation,
  };
}

/** −Σ ± ∬∬ 1/r over the faces of two blocks: the mean field of unit magnetisation times 4π and the volume. */
function facePairs(source: BlockMagnet, target: BlockMagnet): number {
  const out = new Float64Array(EDGE_TERMS);
  const edge = (block: BlockMagnet, axis: number, side: number): number =>
    block.at[axis]! + 0.5 * side * block.size[axis]!;
  const sides = [1, -1];
  for (const i of sides) {
    for (const p of sides) {
      for (const j of sides) {
        for (const q of sides) {
          for (const k of sides) {
            for (const s of sides) {
              const u = edge(target, 0, i) - edge(source, 0, p);
              const v = edge(target, 1, j) - edge(source, 1, q);
              const w = edge(target, 2, k) - edge(source, 2, s);
              addEdgeOverSide(out, -i * p * j * q * k * s, u, v, w);
            }
          }
        }
      }
    }
  }
  return out[0]!;
}
