import { z } from 'zod';
import { Id, Line, OptionalLine, PersonName, Prose, Time, Version } from './basics';
import { Requirement } from './requirement';
import { route } from './route';

const range = (least: number, most: number, unit: string) =>
  z.number().min(least, `At least ${least} ${unit}.`).max(most, `At most ${most} ${unit}.`);
const Length = range(1e-4, 2, 'm');

/** Space the generator may take. */
export const Envelope = z.discriminatedUnion('shape', [
  z.strictObject({ shape: z.literal('cylinder'), diameter: Length, length: Length }),
  z.strictObject({ shape: z.literal('box'), size: z.tuple([Length, Length, Length]) }),
]);
export type Envelope = z.infer<typeof Envelope>;

export const Orientation = z.enum(['horizontal', 'vertical', 'any']);

/** What is asked for. Figures in SI, temperatures in °C; the vibration is a `tremolode-vibration/1` document. */
export const BriefDocument = z.strictObject({
  title: Line,
  machine: OptionalLine,
  place: OptionalLine,
  customerContact: OptionalLine,
  vibration: z.unknown(),
  powerNeeded: range(1e-9, 1e3, 'W'),
  loadNote: OptionalLine,
  envelope: Envelope,
  massLimit: range(1e-4, 100, 'kg').nullable(),
  temperature: z
    .strictObject({ lowest: range(-100, 300, '°C'), highest: range(-100, 300, '°C') })
    .refine(({ lowest, highest }) => lowest <= highest, {
      path: ['highest'],
      message: 'The highest temperature is below the lowest.',
    }),
  lifeCycles: range(1, 1e15, 'cycles').nullable(),
  orientation: Orientation,
  requirements: z.array(Requirement).max(100, 'At most 100 requirements.'),
  notes: Prose,
});
export type BriefDocument = z.infer<typeof BriefDocument>;

export const BriefSummary = z.strictObject({
  id: Id,
  number: z.string(),
  title: z.string(),
  machine: z.string(),
  powerNeeded: z.number(),
  vibrationInWords: z.string(),
  designs: z.number().int(),
  version: Version,
  updatedAt: Time,
  updatedBy: PersonName,
});
export type BriefSummary = z.infer<typeof BriefSummary>;

export const Brief = z.strictObject({
  id: Id,
  number: z.string(),
  version: Version,
  document: BriefDocument,
  /** The vibration in one line, e.g. “50.0 Hz, 1.00 m/s² peak”. */
  vibrationInWords: z.string(),
  createdAt: Time,
  createdBy: PersonName,
  updatedAt: Time,
  updatedBy: PersonName,
  designs: z.array(z.strictObject({ id: Id, number: z.string(), title: z.string() })),
  mayEdit: z.boolean(),
  whyNotEdit: z.string().nullable(),
});
export type Brief = z.infer<typeof Brief>;

const params = z.strictObject({ briefId: Id });
const readers = ['designer', 'reviewer', 'bench', 'releaseAuthority', 'administrator'] as const;
export const briefRoutes = {
  listBriefs: route({
    method: 'get',
    path: '/briefs',
    summary: 'All briefs',
    allowed: readers,
    answer: z.strictObject({ briefs: z.array(BriefSummary), mayCreate: z.boolean() }),
  }),
  createBrief: route({
    method: 'post',
    path: '/briefs',
    summary: 'Write a brief',
    allowed: ['designer'],
    body: BriefDocument,
    status: 201,
    answer: Brief,
  }),
  readBrief: route({
    method: 'get',
    path: '/briefs/:briefId',
    summary: 'One brief',
    allowed: readers,
    params,
    answer: Brief,
  }),
  changeBrief: route({
    method: 'put',
    path: '/briefs/:briefId',
    summary: 'Change a brief; submitted revisions keep the version they were submitted with',
    allowed: ['designer'],
    params,
    body: z.strictObject({ version: Version, document: BriefDocument }),
    answer: Brief,
  }),
};
