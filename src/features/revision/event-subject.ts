import type { ReactNode } from 'react';
import type { Revision } from '#contracts/revisions';
import type { RevisionEventType, RevisionState, RunResult } from '#workflows/revision';
import type { Choice } from '../../ui/select';

/** What a step is taken on: a revision, or a run of it, as the server last told it. */
export interface EventSubject {
  revisionId: string;
  /** Short name, e.g. “FN-014 B”. */
  name: string;
  state: RevisionState;
  version: number;
  /** What a signature would sign now. */
  digest: string;
  availableEvents: RevisionEventType[];
  whyNot: Partial<Record<RevisionEventType, string>>;
  /** Values and results a remark can be tied to. */
  targets?: readonly Choice[];
  /** Result that the readings speak for; null where they are not complete. */
  readingsSay?: RunResult | null;
  /** Facts worth seeing before the step is taken, per event. */
  facts?: Partial<Record<RevisionEventType, ReactNode>>;
}

/** Finishes what is pending on the page (an autosave) and answers the revision as it then stands; its version is sent. */
export type BeforeSend = () => Promise<Revision>;
