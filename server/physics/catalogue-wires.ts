import type { CatalogueGrade } from './catalogue-magnets';

/** Enamelled round copper wire by catalogue key. Diameters in m. */
export interface CatalogueWire {
  readonly key: string;
  /** Bare copper. */
  readonly diameter: number;
  /** Largest overall diameter of the insulation grade: it decides what fits. */
  readonly overallDiameter: number;
  readonly source: string;
  readonly grade: CatalogueGrade;
}

/** [nominal, largest overall grade 1, largest overall grade 2] in mm, and how well the row is known. */
const iecSizes: readonly (readonly [number, number, number, CatalogueGrade])[] = [
  [0.02, 0.024, 0.027, 'P2'],
  [0.025, 0.031, 0.034, 'P2'],
  [0.032, 0.039, 0.043, 'P2'],
  [0.04, 0.049, 0.054, 'P2'],
  [0.05, 0.06, 0.066, 'P2'],
  [0.063, 0.076, 0.083, 'P2'],
  [0.071, 0.084, 0.091, 'P2'],
  [0.08, 0.094, 0.101, 'P2'],
  [0.09, 0.105, 0.113, 'P2'],
  [0.1, 0.117, 0.125, 'P2'],
  [0.112, 0.13, 0.139, 'P2'],
  [0.125, 0.144, 0.154, 'P2'],
  [0.14, 0.16, 0.171, 'P2'],
  [0.16, 0.182, 0.194, 'P2'],
  [0.18, 0.204, 0.217, 'P2'],
  [0.2, 0.226, 0.239, 'P2'],
  [0.224, 0.252, 0.266, 'P2'],
  [0.25, 0.281, 0.297, 'P2'],
  [0.28, 0.312, 0.329, 'P2'],
  [0.315, 0.349, 0.367, 'P2'],
  [0.355, 0.392, 0.411, 'P2'],
  [0.4, 0.439, 0.459, 'P2'],
  [0.45, 0.491, 0.513, 'P2'],
  [0.5, 0.544, 0.566, 'P2'],
  [0.56, 0.606, 0.63, 'P3'],
  [0.63, 0.679, 0.704, 'P3'],
  [0.71, 0.762, 0.789, 'P3'],
  [0.8, 0.855, 0.884, 'P3'],
  [0.9, 0.959, 0.989, 'P3'],
  [1, 1.062, 1.094, 'P3'],
];

/** [AWG, bare by formula, largest overall single build, heavy build] in mm; false where only nominal overalls are known. */
const awgSizes: readonly (readonly [number, number, number, number, boolean])[] = [
  [20, 0.811821, 0.851, 0.879, false],
  [21, 0.7229475, 0.757, 0.787, false],
  [22, 0.6438033, 0.676, 0.701, false],
  [23, 0.5733234, 0.607, 0.632, false],
  [24, 0.5105592, 0.551, 0.577, true],
  [25, 0.4546661, 0.493, 0.516, true],
  [26, 0.4048919, 0.439, 0.462, true],
  [27, 0.3605666, 0.396, 0.417, true],
  [28, 0.3210939, 0.356, 0.373, true],
  [29, 0.2859423, 0.32, 0.338, true],
  [30, 0.254639, 0.284, 0.302, true],
  [31, 0.2267626, 0.254, 0.274, true],
  [32, 0.2019379, 0.231, 0.249, true],
  [33, 0.1798309, 0.206, 0.224, true],
  [34, 0.160144, 0.183, 0.198, true],
  [35, 0.1426124, 0.163, 0.178, true],
  [36, 0.127, 0.147, 0.16, true],
  [37, 0.1130968, 0.132, 0.145, true],
  [38, 0.1007156, 0.119, 0.13, true],
  [39, 0.08968981, 0.104, 0.114, true],
  [40, 0.07987109, 0.094, 0.102, true],
  [41, 0.07112726, 0.084, 0.091, true],
  [42, 0.06334065, 0.076, 0.081, true],
  [43, 0.05640648, 0.066, 0.074, true],
  [44, 0.05023142, 0.061, 0.069, true],
  [45, 0.04473237, 0.0521, 0.0584, true],
  [46, 0.03983533, 0.047, 0.0533, true],
];

/** Decimal shift in text, so that 0.117 mm is the double nearest to 0.000117. */
const fromMillimetres = (value: number): number => Number(`${value}e-3`);

const iecWires = iecSizes.flatMap(([nominal, grade1, grade2, grade]) =>
  [grade1, grade2].map((overall, index): CatalogueWire => ({
    key: `IEC ${nominal.toFixed(3)} grade ${index + 1}`,
    diameter: fromMillimetres(nominal),
    overallDiameter: fromMillimetres(overall),
    source:
      grade === 'P3'
        ? 'IEC 60317-0-1 table 1, overall diameter recalled and unchecked'
        : 'IEC 60317-0-1 table 1, as a maker of fine wire publishes it',
    grade,
  })),
);

const awgWires = awgSizes.flatMap(([number, bare, single, heavy, largest]) =>
  [single, heavy].map((overall, index): CatalogueWire => ({
    key: `AWG ${number} ${index === 0 ? 'single' : 'heavy'}`,
    diameter: fromMillimetres(bare),
    overallDiameter: fromMillimetres(overall),
    source: `bare: ASTM B258, formula 0.127 mm × 92^((36 − n)/39); overall: ANSI/NEMA MW 1000, ${largest ? 'maximum' : 'nominal only'}`,
    grade: 'P2',
  })),
);

export const catalogueWires: readonly CatalogueWire[] = [...iecWires, ...awgWires];
