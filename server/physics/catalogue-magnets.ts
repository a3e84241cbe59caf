/** How well an entry is known: P1 from two sources, P2 from one, P3 from memory and unchecked. */
export type CatalogueGrade = 'P1' | 'P2' | 'P3';

/** Properties of a magnet material in SI, temperatures in °C. */
export interface MagnetMaterial {
  name: string;
  /** T at 20 °C. */
  remanence: number;
  recoilPermeability: number;
  /** Relative change per kelvin. */
  remanencePerKelvin: number;
  /** A/m at 20 °C, least value of the grade. */
  intrinsicCoercivity: number;
  /** Relative change per kelvin; null where it is not known. */
  intrinsicCoercivityPerKelvin: number | null;
  density: number;
  maxTemperature: number;
}

export interface CatalogueMagnet {
  readonly key: string;
  readonly family: 'sintered NdFeB' | 'SmCo' | 'hard ferrite' | 'bonded NdFeB';
  readonly material: Readonly<MagnetMaterial>;
  /** Range of remanence that makers promise, T; the default is its middle. */
  readonly remanenceRange: readonly [number, number];
  readonly source: string;
  readonly grade: CatalogueGrade;
  readonly note: string;
}

const middle = (low: number, high: number): number => Number(((low + high) / 2).toPrecision(12));

const ndfebSource = 'published grade tables of makers of sintered NdFeB';
const rangeNote =
  'A grade name is a range of remanence; the middle is taken. The highest temperature holds for one load line.';

/** [grade, remanence low, high (T), least coercivity (A/m), highest temperature (°C)] */
const ndfebGrades: readonly (readonly [string, number, number, number, number])[] = [
  ['N35', 1.17, 1.22, 955e3, 80],
  ['N38', 1.22, 1.25, 955e3, 80],
  ['N40', 1.25, 1.28, 955e3, 80],
  ['N42', 1.28, 1.32, 955e3, 80],
  ['N45', 1.32, 1.38, 955e3, 80],
  ['N48', 1.37, 1.42, 955e3, 80],
  ['N50', 1.39, 1.45, 955e3, 80],
  ['N52', 1.42, 1.48, 876e3, 70],
];

/** [series, least coercivity (A/m), highest temperature (°C), coercivity per K, remanence per K, how well known, grades made] */
const ndfebSeries: readonly (readonly [string, number, number, number, number, CatalogueGrade, readonly string[]])[] = [
  ['M', 1114e3, 100, -0.007, -0.00115, 'P1', ['N35', 'N38', 'N40', 'N42', 'N45', 'N48', 'N50']],
  ['H', 1353e3, 120, -0.006, -0.0011, 'P2', ['N35', 'N38', 'N40', 'N42', 'N45', 'N48']],
  ['SH', 1592e3, 150, -0.005, -0.0012, 'P1', ['N35', 'N38', 'N40', 'N42', 'N45']],
  ['UH', 1990e3, 180, -0.0047, -0.0011, 'P2', ['N35', 'N38', 'N40']],
  ['EH', 2388e3, 200, -0.0043, -0.0011, 'P3', ['N35', 'N38']],
];

function entry(
  family: CatalogueMagnet['family'],
  key: string,
  remanenceRange: readonly [number, number],
  properties: Omit<MagnetMaterial, 'name' | 'remanence'>,
  source: string,
  grade: CatalogueGrade,
  note: string,
): CatalogueMagnet {
  // The order of the keys is that of the canonical document.
  const material: MagnetMaterial = {
    name: key,
    remanence: middle(...remanenceRange),
    recoilPermeability: properties.recoilPermeability,
    remanencePerKelvin: properties.remanencePerKelvin,
    intrinsicCoercivity: properties.intrinsicCoercivity,
    intrinsicCoercivityPerKelvin: properties.intrinsicCoercivityPerKelvin,
    density: properties.density,
    maxTemperature: properties.maxTemperature,
  };
  return { key, family, material, remanenceRange, source, grade, note };
}

const plainNdfeb = ndfebGrades.map(([grade, low, high, coercivity, hottest]) =>
  entry(
    'sintered NdFeB',
    `NdFeB ${grade}`,
    [low, high],
    {
      recoilPermeability: 1.05,
      remanencePerKelvin: -0.0012,
      intrinsicCoercivity: coercivity,
      intrinsicCoercivityPerKelvin: -0.0076,
      density: 7500,
      maxTemperature: hottest,
    },
    ndfebSource,
    'P1',
    rangeNote,
  ),
);

const heatproofNdfeb = ndfebSeries.flatMap(
  ([series, coercivity, hottest, perKelvin, remanencePerKelvin, known, made]) =>
    ndfebGrades
      .filter(([grade]) => made.includes(grade))
      .map(([grade, low, high]) =>
        entry(
          'sintered NdFeB',
          `NdFeB ${grade}${series}`,
          [low, high],
          {
            recoilPermeability: 1.05,
            remanencePerKelvin,
            intrinsicCoercivity: coercivity,
            intrinsicCoercivityPerKelvin: perKelvin,
            density: 7500,
            maxTemperature: hottest,
          },
          `${ndfebSource}, series ${series}`,
          known,
          rangeNote,
        ),
      ),
);

/** [key, remanence low, high (T), least coercivity, highest temperature, remanence per K, coercivity per K, density] */
const samariumCobalt: readonly (readonly [string, number, number, number, number, number, number, number])[] = [
  ['SmCo 1:5 16', 0.75, 0.88, 1591e3, 250, -0.00043, -0.0025, 8200],
  ['SmCo 1:5 20', 0.9, 0.95, 1591e3, 250, -0.00043, -0.0025, 8200],
  ['SmCo 2:17 24H', 0.95, 1.02, 1990e3, 350, -0.00025, -0.002, 8400],
  ['SmCo 2:17 26H', 1.02, 1.05, 1990e3, 350, -0.0003, -0.002, 8400],
  ['SmCo 2:17 28H', 1.03, 1.08, 1990e3, 350, -0.00035, -0.002, 8400],
];

/** [key, remanence low, high (T), least coercivity, how well known] */
const ferrites: readonly (readonly [string, number, number, number, CatalogueGrade])[] = [
  ['Ferrite Y25', 0.36, 0.4, 140e3, 'P1'],
  ['Ferrite Y30', 0.37, 0.4, 180e3, 'P2'],
  ['Ferrite Y30H-1', 0.38, 0.4, 235e3, 'P1'],
  ['Ferrite Y33', 0.41, 0.43, 225e3, 'P2'],
];

const bonded: readonly (readonly [string, number, number, number])[] = [
  ['Bonded NdFeB BNP-8', 0.62, 0.66, 640e3],
  ['Bonded NdFeB BNP-10', 0.68, 0.72, 640e3],
  ['Bonded NdFeB BNP-12', 0.74, 0.8, 700e3],
];

export const catalogueMagnets: readonly CatalogueMagnet[] = [
  ...plainNdfeb,
  ...heatproofNdfeb,
  ...samariumCobalt.map(([key, low, high, coercivity, hottest, remanencePerKelvin, perKelvin, density]) =>
    entry(
      'SmCo',
      key,
      [low, high],
      {
        recoilPermeability: 1.05,
        remanencePerKelvin,
        intrinsicCoercivity: coercivity,
        intrinsicCoercivityPerKelvin: perKelvin,
        density,
        maxTemperature: hottest,
      },
      'published grade tables of makers of sintered SmCo',
      'P2',
      'Makers give −0.2 to −0.3 %/K for the coercivity.',
    ),
  ),
  ...ferrites.map(([key, low, high, coercivity, known]) =>
    entry(
      'hard ferrite',
      key,
      [low, high],
      {
        recoilPermeability: 1.1,
        remanencePerKelvin: -0.002,
        intrinsicCoercivity: coercivity,
        intrinsicCoercivityPerKelvin: 0.005,
        density: 4850,
        maxTemperature: 250,
      },
      'published grade tables of makers of hard ferrite',
      known,
      'Coercivity falls in the cold; of the published 0.2 to 0.5 %/K the worse is taken.',
    ),
  ),
  ...bonded.map(([key, low, high, coercivity]) =>
    entry(
      'bonded NdFeB',
      key,
      [low, high],
      {
        recoilPermeability: 1.2,
        remanencePerKelvin: -0.0011,
        intrinsicCoercivity: coercivity,
        intrinsicCoercivityPerKelvin: -0.004,
        density: 6000,
        maxTemperature: 120,
      },
      'common practice, from memory and unchecked',
      'P3',
      'Epoxy-bonded, pressed. Measure before relying on it.',
    ),
  ),
];

/** Families that this model refuses, and why. */
export const refusedMaterials: readonly { readonly pattern: RegExp; readonly reason: string }[] = [
  {
    pattern: /al\s*-?\s*ni\s*-?\s*co/i,
    reason:
      'the demagnetisation curve of AlNiCo is not straight: its state depends on its history, and a model with rigid magnetisation does not hold for it',
  },
];
