import { MAGNETIC_CONSTANT } from './constants';
import { demagnetisingFactor } from './demagnetising';
import type { Magnet, MagnetMaterial } from './magnet';

/** Temperature to which catalogue remanence and coercivity refer, °C. */
export const REFERENCE_TEMPERATURE = 20;

/**
 * Remanence at a temperature, straight line through the value at 20 °C.
 *
 * @param temperature °C
 * @returns T; never below zero, where the line has lost its meaning
 */
export function remanenceAt(material: MagnetMaterial, temperature: number): number {
  return Math.max(0, material.remanence * (1 + material.remanencePerKelvin * (temperature - REFERENCE_TEMPERATURE)));
}

/**
 * Uniform magnetisation of a magnet alone in air, with its sign along the axis of magnetisation:
 * M = polarity (Br(T)/μ0) / (1 + N (μr − 1)).
 *
 * @param temperature °C
 * @param recoil false leaves the recoil line out: M = Br(T)/μ0
 * @returns A/m
 * Source: linear recoil line and magnetometric demagnetising factor; Chen, Brug & Goldfarb (1991).
 */
export function magnetisationOf(magnet: Magnet, temperature: number, recoil = true): number {
  const rigid = (magnet.polarity * remanenceAt(magnet.material, temperature)) / MAGNETIC_CONSTANT;
  const susceptibility = magnet.material.recoilPermeability - 1;
  if (!recoil || susceptibility === 0) return rigid;
  return rigid / (1 + demagnetisingFactor(magnet) * susceptibility);
}

/** Volume of a magnet, m³. */
export function volumeOf(magnet: Magnet): number {
  if (magnet.shape === 'block') return magnet.size[0]! * magnet.size[1]! * magnet.size[2]!;
  const outer = magnet.outerDiameter / 2;
  const inner = magnet.innerDiameter / 2;
  return Math.PI * (outer - inner) * (outer + inner) * magnet.length;
}
