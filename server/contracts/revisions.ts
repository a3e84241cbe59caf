import { z } from 'zod';
import { RevisionEventType, RevisionState, RunResult } from '#workflows/revision';
import { Id, Line, PersonName, Prose, SomeProse, Time, Version } from './basics';
import { BriefDocument } from './briefs';
import { Issue } from './error';
import { Estimate } from './estimates';
import { route } from './route';

export const Offers = z.strictObject({
  availableEvents: z.array(RevisionEventType),
  /** For events that belong to this state but are refused: why, in words. */
  whyNot: z.partialRecord(RevisionEventType, z.string()),
});
export type Offers = z.infer<typeof Offers>;

export const Remark = z.strictObject({
  id: Id,
  by: PersonName,
  at: Time,
  text: z.string(),
  blocking: z.boolean(),
  /** Path of the value or result it is about, e.g. `magnets.0.length`; null for the whole. */
  target: z.string().nullable(),
  closed: z.strictObject({ by: PersonName, at: Time, answer: z.string() }).nullable(),
});
export type Remark = z.infer<typeof Remark>;

export const Signature = z.strictObject({
  id: Id,
  by: PersonName,
  at: Time,
  event: RevisionEventType,
  meaning: z.string(),
  statement: z.string(),
  /** SHA-256 of exactly what was signed. */
  digest: z.string(),
});
export type Signature = z.infer<typeof Signature>;

export const RunSummary = z.strictObject({
  id: Id,
  number: z.string(),
  state: z.enum(['open', 'signed', 'stopped']),
  result: RunResult.nullable(),
  startedAt: Time,
  startedBy: PersonName,
  closedAt: Time.nullable(),
});
export type RunSummary = z.infer<typeof RunSummary>;

export const Activity = z.strictObject({ at: Time, by: PersonName.nullable(), sentence: z.string() });
export type Activity = z.infer<typeof Activity>;

export const Revision = z.strictObject({
  id: Id,
  letter: z.string(),
  design: z.strictObject({ id: Id, number: z.string(), title: z.string() }),
  brief: z.strictObject({ id: Id, number: z.string(), version: Version, document: BriefDocument }),
  state: RevisionState,
  version: Version,
  /** While draft: as typed. Once submitted: canonical and frozen. */
  document: z.unknown(),
  documentDigest: z.string().nullable(),
  documentIssues: z.array(Issue),
  /** The estimate stored at submission; null while draft. */
  estimate: Estimate.nullable(),
  /** SHA-256 over document, estimate, brief and evidence as they stand: what a signature would sign now. */
  digest: z.string(),
  authors: z.array(PersonName),
  createdAt: Time,
  updatedAt: Time,
  submittedAt: Time.nullable(),
  remarks: z.array(Remark),
  signatures: z.array(Signature),
  approvalsNeeded: z.number().int(),
  runs: z.array(RunSummary),
  /** Letter of the revision drafted from this one. */
  continuedAs: z.string().nullable(),
  continuedFrom: z.string().nullable(),
  recordId: Id.nullable(),
  activity: z.array(Activity),
  mayEdit: z.boolean(),
  whyNotEdit: z.string().nullable(),
  ...Offers.shape,
});
export type Revision = z.infer<typeof Revision>;

const password = z.string().min(1, 'Give your password to sign.').max(1000);
const version = Version;
/** The digest shown before signing; refused when anything changed since. */
const signedDigest = z.string().length(64, 'A digest has 64 characters.');
const reason = SomeProse;

/** An event as sent by a person. The actor comes from the session. `version` is the revision's version on the page. */
export const SendEvent = z.discriminatedUnion('type', [
  z.strictObject({ type: z.literal('submit'), version, note: Prose.optional() }),
  z.strictObject({
    type: z.literal('remark'),
    version,
    text: SomeProse,
    blocking: z.boolean(),
    target: z.string().max(200).nullable(),
  }),
  z.strictObject({ type: z.literal('closeRemark'), version, remarkId: Id, answer: SomeProse }),
  z.strictObject({ type: z.literal('approve'), version, password, signedDigest, note: Prose.optional() }),
  z.strictObject({ type: z.literal('requestChanges'), version, reason }),
  z.strictObject({ type: z.literal('rework'), version, reason }),
  z.strictObject({ type: z.literal('startRun'), version, specimen: Line }),
  z.strictObject({ type: z.literal('stopRun'), version, reason }),
  z.strictObject({
    type: z.literal('signResult'),
    version,
    result: RunResult,
    statement: SomeProse,
    password,
    signedDigest,
  }),
  z.strictObject({ type: z.literal('retest'), version, reason }),
  z.strictObject({ type: z.literal('grantConcession'), version, shortfall: SomeProse, reason, password, signedDigest }),
  z.strictObject({ type: z.literal('returnToBench'), version, reason }),
  z.strictObject({ type: z.literal('release'), version, statement: Prose, password, signedDigest }),
  z.strictObject({ type: z.literal('supersede'), version, reason }),
  z.strictObject({ type: z.literal('recall'), version, reason, password, signedDigest }),
  z.strictObject({ type: z.literal('abandon'), version, reason }),
]);
export type SendEvent = z.infer<typeof SendEvent>;

/** A draft as typed: any JSON object up to 256 kB, saved even while it has faults; the faults come back as issues. */
export const DraftDocument = z.record(z.string(), z.unknown());
export const SaveDraft = z.strictObject({ version: Version, document: DraftDocument });
export type SaveDraft = z.infer<typeof SaveDraft>;

const params = z.strictObject({ revisionId: Id });
const readers = ['designer', 'reviewer', 'bench', 'releaseAuthority', 'administrator'] as const;
export const revisionRoutes = {
  readRevision: route({
    method: 'get',
    path: '/revisions/:revisionId',
    summary: 'One revision with everything on its page',
    allowed: [...readers, 'observer'],
    params,
    answer: Revision,
  }),
  saveDraft: route({
    method: 'put',
    path: '/revisions/:revisionId/document',
    summary: 'Save the draft document',
    allowed: ['designer'],
    params,
    body: SaveDraft,
    answer: Revision,
  }),
  sendEvent: route({
    method: 'post',
    path: '/revisions/:revisionId/events',
    summary: 'Take a step of the way',
    allowed: ['designer', 'reviewer', 'bench', 'releaseAuthority'],
    params,
    body: SendEvent,
    answer: Revision,
  }),
};
