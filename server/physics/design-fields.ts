import type { Dimension } from './quantity-units';

/** What a form and the validation need to know of one number of a document. Limits and default are SI (°C, rad). */
export interface DocumentField {
  readonly label: string;
  readonly dimension: Dimension;
  /** Unit that the field shows first and takes where none is typed; an SI unit or a prefixed one. */
  readonly unit: string;
  readonly minimum: number;
  readonly maximum: number;
  /** True where the minimum itself is refused: lengths, masses, resistances are above zero. */
  readonly above?: boolean;
  /** True where only whole numbers make sense. */
  readonly whole?: boolean;
  /** Sensible step of a stepper, SI. */
  readonly step: number;
  /** Written out where the document leaves it out; a required field has none. */
  readonly default?: number;
  readonly help: string;
}

const mm = (
  label: string,
  minimum: number,
  maximum: number,
  help: string,
  more: Partial<DocumentField> = {},
): DocumentField => ({
  label,
  dimension: 'length',
  unit: 'mm',
  minimum,
  maximum,
  step: 1e-4,
  help,
  ...more,
});
const size = (label: string, help: string): DocumentField => mm(label, 1e-5, 1, help);
const place = (label: string, help: string, more: Partial<DocumentField> = {}): DocumentField =>
  mm(label, -10, 10, help, more);

const capacitance: DocumentField = {
  label: 'Smoothing capacitance',
  dimension: 'capacitance',
  unit: 'µF',
  minimum: 1e-12,
  maximum: 1e4,
  step: 1e-6,
  help: 'Across the direct-voltage side of the rectifier.',
};
const load: DocumentField = {
  label: 'Load resistance',
  dimension: 'resistance',
  unit: 'Ω',
  minimum: 1e-3,
  maximum: 1e12,
  step: 10,
  help: 'What the generator feeds.',
};

/**
 * Every number of a design document by path pattern: `*` stands for a place in a list, `{kind}` picks the kind of
 * magnet, coil, suspension or circuit. `designField` finds the entry for a real path.
 */
export const designFields = {
  axisAngle: {
    label: 'Travel axis above horizontal',
    dimension: 'angle',
    unit: 'deg',
    minimum: -Math.PI,
    maximum: Math.PI,
    step: Math.PI / 36,
    default: 0,
    help: '90° is upright: gravity then pulls towards −x.',
  },
  temperature: {
    label: 'Temperature',
    dimension: 'temperature',
    unit: '°C',
    minimum: -200,
    maximum: 400,
    step: 5,
    default: 20,
    help: 'Of magnets and copper alike.',
  },
  conductivity: {
    label: 'Copper conductivity at 20 °C',
    dimension: 'conductivity',
    unit: 'MS/m',
    minimum: 1e5,
    maximum: 1e8,
    step: 5e5,
    default: 58e6,
    help: 'IEC 60028 says 58 MS/m; data sheets of enamelled wire use 58.5.',
  },

  'magnets.*{cylinder}.outerDiameter': size('Outer diameter', 'Of the magnet, without coating.'),
  'magnets.*{cylinder}.innerDiameter': mm('Inner diameter', 0, 1, 'Zero for a solid cylinder.', { default: 0 }),
  'magnets.*{cylinder}.length': size('Length', 'Along the axis of travel, the direction of magnetisation.'),
  'magnets.*{cylinder}.at': place('Centre', 'Of the magnet along the travel, where x = 0.'),
  'magnets.*{block}.size.0': size('Size along travel', 'Side of the block along x.'),
  'magnets.*{block}.size.1': size('Size across', 'Side of the block along y.'),
  'magnets.*{block}.size.2': size('Thickness', 'Side of the block along z, the direction of magnetisation.'),
  'magnets.*{block}.at.0': place('Centre along travel', 'Where x = 0.'),
  'magnets.*{block}.at.1': place('Centre across', 'Along y.'),
  'magnets.*{block}.at.2': place('Centre height', 'Along z, from the coil frame’s origin.'),
  'magnets.*.material.remanence': {
    label: 'Remanence at 20 °C',
    dimension: 'fluxDensity',
    unit: 'T',
    minimum: 0.01,
    maximum: 2,
    step: 0.01,
    help: 'Middle of the range that the grade promises, or measured.',
  },
  'magnets.*.material.recoilPermeability': {
    label: 'Recoil permeability',
    dimension: 'number',
    unit: '',
    minimum: 1,
    maximum: 1.5,
    step: 0.01,
    default: 1.05,
    help: 'Relative. Above 1.5 the demagnetisation curve is not straight and this model does not hold.',
  },
  'magnets.*.material.remanencePerKelvin': {
    label: 'Remanence per kelvin',
    dimension: 'perKelvin',
    unit: '%/K',
    minimum: -0.01,
    maximum: 0.01,
    step: 1e-4,
    default: 0,
    help: 'Reversible change relative to 20 °C.',
  },
  'magnets.*.material.intrinsicCoercivity': {
    label: 'Intrinsic coercivity at 20 °C',
    dimension: 'fieldStrength',
    unit: 'kA/m',
    minimum: 1e4,
    maximum: 1e7,
    step: 1e4,
    help: 'Least value that the grade promises.',
  },
  'magnets.*.material.intrinsicCoercivityPerKelvin': {
    label: 'Intrinsic coercivity per kelvin',
    dimension: 'perKelvin',
    unit: '%/K',
    minimum: -0.02,
    maximum: 0.02,
    step: 1e-4,
    help: 'Negative for rare earths, positive for hard ferrite; leave empty where it is not known.',
  },
  'magnets.*.material.density': {
    label: 'Density',
    dimension: 'density',
    unit: 'kg/m³',
    minimum: 500,
    maximum: 25000,
    step: 100,
    help: 'For the mass of the magnet.',
  },
  'magnets.*.material.maxTemperature': {
    label: 'Highest working temperature',
    dimension: 'temperature',
    unit: '°C',
    minimum: -100,
    maximum: 1000,
    step: 10,
    default: 80,
    help: 'As the grade table gives it; holds for one load line only.',
  },

  'misalignment.offset': mm('Offset sideways', -0.1, 0.1, 'Of the moving assembly from the coil’s axis.', {
    default: 0,
  }),
  'misalignment.tilt': {
    label: 'Tilt',
    dimension: 'angle',
    unit: 'deg',
    minimum: -Math.PI / 6,
    maximum: Math.PI / 6,
    step: Math.PI / 360,
    default: 0,
    help: 'About the assembly’s middle, positive where the +x end leans towards the offset.',
  },

  'coils.*{round}.innerDiameter': size('Inner diameter', 'Of the winding.'),
  'coils.*{round}.outerDiameter': size('Outer diameter', 'Of the winding.'),
  'coils.*{racetrack}.straight': size('Straight part', 'Length of the straight sides, along y.'),
  'coils.*{racetrack}.innerEndRadius': size('Inner end radius', 'Of the innermost turn’s half circles.'),
  'coils.*{racetrack}.outerEndRadius': size('Outer end radius', 'Of the outermost turn’s half circles.'),
  'coils.*{rectangular}.inner.0': size('Inner side along travel', 'Full side length, sharp corners.'),
  'coils.*{rectangular}.inner.1': size('Inner side across', 'Full side length, sharp corners.'),
  'coils.*{rectangular}.outer.0': size('Outer side along travel', 'Full side length, sharp corners.'),
  'coils.*{rectangular}.outer.1': size('Outer side across', 'Full side length, sharp corners.'),
  'coils.*.length': size(
    'Length',
    'Of the winding along its axis: width in the through layout, thickness in the across layout.',
  ),
  'coils.*.at': place('Centre', 'Of the winding along the travel.'),
  'coils.*.at.0': place('Centre along travel', 'Of the winding.'),
  'coils.*.at.1': place('Centre across', 'Of the winding, along y.'),
  'coils.*.at.2': place('Centre height', 'Of the winding, along z.'),
  'coils.*.turns': {
    label: 'Turns',
    dimension: 'number',
    unit: '',
    minimum: 1,
    maximum: 1e6,
    whole: true,
    step: 10,
    help: 'Spread evenly over the winding window.',
  },
  'coils.*.wire.diameter': mm('Bare wire diameter', 1e-6, 0.01, 'Of the copper.', { step: 1e-6 }),
  'coils.*.wire.overallDiameter': mm(
    'Overall wire diameter',
    1e-6,
    0.02,
    'With insulation; the largest of the grade decides what fits.',
    { step: 1e-6 },
  ),

  'movingMass.total': {
    label: 'Moving mass, all',
    dimension: 'mass',
    unit: 'g',
    minimum: 1e-6,
    maximum: 1000,
    step: 1e-3,
    help: 'Everything that moves, magnets included.',
  },
  'movingMass.added': {
    label: 'Moving mass besides the magnets',
    dimension: 'mass',
    unit: 'g',
    minimum: 0,
    maximum: 1000,
    step: 1e-3,
    help: 'Carriers, shafts, iron; the magnets’ own mass is added from their density.',
  },

  'suspension{spring}.stiffness': {
    label: 'Stiffness',
    dimension: 'stiffness',
    unit: 'N/m',
    minimum: -1e8,
    maximum: 1e8,
    step: 10,
    help: 'F = −k u − k₃ u³. Negative gives two wells where the cubic term is positive.',
  },
  'suspension{spring}.cubic': {
    label: 'Cubic stiffness',
    dimension: 'cubicStiffness',
    unit: 'N/m³',
    minimum: -1e16,
    maximum: 1e16,
    step: 1e7,
    default: 0,
    help: 'Positive hardens, negative softens.',
  },
  'suspension.neutralAt': place('Neutral position', 'Where the spring pulls neither way.', { default: 0 }),
  'suspension{helical}.wireDiameter': mm('Spring wire diameter', 1e-5, 0.05, 'Of the round wire.', { step: 1e-5 }),
  'suspension{helical}.meanDiameter': mm('Mean coil diameter', 1e-4, 1, 'Centre of wire to centre of wire.'),
  'suspension{helical}.activeTurns': {
    label: 'Active turns',
    dimension: 'number',
    unit: '',
    minimum: 0.5,
    maximum: 1000,
    step: 0.5,
    help: 'Turns that twist; dead end turns not counted.',
  },
  'suspension{helical}.shearModulus': {
    label: 'Shear modulus',
    dimension: 'modulus',
    unit: 'GPa',
    minimum: 1e8,
    maximum: 1e12,
    step: 1e9,
    default: 81.5e9,
    help: '81.5 GPa patented steel wire, 73 GPa stainless (EN 13906-1).',
  },
  'suspension{helical}.density': {
    label: 'Spring density',
    dimension: 'density',
    unit: 'kg/m³',
    minimum: 100,
    maximum: 30000,
    step: 50,
    default: 7850,
    help: 'A third of the spring’s mass moves with the assembly.',
  },
  'suspension{helical}.springs': {
    label: 'Springs side by side',
    dimension: 'number',
    unit: '',
    minimum: 1,
    maximum: 100,
    whole: true,
    step: 1,
    default: 1,
    help: 'Equal springs whose stiffnesses add.',
  },
  'suspension{table}.displacement': place('Displacement', 'Rising; of the assembly along the travel.'),
  'suspension{table}.force': {
    label: 'Force',
    dimension: 'force',
    unit: 'N',
    minimum: -1e6,
    maximum: 1e6,
    step: 0.1,
    help: 'On the assembly at that displacement.',
  },

  'damping.quality': {
    label: 'Quality factor',
    dimension: 'number',
    unit: '',
    minimum: 0.01,
    maximum: 1e6,
    step: 5,
    help: 'Of the small motion at the rest position, coil open.',
  },
  'damping.coefficient': {
    label: 'Damping coefficient',
    dimension: 'dampingCoefficient',
    unit: 'N s/m',
    minimum: 0,
    maximum: 1e5,
    step: 1e-3,
    help: 'Force per velocity.',
  },
  'damping.quadratic': {
    label: 'Quadratic drag',
    dimension: 'quadraticDrag',
    unit: 'N s²/m²',
    minimum: 0,
    maximum: 1e5,
    step: 1e-3,
    default: 0,
    help: 'Force per velocity squared, as of moving air.',
  },

  'stops.lower': place('Lower stop', 'Position x where the assembly touches; leave empty for none.'),
  'stops.upper': place('Upper stop', 'Position x where the assembly touches; leave empty for none.'),
  'stops.stiffness': {
    label: 'Contact stiffness',
    dimension: 'stiffness',
    unit: 'kN/m',
    minimum: 1,
    maximum: 1e10,
    step: 1e4,
    help: 'Of the stop, in contact only.',
  },
  'stops.damping': {
    label: 'Contact damping',
    dimension: 'dampingCoefficient',
    unit: 'N s/m',
    minimum: 0,
    maximum: 1e6,
    step: 0.5,
    default: 0,
    help: 'In contact F = −k δ − c ẋ, never pulling.',
  },

  'circuit{resistor}.resistance': load,
  'circuit{bridge}.resistance': load,
  'circuit{bridge}.capacitance': capacitance,
  'circuit{doubler}.resistance': { ...load, help: 'Across both capacitors in series.' },
  'circuit{doubler}.capacitance': { ...capacitance, help: 'Of each of the two capacitors.' },
  'circuit{store}.voltage': {
    label: 'Store voltage',
    dimension: 'voltage',
    unit: 'V',
    minimum: 1e-3,
    maximum: 1e4,
    step: 0.1,
    help: 'Held constant by a battery or a regulated store.',
  },
  'circuit{tracker}.inputResistance': {
    ...load,
    label: 'Input resistance',
    help: 'What the converter presents once it runs.',
  },
  'circuit{tracker}.startVoltage': {
    label: 'Start voltage',
    dimension: 'voltage',
    unit: 'V',
    minimum: 0,
    maximum: 1e4,
    step: 0.05,
    default: 0,
    help: 'Below it the converter draws nothing.',
  },
  'circuit{tracker}.efficiency': {
    label: 'Efficiency',
    dimension: 'number',
    unit: '',
    minimum: 0.01,
    maximum: 1,
    step: 0.01,
    default: 1,
    help: 'Of what enters, what reaches the load.',
  },
  'circuit{supercapacitor}.capacitance': {
    ...capacitance,
    label: 'Capacitance',
    unit: 'mF',
    minimum: 1e-9,
    step: 1e-3,
    help: 'Of the supercapacitor.',
  },
  'circuit{supercapacitor}.seriesResistance': {
    label: 'Series resistance',
    dimension: 'resistance',
    unit: 'Ω',
    minimum: 0,
    maximum: 1e6,
    step: 0.1,
    default: 0,
    help: 'Between the terminals and the ideal capacitance.',
  },
  'circuit{supercapacitor}.leakageResistance': {
    label: 'Leakage resistance',
    dimension: 'resistance',
    unit: 'kΩ',
    minimum: 1,
    maximum: 1e15,
    step: 1e4,
    help: 'Across the ideal capacitance; a crude but named model of leakage.',
  },
  'circuit{supercapacitor}.initialVoltage': {
    label: 'Voltage at the start',
    dimension: 'voltage',
    unit: 'V',
    minimum: 0,
    maximum: 1000,
    step: 0.1,
    default: 0,
    help: 'Of the ideal capacitance.',
  },
  'circuit{supercapacitor}.duration': {
    label: 'Duration',
    dimension: 'time',
    unit: 's',
    minimum: 1e-3,
    maximum: 3600,
    step: 1,
    help: 'How long the start-up is followed.',
  },
  'circuit.node.sleepCurrent': {
    label: 'Sleep current',
    dimension: 'current',
    unit: 'µA',
    minimum: 0,
    maximum: 10,
    step: 1e-6,
    help: 'Of the node between bursts.',
  },
  'circuit.node.activeCurrent': {
    label: 'Active current',
    dimension: 'current',
    unit: 'mA',
    minimum: 0,
    maximum: 100,
    step: 1e-3,
    help: 'Of the node during a burst.',
  },
  'circuit.node.activeTime': {
    label: 'Active time',
    dimension: 'time',
    unit: 'ms',
    minimum: 0,
    maximum: 1e5,
    step: 1e-3,
    help: 'Length of the burst, which comes first in each period.',
  },
  'circuit.node.period': {
    label: 'Period',
    dimension: 'time',
    unit: 's',
    minimum: 1e-3,
    maximum: 1e7,
    step: 1,
    help: 'From burst to burst.',
  },
  'circuit.node.minimumVoltage': {
    label: 'Least voltage',
    dimension: 'voltage',
    unit: 'V',
    minimum: 0,
    maximum: 1000,
    step: 0.1,
    default: 0,
    help: 'Below it the node draws nothing.',
  },
  'circuit.diode.saturationCurrent': {
    label: 'Saturation current',
    dimension: 'current',
    unit: 'nA',
    minimum: 1e-18,
    maximum: 1e-2,
    step: 1e-9,
    help: 'Of the Shockley equation.',
  },
  'circuit.diode.emissionCoefficient': {
    label: 'Emission coefficient',
    dimension: 'number',
    unit: '',
    minimum: 0.5,
    maximum: 10,
    step: 0.05,
    default: 1,
    help: 'Of the Shockley equation.',
  },
  'circuit.diode.seriesResistance': {
    label: 'Diode series resistance',
    dimension: 'resistance',
    unit: 'Ω',
    minimum: 0,
    maximum: 1e4,
    step: 0.1,
    default: 0,
    help: 'Ohmic part of each diode.',
  },
  'circuit.diode.temperature': {
    label: 'Diode temperature',
    dimension: 'temperature',
    unit: '°C',
    minimum: -150,
    maximum: 300,
    step: 5,
    default: 27,
    help: 'Sets the thermal voltage kT/q only.',
  },
  'circuit.diode.drop': {
    label: 'Diode drop',
    dimension: 'voltage',
    unit: 'V',
    minimum: 0,
    maximum: 10,
    step: 0.05,
    help: 'An ideal diode with a fixed drop.',
  },

  'asMeasured.coilResistance': {
    label: 'Coil resistance, measured',
    dimension: 'resistance',
    unit: 'Ω',
    minimum: 1e-6,
    maximum: 1e9,
    step: 1,
    help: 'Replaces the computed one.',
  },
  'asMeasured.coilInductance': {
    label: 'Coil inductance, measured',
    dimension: 'inductance',
    unit: 'mH',
    minimum: 0,
    maximum: 1e4,
    step: 1e-3,
    help: 'Replaces the computed one; 0 leaves inductance out.',
  },
  'asMeasured.coupling': {
    label: 'Coupling, measured',
    dimension: 'coupling',
    unit: 'V s/m',
    minimum: -1e6,
    maximum: 1e6,
    step: 0.1,
    help: 'One constant value, or a curve over position.',
  },
  'asMeasured.coupling.position': place('Position', 'Rising; where the coupling was measured.'),
  'asMeasured.coupling.coupling': {
    label: 'Coupling',
    dimension: 'coupling',
    unit: 'V s/m',
    minimum: -1e6,
    maximum: 1e6,
    step: 0.1,
    help: 'At that position.',
  },
} as const satisfies Record<string, DocumentField>;

/** Path pattern of a number in a design document. */
export type DesignFieldName = keyof typeof designFields;

const named: Readonly<Record<string, DocumentField>> = designFields;

/**
 * Finds the entry of `designFields` for a real path.
 * @param path as in error messages, `magnets.0.size.2` or `circuit.capacitance`.
 * @param kind shape of the magnet or coil, or kind of suspension or circuit, that stands at that path.
 * @returns undefined where the path holds no number.
 */
export function designField(path: string, kind?: string): DocumentField | undefined {
  const levitated = path.startsWith('suspension.fixed.') ? path.replace('suspension.fixed.', 'magnets.') : path;
  const pattern = levitated.replace(/^(magnets|coils)\.\d+/, '$1.*');
  const braced =
    kind === undefined ? undefined : pattern.replace(/^(magnets\.\*|coils\.\*|suspension|circuit)/, `$1{${kind}}`);
  const listed = /^(suspension\.(?:displacement|force)|asMeasured\.coupling\.(?:position|coupling))\.\d+$/.exec(
    pattern,
  );
  const table = listed?.[1]?.replace(/^suspension\./, 'suspension{table}.');
  return (braced === undefined ? undefined : named[braced]) ?? named[table ?? pattern];
}
