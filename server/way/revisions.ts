import type { Knex } from 'knex';
import { z } from 'zod';
import { Issue } from '#contracts/error';
import { Estimate } from '#contracts/estimates';
import { RevisionFacts } from '#workflows/revision';
import type { Actor, RevisionState } from '#workflows/revision';
import { sha256 } from '../canonical-json';
import { conflict, notFound } from '../errors';

/** A row of `revisions`. Features read rows through `loadRevision` and change them through the steps of the way. */
export interface RevisionRow {
  id: string;
  design_id: string;
  brief_id: string;
  letter: string;
  state: RevisionState;
  state_since: string;
  version: number;
  facts: string;
  draft: string;
  document_issues: string;
  document: string | null;
  document_digest: string | null;
  estimate: string | null;
  load_power: number | null;
  brief_version: number | null;
  submitted_at: string | null;
  submitted_by_id: string | null;
  continued_from_id: string | null;
  created_at: string;
  created_by_id: string;
  updated_at: string;
}

export interface StoredRevision {
  id: string;
  designId: string;
  briefId: string;
  letter: string;
  state: RevisionState;
  version: number;
  facts: RevisionFacts;
  /** As typed; of a submitted revision, as it was typed when it was submitted. */
  draft: Record<string, unknown>;
  documentIssues: Issue[];
  /** Canonical and frozen; null before submission, like everything that submission freezes. */
  document: unknown;
  documentDigest: string | null;
  estimate: Estimate | null;
  /** SHA-256 of the estimate as it is stored. */
  estimateDigest: string | null;
  briefVersion: number | null;
  submittedAt: string | null;
  continuedFromId: string | null;
  createdAt: string;
  updatedAt: string;
}

const Draft = z.record(z.string(), z.unknown());
const Issues = z.array(Issue);
const json = (text: string): unknown => JSON.parse(text);

const parsed = (row: RevisionRow): StoredRevision => ({
  id: row.id,
  designId: row.design_id,
  briefId: row.brief_id,
  letter: row.letter,
  state: row.state,
  version: row.version,
  facts: RevisionFacts.parse(json(row.facts)),
  draft: Draft.parse(json(row.draft)),
  documentIssues: Issues.parse(json(row.document_issues)),
  document: row.document === null ? null : json(row.document),
  documentDigest: row.document_digest,
  estimate: row.estimate === null ? null : Estimate.parse(json(row.estimate)),
  estimateDigest: row.estimate === null ? null : sha256(row.estimate),
  briefVersion: row.brief_version,
  submittedAt: row.submitted_at,
  continuedFromId: row.continued_from_id,
  createdAt: row.created_at,
  updatedAt: row.updated_at,
});

/** Throws notFound where there is none. */
export async function loadRevision(db: Knex, id: string): Promise<StoredRevision> {
  const row = await db<RevisionRow>('revisions').where({ id }).first();
  if (row === undefined) throw notFound('This revision');
  return parsed(row);
}

const statesForEverybody: readonly RevisionState[] = ['released', 'superseded', 'recalled'];

/** Those who only observe see what was released; to them nothing else exists. */
export const maySee = ({ roles }: Actor, state: RevisionState): boolean =>
  statesForEverybody.includes(state) || roles.some((role) => role !== 'observer');

/** Releases read by people who see nothing else. */
export const seenStates = (actor: Actor): readonly RevisionState[] | 'all' =>
  maySee(actor, 'draft') ? 'all' : statesForEverybody;

/** Columns that a step may set besides state and facts. */
export type Submission = Pick<
  RevisionRow,
  | 'document'
  | 'document_digest'
  | 'document_issues'
  | 'estimate'
  | 'load_power'
  | 'brief_version'
  | 'submitted_at'
  | 'submitted_by_id'
>;
export type DraftChange = Pick<RevisionRow, 'draft' | 'document_issues'>;

/** Stores the outcome of a step; nothing but the version that was read may be overwritten. Returns the new version. */
export async function storeRevision(
  trx: Knex.Transaction,
  read: StoredRevision,
  next: { state: RevisionState; facts: RevisionFacts },
  at: string,
  columns: Partial<Submission & DraftChange> = {},
): Promise<number> {
  const version = read.version + 1;
  const changed = await trx<RevisionRow>('revisions')
    .where({ id: read.id, version: read.version })
    .update({
      ...columns,
      state: next.state,
      facts: JSON.stringify(RevisionFacts.parse(next.facts)),
      version,
      updated_at: at,
      ...(next.state === read.state ? {} : { state_since: at }),
    });
  if (changed !== 1) throw conflict('This revision was changed meanwhile.');
  return version;
}

export async function addAuthors(
  trx: Knex.Transaction,
  revisionId: string,
  personIds: readonly string[],
  at: string,
): Promise<void> {
  for (const person_id of personIds) {
    await trx('revision_authors')
      .insert({ revision_id: revisionId, person_id, since: at })
      .onConflict(['revision_id', 'person_id'])
      .ignore();
  }
}
