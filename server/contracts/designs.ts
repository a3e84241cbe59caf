import { z } from 'zod';
import { RevisionState } from '#workflows/revision';
import { Id, Line, PersonName, Time, Version } from './basics';
import { DraftDocument } from './revisions';
import { route } from './route';

export const RevisionLine = z.strictObject({
  id: Id,
  letter: z.string(),
  state: RevisionState,
  version: Version,
  loadPower: z.number().nullable(),
  updatedAt: Time,
  submittedAt: Time.nullable(),
});
export type RevisionLine = z.infer<typeof RevisionLine>;

export const DesignSummary = z.strictObject({
  id: Id,
  number: z.string(),
  title: z.string(),
  brief: z.strictObject({ id: Id, number: z.string(), title: z.string() }),
  latest: RevisionLine,
  /** The latest revision's document, for the small aligned strip. */
  document: z.unknown(),
  createdBy: PersonName,
  updatedAt: Time,
});
export type DesignSummary = z.infer<typeof DesignSummary>;

export const Design = z.strictObject({
  id: Id,
  number: z.string(),
  title: z.string(),
  brief: z.strictObject({ id: Id, number: z.string(), title: z.string() }),
  createdAt: Time,
  createdBy: PersonName,
  revisions: z.array(RevisionLine),
});
export type Design = z.infer<typeof Design>;

export const DesignCreate = z.strictObject({
  title: Line,
  briefId: Id,
  /** Where absent, a starting point tuned to the brief's tone is made. */
  document: DraftDocument.optional(),
});
export type DesignCreate = z.infer<typeof DesignCreate>;

const params = z.strictObject({ designId: Id });
const readers = ['designer', 'reviewer', 'bench', 'releaseAuthority', 'administrator'] as const;
export const designRoutes = {
  listDesigns: route({
    method: 'get',
    path: '/designs',
    summary: 'All designs with their latest revision',
    allowed: readers,
    answer: z.strictObject({ designs: z.array(DesignSummary), mayCreate: z.boolean() }),
  }),
  createDesign: route({
    method: 'post',
    path: '/designs',
    summary: 'Start a design for a brief, with revision A as a draft',
    allowed: ['designer'],
    body: DesignCreate,
    status: 201,
    answer: Design,
  }),
  readDesign: route({
    method: 'get',
    path: '/designs/:designId',
    summary: 'One design and its revisions; observers see released ones only',
    allowed: [...readers, 'observer'],
    params,
    answer: Design,
  }),
};
