import { z } from 'zod';

/** Words of the way of a revision. Plain data: the database, the API, the chart and the screens all take them from here. */

export const revisionStates = [
  'draft',
  'inReview',
  'changesRequested',
  'clearedForBench',
  'onBench',
  'nonconforming',
  'releaseReview',
  'released',
  'superseded',
  'recalled',
  'reworked',
  'abandoned',
] as const;
export const RevisionState = z.enum(revisionStates);
export type RevisionState = z.infer<typeof RevisionState>;

export const stateWords: Record<RevisionState, string> = {
  draft: 'Draft',
  inReview: 'In review',
  changesRequested: 'Changes requested',
  clearedForBench: 'Cleared for bench',
  onBench: 'On the bench',
  nonconforming: 'Nonconforming',
  releaseReview: 'Release review',
  released: 'Released',
  superseded: 'Superseded',
  recalled: 'Recalled',
  reworked: 'Reworked as a later revision',
  abandoned: 'Abandoned',
};

export const eventTypes = [
  'submit',
  'remark',
  'closeRemark',
  'approve',
  'requestChanges',
  'rework',
  'startRun',
  'stopRun',
  'signResult',
  'retest',
  'grantConcession',
  'returnToBench',
  'release',
  'supersede',
  'recall',
  'abandon',
] as const;
export const RevisionEventType = z.enum(eventTypes);
export type RevisionEventType = z.infer<typeof RevisionEventType>;

/** Label of the button that sends the event: a verb. */
export const eventWords: Record<RevisionEventType, string> = {
  submit: 'Submit for review',
  remark: 'Add a remark',
  closeRemark: 'Close remark',
  approve: 'Approve',
  requestChanges: 'Request changes',
  rework: 'Start the next revision',
  startRun: 'Start a run',
  stopRun: 'Stop the run without a result',
  signResult: 'Sign the result',
  retest: 'Test again',
  grantConcession: 'Grant a concession',
  returnToBench: 'Return to the bench',
  release: 'Sign and release',
  supersede: 'Mark as superseded',
  recall: 'Recall',
  abandon: 'Abandon',
};

/** Events that are signatures: the person re-enters the password and the meaning is kept in words. */
export const signedEvents = ['approve', 'signResult', 'grantConcession', 'release', 'recall'] as const;
export type SignedEvent = (typeof signedEvents)[number];

export const signatureMeaning: Record<SignedEvent, string> = {
  approve: 'I have reviewed this revision and approve it for the bench.',
  signResult: 'These readings were taken as stated and this is the result.',
  grantConcession: 'I permit this revision to go on with the shortfall named here.',
  release: 'I have weighed the evidence and release this revision.',
  recall: 'I recall this release for the reason stated.',
};

/** What a signature did, after the person's name. */
export const signedWords: Record<SignedEvent, string> = {
  approve: 'approved',
  signResult: 'signed the result',
  grantConcession: 'granted a concession',
  release: 'released',
  recall: 'recalled',
};
/** A signature is kept with its event's name; only signed events ever have one. */
export const signedWordsOf = (event: RevisionEventType): string =>
  event in signedWords ? signedWords[event as SignedEvent] : eventWords[event].toLowerCase();

export const roles = ['designer', 'reviewer', 'bench', 'releaseAuthority', 'administrator', 'observer'] as const;
export const Role = z.enum(roles);
export type Role = z.infer<typeof Role>;

export const roleWords: Record<Role, string> = {
  designer: 'designer',
  reviewer: 'reviewer',
  bench: 'bench',
  releaseAuthority: 'release authority',
  administrator: 'administrator',
  observer: 'observer',
};

export const RunResult = z.enum(['conforming', 'nonconforming']);
export type RunResult = z.infer<typeof RunResult>;

/** The person who acts, set by the server from the session; never taken from a request. */
export const Actor = z.strictObject({ id: z.string(), roles: z.array(Role) });
export type Actor = z.infer<typeof Actor>;

/**
 * What the rules need to know of a revision. Stored with it as JSON and kept in step by the machine's own actions; the
 * facts that other parts own (remarks, runs, the estimate) are written in the same transaction as their change.
 */
export const RevisionFacts = z.strictObject({
  /** Everyone who created, saved or submitted this revision or an earlier one it was drafted from. */
  authorIds: z.array(z.string()),
  /** Reasons why the draft cannot be submitted, in words; empty when it can (document, estimate, brief). */
  submitObstacles: z.array(z.string()),
  approvalsNeeded: z.number().int().min(1),
  approvedBy: z.array(z.string()),
  openBlockingRemarks: z.number().int().min(0),
  /** Open remarks of any kind. */
  openRemarkIds: z.array(z.string()),
  openRunId: z.string().nullable(),
  openRunStartedBy: z.string().nullable(),
  /** Requirements to be shown on the bench that have no standing reading yet, in words. */
  missingReadings: z.array(z.string()),
  /** Whether the standing readings of the open run meet every bench requirement; null when not all are read. */
  readingsMeet: z.boolean().nullable(),
  lastResult: RunResult.nullable(),
  concessionGranted: z.boolean(),
  /** Letter of a later released revision of the same design, which may supersede this one. */
  laterReleased: z.string().nullable(),
  /** Letter of the revision drafted from this one and not abandoned. */
  continuedAs: z.string().nullable(),
});
export type RevisionFacts = z.infer<typeof RevisionFacts>;
