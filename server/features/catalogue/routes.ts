import type { CatalogueEntry } from '#contracts/catalogue';
import type { Dimension } from '#physics/quantity';
import { catalogueDiodes, catalogueMagnets, catalogueWires } from '#physics/catalogue';
import type { CatalogueDiode, CatalogueGrade, CatalogueMagnet, CatalogueWire } from '#physics/catalogue';
import type { Handlers } from '../../http/handlers';

const known: Record<CatalogueGrade, string> = {
  P1: 'two sources agree',
  P2: 'one source',
  P3: 'not checked against a source',
};
/** Where an entry comes from, how well it is known, and what to beware of, in one text. */
const sourced = ({ source, grade, note = '' }: { source: string; grade: CatalogueGrade; note?: string }): string =>
  [`${source} (${known[grade]})`, note].filter((part) => part !== '').join('. ');

const property = (label: string, value: number | null, dimension: Dimension) => ({ label, value, dimension });

const magnetEntry = (magnet: CatalogueMagnet): CatalogueEntry => {
  const { material, remanenceRange } = magnet;
  return {
    key: magnet.key,
    kind: 'magnetMaterial',
    properties: [
      property('Remanence at 20 °C', material.remanence, 'fluxDensity'),
      property('Remanence, lowest', remanenceRange[0], 'fluxDensity'),
      property('Remanence, highest', remanenceRange[1], 'fluxDensity'),
      property('Recoil permeability', material.recoilPermeability, 'number'),
      property('Remanence over temperature', material.remanencePerKelvin, 'perKelvin'),
      property('Intrinsic coercivity, least', material.intrinsicCoercivity, 'fieldStrength'),
      property('Coercivity over temperature', material.intrinsicCoercivityPerKelvin, 'perKelvin'),
      property('Density', material.density, 'density'),
      property('Highest temperature', material.maxTemperature, 'temperature'),
    ],
    source: sourced(magnet),
  };
};

const wireEntry = (wire: CatalogueWire): CatalogueEntry => ({
  key: wire.key,
  kind: 'wire',
  properties: [
    property('Copper diameter', wire.diameter, 'length'),
    property('Overall diameter, largest', wire.overallDiameter, 'length'),
  ],
  source: sourced(wire),
});

const diodeEntry = (entry: CatalogueDiode): CatalogueEntry => ({
  key: entry.key,
  kind: 'diode',
  properties: [
    property('Saturation current', entry.diode.saturationCurrent, 'current'),
    property('Emission coefficient', entry.diode.emissionCoefficient, 'number'),
    property('Series resistance', entry.diode.seriesResistance, 'resistance'),
    property('Stated at', entry.diode.temperature, 'temperature'),
  ],
  source: sourced(entry),
});

/** The whole catalogue; it changes with the program only. */
const entries: CatalogueEntry[] = [
  ...catalogueMagnets.map(magnetEntry),
  ...catalogueWires.map(wireEntry),
  ...catalogueDiodes.map(diodeEntry),
];

export const catalogueHandlers = (): Pick<Handlers, 'readCatalogue'> => ({
  readCatalogue: () => Promise.resolve({ entries }),
});
