/**
 * Units and dimensions that typed quantities may use.
 *
 * A dimension is the exponents of metre, kilogram, second, ampere, kelvin and radian. The radian stands among them so
 * that an angle is never taken for a ratio. Scale factors are kept as `coefficient × 10^exponent`: a decimal prefix
 * then becomes part of the decimal number and "0.117 mm" is the double nearest to 0.000117, not one rounding off it.
 */

/** Exponents of [m, kg, s, A, K, rad]. */
export type DimensionExponents = readonly [number, number, number, number, number, number];

/** A unit's scale to SI: `coefficient × 10^exponent`. */
export interface UnitScale {
  readonly coefficient: number;
  readonly exponent: number;
  readonly dimension: DimensionExponents;
}

interface UnitDefinition extends UnitScale {
  readonly prefixable: boolean;
}

const unit = (dimension: DimensionExponents, coefficient = 1, exponent = 0, prefixable = false): UnitDefinition => ({
  coefficient,
  exponent,
  dimension,
  prefixable,
});

export const none: DimensionExponents = [0, 0, 0, 0, 0, 0];
export const length: DimensionExponents = [1, 0, 0, 0, 0, 0];
export const mass: DimensionExponents = [0, 1, 0, 0, 0, 0];
export const time: DimensionExponents = [0, 0, 1, 0, 0, 0];
export const current: DimensionExponents = [0, 0, 0, 1, 0, 0];
export const kelvin: DimensionExponents = [0, 0, 0, 0, 1, 0];
export const angle: DimensionExponents = [0, 0, 0, 0, 0, 1];
export const frequency: DimensionExponents = [0, 0, -1, 0, 0, 0];
export const acceleration: DimensionExponents = [1, 0, -2, 0, 0, 0];
export const force: DimensionExponents = [1, 1, -2, 0, 0, 0];
export const pressure: DimensionExponents = [-1, 1, -2, 0, 0, 0];
export const power: DimensionExponents = [2, 1, -3, 0, 0, 0];
export const energy: DimensionExponents = [2, 1, -2, 0, 0, 0];
export const voltage: DimensionExponents = [2, 1, -3, -1, 0, 0];
export const resistance: DimensionExponents = [2, 1, -3, -2, 0, 0];
const conductance: DimensionExponents = [-2, -1, 3, 2, 0, 0];
export const capacitance: DimensionExponents = [-2, -1, 4, 2, 0, 0];
export const inductance: DimensionExponents = [2, 1, -2, -2, 0, 0];
export const flux: DimensionExponents = [2, 1, -2, -1, 0, 0];
export const fluxDensity: DimensionExponents = [0, 1, -2, -1, 0, 0];
export const fieldStrength: DimensionExponents = [-1, 0, 0, 1, 0, 0];

const units: Readonly<Record<string, UnitDefinition>> = {
  m: unit(length, 1, 0, true),
  in: unit(length, 254, -4),
  inch: unit(length, 254, -4),
  '"': unit(length, 254, -4),
  ft: unit(length, 3048, -4),
  mil: unit(length, 254, -7),
  thou: unit(length, 254, -7),
  micron: unit(length, 1, -6),
  g: unit(mass, 1, -3, true),
  t: unit(mass, 1, 3),
  lb: unit(mass, 45359237, -8),
  oz: unit(mass, 28349523125, -12),
  s: unit(time, 1, 0, true),
  min: unit(time, 60),
  h: unit(time, 3600),
  d: unit(time, 86400),
  Hz: unit(frequency, 1, 0, true),
  rpm: unit(frequency, 1 / 60),
  A: unit(current, 1, 0, true),
  K: unit(kelvin, 1, 0, true),
  '°C': unit(kelvin),
  degC: unit(kelvin),
  rad: unit(angle, 1, 0, true),
  deg: unit(angle, Math.PI / 180),
  '°': unit(angle, Math.PI / 180),
  N: unit(force, 1, 0, true),
  lbf: unit(force, 44482216152605, -13),
  Pa: unit(pressure, 1, 0, true),
  psi: unit(pressure, 6894.757293168361),
  J: unit(energy, 1, 0, true),
  W: unit(power, 1, 0, true),
  V: unit(voltage, 1, 0, true),
  ohm: unit(resistance, 1, 0, true),
  S: unit(conductance, 1, 0, true),
  F: unit(capacitance, 1, 0, true),
  H: unit(inductance, 1, 0, true),
  Wb: unit(flux, 1, 0, true),
  T: unit(fluxDensity, 1, 0, true),
  G: unit(fluxDensity, 1, -4),
  kG: unit(fluxDensity, 1, -1),
  Oe: unit(fieldStrength, 250 / Math.PI, 0, true),
  '%': unit(none, 1, -2),
  ppm: unit(none, 1, -6),
};

const prefixes: Readonly<Record<string, number>> = {
  f: -15,
  p: -12,
  n: -9,
  u: -6,
  μ: -6,
  m: -3,
  c: -2,
  k: 3,
  K: 3,
  M: 6,
  G: 9,
};

const spellings: Readonly<Record<string, string>> = {
  Ω: 'ohm',
  Ohm: 'ohm',
  ohms: 'ohm',
  Ohms: 'ohm',
  OHM: 'ohm',
  degree: 'deg',
  degrees: 'deg',
  C: 'degC',
  celsius: 'degC',
  Celsius: 'degC',
  degF: '°F',
  hr: 'h',
  sec: 's',
  ins: 'in',
  inches: 'in',
  kelvin: 'K',
  hz: 'Hz',
  HZ: 'Hz',
  gn: 'gravity',
};

const canonicalSymbol = (symbol: string): string => {
  const direct = Object.hasOwn(spellings, symbol) ? spellings[symbol] : undefined;
  if (direct !== undefined) return direct;
  const omega = /^([fpnuμmkKMG])(Ω|Ohm|ohms|Ohms)$/.exec(symbol);
  return omega ? `${omega[1] ?? ''}ohm` : symbol;
};

/**
 * Looks a unit symbol up, with its decimal prefix.
 * @param symbol as typed, already cleaned of look-alike characters.
 * @param gravity true where `g` is standard gravity (accelerations) and not the gram.
 * @returns the scale to SI, or undefined for an unknown symbol.
 */
export function unitOf(symbol: string, gravity: boolean): UnitScale | undefined {
  const name = canonicalSymbol(symbol);
  if (name === 'gravity' || (gravity && name === 'g')) {
    return { coefficient: 980665, exponent: -5, dimension: acceleration };
  }
  if (gravity && (name === 'mg' || name === 'μg' || name === 'ug')) {
    return {
      coefficient: 980665,
      exponent: name === 'mg' ? -8 : -11,
      dimension: acceleration,
    };
  }
  const exact = Object.hasOwn(units, name) ? units[name] : undefined;
  if (exact) return exact;
  const prefix = prefixes[name.slice(0, 1)];
  const rest = name.slice(1);
  const base = Object.hasOwn(units, rest) ? units[rest] : undefined;
  if (prefix === undefined || base === undefined || !base.prefixable) return undefined;
  if (name.startsWith('K') && rest !== 'ohm') return undefined;
  return {
    coefficient: base.coefficient,
    exponent: base.exponent + prefix,
    dimension: base.dimension,
  };
}
