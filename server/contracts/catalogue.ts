import { z } from 'zod';
import { route } from './route';

const Property = z.strictObject({ label: z.string(), value: z.number().nullable(), dimension: z.string() });
export const CatalogueEntry = z.strictObject({
  /** Key as it stands in a design document, e.g. “NdFeB N42”. */
  key: z.string(),
  kind: z.enum(['magnetMaterial', 'wire', 'diode']),
  properties: z.array(Property),
  source: z.string(),
});
export type CatalogueEntry = z.infer<typeof CatalogueEntry>;

export const catalogueRoutes = {
  readCatalogue: route({
    method: 'get',
    path: '/catalogue',
    summary: 'Magnet materials, wires and diodes with their source',
    allowed: ['designer', 'reviewer', 'bench', 'releaseAuthority', 'administrator'],
    answer: z.strictObject({ entries: z.array(CatalogueEntry) }),
  }),
};
