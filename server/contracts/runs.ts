import { z } from 'zod';
import { Id, Line, OptionalLine, PersonName, Prose, SomeProse, Time, Version } from './basics';
import { Requirement, Verdict } from './requirement';
import { Offers, RunSummary } from './revisions';
import { route } from './route';

export const Reading = z.strictObject({
  id: Id,
  requirementId: Id.nullable(),
  quantity: z.string(),
  /** SI. */
  value: z.number(),
  /** Unit in which it was typed, for showing. */
  unit: z.string(),
  instrument: z.strictObject({ id: Id, number: z.string(), name: z.string() }),
  /** Why an instrument out of calibration was used; null where it was in calibration. */
  outOfCalibrationReason: z.string().nullable(),
  note: z.string(),
  by: PersonName,
  at: Time,
  struck: z.strictObject({ by: PersonName, at: Time, reason: z.string() }).nullable(),
});
export type Reading = z.infer<typeof Reading>;

/** One bench requirement of the run: limit, estimate, mean of the standing readings, margin. */
export const RunLine = z.strictObject({
  requirement: Requirement,
  estimated: z.number().nullable(),
  measured: z.number().nullable(),
  readings: z.number().int(),
  margin: z.number().nullable(),
  verdict: Verdict,
});
export type RunLine = z.infer<typeof RunLine>;

export const Run = z.strictObject({
  ...RunSummary.shape,
  revision: z.strictObject({
    id: Id,
    letter: z.string(),
    version: Version,
    designId: Id,
    designNumber: z.string(),
    designTitle: z.string(),
    digest: z.string(),
  }),
  specimen: z.string(),
  conditions: z
    .strictObject({ temperature: z.number().nullable(), humidity: z.number().nullable(), fixture: z.string() })
    .nullable(),
  lines: z.array(RunLine),
  readings: z.array(Reading),
  statement: z.string().nullable(),
  stopReason: z.string().nullable(),
  mayRecord: z.boolean(),
  whyNotRecord: z.string().nullable(),
  ...Offers.shape,
});
export type Run = z.infer<typeof Run>;

export const RunListLine = z.strictObject({
  ...RunSummary.shape,
  revision: z.strictObject({
    id: Id,
    letter: z.string(),
    designId: Id,
    designNumber: z.string(),
    designTitle: z.string(),
  }),
});
export type RunListLine = z.infer<typeof RunListLine>;

/** Revisions cleared for the bench and waiting for a run. */
export const Cleared = z.strictObject({
  revisionId: Id,
  letter: z.string(),
  designId: Id,
  designNumber: z.string(),
  designTitle: z.string(),
  since: Time,
});

export const Conditions = z.strictObject({
  /** °C */
  temperature: z.number().min(-100).max(300).nullable(),
  /** per cent */
  humidity: z.number().min(0, 'At least 0 %.').max(100, 'At most 100 %.').nullable(),
  fixture: OptionalLine,
});
export type Conditions = z.infer<typeof Conditions>;

export const ReadingCreate = z.strictObject({
  requirementId: Id.nullable(),
  quantity: Line,
  value: z.number().min(-1e15).max(1e15),
  unit: z.string().max(20),
  instrumentId: Id,
  outOfCalibrationReason: Prose.nullable(),
  note: Prose,
});
export type ReadingCreate = z.infer<typeof ReadingCreate>;

const params = z.strictObject({ runId: Id });
const readers = ['designer', 'reviewer', 'bench', 'releaseAuthority', 'administrator'] as const;
export const runRoutes = {
  listRuns: route({
    method: 'get',
    path: '/runs',
    summary: 'Runs, and revisions cleared for the bench',
    allowed: readers,
    answer: z.strictObject({ runs: z.array(RunListLine), cleared: z.array(Cleared) }),
  }),
  readRun: route({ method: 'get', path: '/runs/:runId', summary: 'One run', allowed: readers, params, answer: Run }),
  recordConditions: route({
    method: 'put',
    path: '/runs/:runId/conditions',
    summary: 'State the conditions of an open run',
    allowed: ['bench'],
    params,
    body: Conditions,
    answer: Run,
  }),
  addReading: route({
    method: 'post',
    path: '/runs/:runId/readings',
    summary: 'Enter a reading; readings are never changed, only struck through',
    allowed: ['bench'],
    params,
    body: ReadingCreate,
    status: 201,
    answer: Run,
  }),
  strikeReading: route({
    method: 'post',
    path: '/runs/:runId/readings/:readingId/strike',
    summary: 'Strike a reading through with a reason',
    allowed: ['bench'],
    params: z.strictObject({ runId: Id, readingId: Id }),
    body: z.strictObject({ reason: SomeProse }),
    answer: Run,
  }),
};
