import { z } from 'zod';
import { RevisionState } from '#workflows/revision';
import { Id, PersonName, Time } from './basics';
import { BriefDocument } from './briefs';
import { Estimate } from './estimates';
import { Reading, RunLine } from './runs';
import { Remark, RunSummary, Signature } from './revisions';
import { route } from './route';

/** Everything the release rests on, as it stood when it was signed. */
export const Dossier = z.strictObject({
  releaseNumber: z.string(),
  design: z.strictObject({ number: z.string(), title: z.string(), letter: z.string() }),
  brief: z.strictObject({ number: z.string(), version: z.number().int(), document: BriefDocument }),
  document: z.unknown(),
  documentDigest: z.string(),
  estimate: Estimate,
  authors: z.array(PersonName),
  remarks: z.array(Remark),
  signatures: z.array(Signature),
  runs: z.array(
    z.strictObject({
      ...RunSummary.shape,
      specimen: z.string(),
      lines: z.array(RunLine),
      readings: z.array(Reading),
      statement: z.string().nullable(),
    }),
  ),
});
export type Dossier = z.infer<typeof Dossier>;

export const RecordSummary = z.strictObject({
  id: Id,
  releaseNumber: z.string(),
  designId: Id,
  designNumber: z.string(),
  designTitle: z.string(),
  letter: z.string(),
  revisionId: Id,
  state: RevisionState,
  releasedAt: Time,
  releasedBy: PersonName,
  loadPower: z.number().nullable(),
});
export type RecordSummary = z.infer<typeof RecordSummary>;

export const ReleaseRecord = z.strictObject({
  ...RecordSummary.shape,
  dossier: Dossier,
  /** SHA-256 of the dossier's canonical JSON. */
  digest: z.string(),
  intact: z.boolean(),
  recall: z.strictObject({ by: PersonName, at: Time, reason: z.string() }).nullable(),
  supersededBy: z.string().nullable(),
});
export type ReleaseRecord = z.infer<typeof ReleaseRecord>;

export const recordRoutes = {
  listRecords: route({
    method: 'get',
    path: '/records',
    summary: 'Releases',
    allowed: 'signedIn',
    answer: z.strictObject({ records: z.array(RecordSummary) }),
  }),
  readRecord: route({
    method: 'get',
    path: '/records/:recordId',
    summary: 'One release with its dossier',
    allowed: 'signedIn',
    params: z.strictObject({ recordId: Id }),
    answer: ReleaseRecord,
  }),
};
