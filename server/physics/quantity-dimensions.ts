import {
  acceleration,
  angle,
  capacitance,
  current,
  energy,
  fieldStrength,
  flux,
  fluxDensity,
  force,
  frequency,
  inductance,
  kelvin,
  length,
  mass,
  none,
  power,
  pressure,
  resistance,
  time,
  voltage,
} from './quantity-units';
import type { DimensionExponents } from './quantity-units';

/** What a dimension is called, how it is written, and which units serve as examples. */
export interface DimensionDescription {
  /** With article, for sentences: "a length". */
  readonly phrase: string;
  readonly exponents: DimensionExponents;
  /** SI unit as shown. */
  readonly unit: string;
  /** Two or three texts that are understood. */
  readonly examples: readonly string[];
  /** Powers of ten of the prefixes used for showing, lowest and highest; none where the SI unit is always used. */
  readonly prefixes?: readonly [number, number];
  /** Powers of ten of what the prefixed unit is worth in SI: −3 for the gram. */
  readonly prefixedUnitExponent?: number;
  /** Unit that takes the prefix where it is not `unit`. */
  readonly prefixedUnit?: string;
}

const perKelvin: DimensionExponents = [0, 0, 0, 0, -1, 0];

export const dimensions = {
  length: {
    phrase: 'a length',
    exponents: length,
    unit: 'm',
    examples: ['12 mm', '0.47 in', '1.2e-3 m'],
    prefixes: [-9, -3],
  },
  mass: {
    phrase: 'a mass',
    exponents: mass,
    unit: 'kg',
    examples: ['25 g', '0.025 kg'],
    prefixes: [-6, 3],
    prefixedUnit: 'g',
    prefixedUnitExponent: -3,
  },
  time: { phrase: 'a time', exponents: time, unit: 's', examples: ['60 s', '20 ms', '2 min'], prefixes: [-9, 0] },
  frequency: {
    phrase: 'a frequency',
    exponents: frequency,
    unit: 'Hz',
    examples: ['50 Hz', '1 kHz', '1500 rpm'],
    prefixes: [-3, 9],
  },
  angle: { phrase: 'an angle', exponents: angle, unit: 'rad', examples: ['90 deg', '1.57 rad'] },
  temperature: { phrase: 'a temperature', exponents: kelvin, unit: '°C', examples: ['20 degC', '68 degF', '293 K'] },
  perKelvin: {
    phrase: 'a temperature coefficient',
    exponents: perKelvin,
    unit: '1/K',
    examples: ['-0.12 %/K', '-0.0012 1/K'],
  },
  acceleration: { phrase: 'an acceleration', exponents: acceleration, unit: 'm/s²', examples: ['1 m/s^2', '0.5 g'] },
  accelerationDensity: {
    phrase: 'an acceleration density',
    exponents: [2, 0, -3, 0, 0, 0],
    unit: '(m/s²)²/Hz',
    examples: ['0.015 g^2/Hz', '1 (m/s^2)^2/Hz'],
  },
  speed: {
    phrase: 'a speed',
    exponents: [1, 0, -1, 0, 0, 0],
    unit: 'm/s',
    examples: ['4.5 mm/s', '0.1 m/s'],
    prefixes: [-6, 0],
  },
  voltage: { phrase: 'a voltage', exponents: voltage, unit: 'V', examples: ['1.5 V', '300 mV'], prefixes: [-9, 3] },
  current: { phrase: 'a current', exponents: current, unit: 'A', examples: ['2.52 nA', '10 mA'], prefixes: [-15, 3] },
  resistance: {
    phrase: 'a resistance',
    exponents: resistance,
    unit: 'Ω',
    examples: ['804 ohm', '4k7', '4.7 kΩ'],
    prefixes: [-3, 9],
  },
  inductance: {
    phrase: 'an inductance',
    exponents: inductance,
    unit: 'H',
    examples: ['13.7 mH', '0.0137 H'],
    prefixes: [-12, 0],
  },
  capacitance: {
    phrase: 'a capacitance',
    exponents: capacitance,
    unit: 'F',
    examples: ['100 uF', '4u7', '0.01 F'],
    prefixes: [-15, 0],
  },
  fluxDensity: {
    phrase: 'a flux density',
    exponents: fluxDensity,
    unit: 'T',
    examples: ['1.3 T', '0.5 mT', '13 kG'],
    prefixes: [-9, 0],
  },
  fieldStrength: {
    phrase: 'a magnetic field strength',
    exponents: fieldStrength,
    unit: 'A/m',
    examples: ['955 kA/m', '12 kOe'],
    prefixes: [-3, 6],
  },
  magneticMoment: { phrase: 'a magnetic moment', exponents: [2, 0, 0, 1, 0, 0], unit: 'A m²', examples: ['0.8 A m^2'] },
  density: {
    phrase: 'a density',
    exponents: [-3, 1, 0, 0, 0, 0],
    unit: 'kg/m³',
    examples: ['7500 kg/m^3', '7.5 g/cm^3'],
  },
  conductivity: {
    phrase: 'a conductivity',
    exponents: [-3, -1, 3, 2, 0, 0],
    unit: 'S/m',
    examples: ['58 MS/m', '58.5e6 S/m'],
    prefixes: [0, 6],
  },
  stiffness: {
    phrase: 'a stiffness',
    exponents: [0, 1, -2, 0, 0, 0],
    unit: 'N/m',
    examples: ['2.467 kN/m', '14.1 lbf/in'],
    prefixes: [-3, 6],
  },
  quadraticStiffness: {
    phrase: 'a quadratic stiffness',
    exponents: [-1, 1, -2, 0, 0, 0],
    unit: 'N/m²',
    examples: ['500 N/m^2'],
    prefixes: [0, 9],
  },
  cubicStiffness: {
    phrase: 'a cubic stiffness',
    exponents: [-2, 1, -2, 0, 0, 0],
    unit: 'N/m³',
    examples: ['2e8 N/m^3', '0.2 N/mm^3'],
    prefixes: [0, 9],
  },
  dampingCoefficient: {
    phrase: 'a damping coefficient',
    exponents: [0, 1, -1, 0, 0, 0],
    unit: 'N s/m',
    examples: ['0.05 N*s/m', '52 mN s/m'],
    prefixes: [-6, 3],
  },
  quadraticDrag: {
    phrase: 'a quadratic drag',
    exponents: [-1, 1, 0, 0, 0, 0],
    unit: 'N s²/m²',
    examples: ['0.01 N*s^2/m^2'],
    prefixes: [-6, 3],
  },
  force: { phrase: 'a force', exponents: force, unit: 'N', examples: ['1.5 N', '200 mN'], prefixes: [-6, 3] },
  modulus: {
    phrase: 'a modulus or stress',
    exponents: pressure,
    unit: 'Pa',
    examples: ['79.3 GPa', '81500 MPa'],
    prefixes: [0, 9],
  },
  coupling: {
    phrase: 'a coupling',
    exponents: [1, 1, -2, -1, 0, 0],
    unit: 'V s/m',
    examples: ['6.06 V s/m', '6.06 N/A'],
    prefixes: [-6, 0],
  },
  fluxLinkage: {
    phrase: 'a flux linkage',
    exponents: flux,
    unit: 'V s',
    examples: ['59 mWb', '0.059 V s'],
    prefixes: [-9, 0],
  },
  power: { phrase: 'a power', exponents: power, unit: 'W', examples: ['1.3 mW', '0.0013 W'], prefixes: [-12, 6] },
  energy: { phrase: 'an energy', exponents: energy, unit: 'J', examples: ['5.1 mJ', '0.005 J'], prefixes: [-12, 6] },
  volume: { phrase: 'a volume', exponents: [3, 0, 0, 0, 0, 0], unit: 'm³', examples: ['12 cm^3', '1.2e-5 m^3'] },
  powerDensity: {
    phrase: 'a normalised power density',
    exponents: [-3, 1, 1, 0, 0, 0],
    unit: 'kg s/m³',
    examples: ['700 kg*s/m^3'],
  },
  number: { phrase: 'a plain number', exponents: none, unit: '', examples: ['0.85', '85 %'] },
} as const satisfies Record<string, DimensionDescription>;

/** Name of a dimension that a typed quantity may have. */
export type Dimension = keyof typeof dimensions;

/** Finds what a unit measures, for messages; undefined for a combination without a name here. */
export function dimensionWith(exponents: DimensionExponents): Dimension | undefined {
  for (const name of Object.keys(dimensions) as Dimension[]) {
    if (dimensions[name].exponents.every((value, index) => value === exponents[index])) return name;
  }
  return undefined;
}
