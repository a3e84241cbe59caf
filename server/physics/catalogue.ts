import { catalogueDiodes } from './catalogue-diodes';
import type { CatalogueDiode } from './catalogue-diodes';
import { catalogueMagnets, refusedMaterials } from './catalogue-magnets';
import type { CatalogueMagnet } from './catalogue-magnets';
import { catalogueWires } from './catalogue-wires';
import type { CatalogueWire } from './catalogue-wires';

export { catalogueDiodes } from './catalogue-diodes';
export type { CatalogueDiode } from './catalogue-diodes';
export { catalogueMagnets } from './catalogue-magnets';
export type { CatalogueGrade, CatalogueMagnet } from './catalogue-magnets';
export { catalogueWires } from './catalogue-wires';
export type { CatalogueWire } from './catalogue-wires';

/** Case and spacing do not decide what somebody meant; "0.1" and "0.100" are one size. */
const normalised = (key: string): string =>
  key
    .trim()
    .toLowerCase()
    .replace(/\s+/g, ' ')
    .replace(/\b\d+\.\d+\b/g, (number) => Number(number).toFixed(3));

const indexOf = <Entry extends { readonly key: string }>(entries: readonly Entry[]): ReadonlyMap<string, Entry> =>
  new Map(entries.map((entry) => [normalised(entry.key), entry]));

const magnets = indexOf(catalogueMagnets);
const wires = indexOf(catalogueWires);
const diodes = indexOf(catalogueDiodes);

/** A magnet material by its key, as "NdFeB N42"; undefined where the catalogue has none of that name. */
export const catalogueMagnet = (key: string): CatalogueMagnet | undefined => magnets.get(normalised(key));

/** A wire by its key, as "IEC 0.100 grade 1" or "AWG 38 single". */
export const catalogueWire = (key: string): CatalogueWire | undefined => wires.get(normalised(key));

/** A diode by its key, as "1N4148". */
export const catalogueDiode = (key: string): CatalogueDiode | undefined => diodes.get(normalised(key));

/** Why a material cannot be computed by this model; undefined where it can. */
export const refusedMaterial = (name: string): string | undefined =>
  refusedMaterials.find(({ pattern }) => pattern.test(name))?.reason;
