import { z } from 'zod';
import { refusedMaterial } from './catalogue';
import { refuse } from './document-schema';

/** Name of a material, wire or diode; a catalogue key where it came from there. */
export const partName = z.string().max(120).default('as stated');

/** Puts the catalogue's properties in the place of a key; anything else passes on to the schema. */
export function fromCatalogue<Inner extends z.ZodType>(
  kind: string,
  example: string,
  find: (key: string) => object | undefined,
  inner: Inner,
) {
  return z.preprocess((input, context): unknown => {
    if (typeof input !== 'string') return input;
    const found = find(input);
    if (found) return found;
    const refused = refusedMaterial(input);
    refuse(
      context,
      refused ??
        `the catalogue has no ${kind} “${input.slice(0, 60)}”; a key looks like ${example}, or state the properties`,
    );
    return z.NEVER;
  }, inner);
}
