import type { AxialCoil, FaceCoil } from '../design-document';

/** Density of copper for winding mass, kg/m³ (textbook value for pure copper; drawn wire is 0.8 % lighter). */
export const COPPER_DENSITY = 8960;

/** Relative change of copper's resistivity per kelvin from 20 °C (IEC 60028). */
export const COPPER_PER_KELVIN = 0.00393;

/** Share of the plane covered by the densest packing of equal circles, π/√12: no winding is denser. */
export const DENSEST_PACKING = Math.PI / Math.sqrt(12);

type Coil = AxialCoil | FaceCoil;

/** What fits into a window, m in, turns out. */
export interface WindingFit {
  readonly turnsPerLayer: number;
  readonly layersSquare: number;
  readonly turnsSquare: number;
  readonly layersOrthocyclic: number;
  readonly turnsOrthocyclic: number;
}

/** Data of one coil. SI. */
export interface Winding {
  readonly resistance: number;
  readonly wireLength: number;
  readonly copperMass: number;
  /** Copper cross-section over window cross-section. */
  readonly fillFactor: number;
  readonly windowArea: number;
  readonly fit: WindingFit;
  /** Whether the turns fit with the largest overall wire diameter, laid square or orthocyclic. */
  readonly windable: boolean;
  /** Whether only an orthocyclic lay fits them. */
  readonly needsOrthocyclic: boolean;
}

/** All coils of a device in series. SI. */
export interface Windings {
  readonly coils: readonly Winding[];
  readonly resistance: number;
  readonly wireLength: number;
  readonly copperMass: number;
  readonly fillFactor: number;
  readonly windable: boolean;
}

/** Width of the winding from the innermost to the outermost turn, m; of a rectangle the narrower of its two. */
export function windowDepth(coil: Coil): number {
  switch (coil.shape) {
    case 'round':
      return (coil.outerDiameter - coil.innerDiameter) / 2;
    case 'racetrack':
      return coil.outerEndRadius - coil.innerEndRadius;
    case 'rectangular':
      return Math.min(coil.outer[0] - coil.inner[0], coil.outer[1] - coil.inner[1]) / 2;
  }
}

/** Length of the mean turn, m: turns spread evenly over the window. */
export function meanTurn(coil: Coil): number {
  switch (coil.shape) {
    case 'round':
      return (Math.PI * (coil.innerDiameter + coil.outerDiameter)) / 2;
    case 'racetrack':
      return 2 * coil.straight + Math.PI * (coil.innerEndRadius + coil.outerEndRadius);
    case 'rectangular':
      return coil.inner[0] + coil.inner[1] + coil.outer[0] + coil.outer[1];
  }
}

/** Whole numbers that fit, forgiving the last bits of a division that should come out even. */
const fits = (space: number, pitch: number): number => Math.max(0, Math.floor((space / pitch) * (1 + 1e-12) + 1e-9));

/**
 * Turns that fit a rectangular window with round wire.
 *
 * Square lay: turns above turns. Orthocyclic lay: every layer rests in the grooves of the one below, layer pitch
 * √3/2 of the wire; every second layer has one turn less unless half a wire of length is left over.
 *
 * @param length along the coil's axis (m)
 * @param depth from the inner to the outer turn (m)
 * @param wire largest overall diameter (m), above zero
 * @throws RangeError where the wire has no thickness
 */
export function windingFit(length: number, depth: number, wire: number): WindingFit {
  if (!(wire > 0)) throw new RangeError(`overall wire diameter must be positive, got ${wire} m`);
  const turnsPerLayer = fits(length, wire);
  const layersSquare = fits(depth, wire);
  const layersOrthocyclic = depth * (1 + 1e-12) < wire ? 0 : 1 + fits(depth - wire, (wire * Math.sqrt(3)) / 2);
  const offset = fits(length - wire / 2, wire);
  const turnsOrthocyclic =
    Math.ceil(layersOrthocyclic / 2) * turnsPerLayer +
    Math.floor(layersOrthocyclic / 2) * Math.min(turnsPerLayer, offset);
  return {
    turnsPerLayer,
    layersSquare,
    turnsSquare: turnsPerLayer * layersSquare,
    layersOrthocyclic,
    turnsOrthocyclic,
  };
}

/**
 * Resistance, wire length, mass and fit of one coil.
 *
 * @param conductivity of the copper at 20 °C (S/m)
 * @param temperature of the copper (°C)
 * Source: R = ρ l / A with ρ(T) = (1/σ20)(1 + 0.00393 (T − 20)), IEC 60028; bare wire area, no leads.
 */
export function windingOf(coil: Coil, conductivity: number, temperature: number): Winding {
  const area = (Math.PI * coil.wire.diameter ** 2) / 4;
  const wireLength = coil.turns * meanTurn(coil);
  const depth = windowDepth(coil);
  const windowArea = coil.length * depth;
  const fit = windingFit(coil.length, depth, coil.wire.overallDiameter);
  return {
    resistance: (wireLength * (1 + COPPER_PER_KELVIN * (temperature - 20))) / (conductivity * area),
    wireLength,
    copperMass: COPPER_DENSITY * area * wireLength,
    fillFactor: (coil.turns * area) / windowArea,
    windowArea,
    fit,
    windable: coil.turns <= Math.max(fit.turnsSquare, fit.turnsOrthocyclic),
    needsOrthocyclic: coil.turns > fit.turnsSquare && coil.turns <= fit.turnsOrthocyclic,
  };
}

/** Data of all coils in series; the fill factor is copper over window of all together. */
export function windingsOf(coils: readonly Coil[], conductivity: number, temperature: number): Windings {
  const each = coils.map((coil) => windingOf(coil, conductivity, temperature));
  const total = (pick: (winding: Winding) => number): number => each.reduce((sum, winding) => sum + pick(winding), 0);
  return {
    coils: each,
    resistance: total((winding) => winding.resistance),
    wireLength: total((winding) => winding.wireLength),
    copperMass: total((winding) => winding.copperMass),
    fillFactor: total((winding) => winding.fillFactor * winding.windowArea) / total((winding) => winding.windowArea),
    windable: each.every((winding) => winding.windable),
  };
}

/** Most turns of round wire that any lay could put into a window: area times the densest packing. */
export const mostTurns = (windowArea: number, wire: number): number =>
  Math.floor((DENSEST_PACKING * windowArea) / ((Math.PI * wire * wire) / 4));
