import type { CatalogueGrade } from './catalogue-magnets';

/** Shockley parameters with series resistance, SI, temperature in °C. */
export interface ShockleyDiode {
  name: string;
  saturationCurrent: number;
  emissionCoefficient: number;
  seriesResistance: number;
  temperature: number;
}

export interface CatalogueDiode {
  readonly key: string;
  readonly description: string;
  readonly diode: Readonly<ShockleyDiode>;
  readonly source: string;
  readonly grade: CatalogueGrade;
  readonly note: string;
}

const entry = (
  key: string,
  description: string,
  saturationCurrent: number,
  emissionCoefficient: number,
  seriesResistance: number,
  source: string,
  grade: CatalogueGrade,
  note = '',
): CatalogueDiode => ({
  key,
  description,
  diode: { name: key, saturationCurrent, emissionCoefficient, seriesResistance, temperature: 27 },
  source,
  grade,
  note,
});

/** Generic types by their public parameter sets. A type number stands for many sets: the one taken is named. */
export const catalogueDiodes: readonly CatalogueDiode[] = [
  entry(
    '1N4148',
    'silicon signal diode',
    2.52e-9,
    1.752,
    0.568,
    'widely distributed standard diode library set, identical in several public files',
    'P1',
  ),
  entry(
    '1N4001',
    '1 A silicon rectifier',
    1.411e-8,
    1.984,
    0.03389,
    'widely circulated set, identical in three public files',
    'P1',
    'The full set has a knee current of 94.8 A, without effect here.',
  ),
  entry(
    '1N5817',
    '1 A Schottky rectifier',
    3.17e-5,
    1.373,
    0.051,
    'widely distributed set, identical in two public files',
    'P1',
    'Other circulated sets: 3.3 µA, 1, 25 mΩ; 2.835 µA, 1, 47 mΩ.',
  ),
  entry(
    'BAT54',
    'small Schottky diode',
    2.117e-7,
    1.016,
    2.637,
    'one maker’s subcircuit set without its parallel 36 MΩ',
    'P2',
    'Sets in circulation differ from 9 nA to 200 µA: measure before relying on it.',
  ),
];
