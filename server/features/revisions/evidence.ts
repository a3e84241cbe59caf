import type { Knex } from 'knex';
import type { PersonName } from '#contracts/basics';
import type { Remark, Signature } from '#contracts/revisions';
import { canonicalJson, sha256 } from '../../canonical-json';
import type { StoredRevision } from '../../way/revisions';
import { designOf } from '../../way/step';
import { briefAt } from '../briefs/reads';
import type { BriefAt } from '../briefs/reads';
import { personNames } from '../people/reads';
import { runsOfRevision } from '../runs/reads';
import type { StoredRun } from '../runs/reads';

interface RemarkRow {
  id: string;
  revision_id: string;
  by_id: string;
  at: string;
  text: string;
  blocking: number;
  target: string | null;
  closed_by_id: string | null;
  closed_at: string | null;
  answer: string | null;
}

interface SignatureRow {
  id: string;
  revision_id: string;
  by_id: string;
  by_name: string;
  at: string;
  event: Signature['event'];
  meaning: string;
  statement: string;
  digest: string;
}

/** Everything that people decide on. */
export interface Evidence {
  revision: StoredRevision;
  design: { id: string; number: string; title: string };
  brief: BriefAt;
  authors: PersonName[];
  remarks: Remark[];
  signatures: Signature[];
  runs: StoredRun[];
}

const nobody = { id: '', name: '' };

export async function remarksOf(db: Knex, revisionId: string): Promise<Remark[]> {
  const rows = await db<RemarkRow>('remarks').where({ revision_id: revisionId }).orderBy('rowid');
  const names = await personNames(
    db,
    rows.flatMap(({ by_id, closed_by_id }) => [by_id, closed_by_id]),
  );
  return rows.map((row) => ({
    id: row.id,
    by: names.get(row.by_id) ?? nobody,
    at: row.at,
    text: row.text,
    blocking: row.blocking === 1,
    target: row.target,
    closed:
      row.closed_by_id === null || row.closed_at === null
        ? null
        : { by: names.get(row.closed_by_id) ?? nobody, at: row.closed_at, answer: row.answer ?? '' },
  }));
}

export async function signaturesOf(db: Knex, revisionId: string): Promise<Signature[]> {
  const rows = await db<SignatureRow>('signatures').where({ revision_id: revisionId }).orderBy('rowid');
  return rows.map(({ id, by_id, by_name, at, event, meaning, statement, digest }) => ({
    id,
    by: { id: by_id, name: by_name },
    at,
    event,
    meaning,
    statement,
    digest,
  }));
}

async function authorsOf(db: Knex, revisionId: string): Promise<PersonName[]> {
  return db('revision_authors')
    .join('people', 'people.id', 'revision_authors.person_id')
    .where({ revision_id: revisionId })
    .orderBy('revision_authors.rowid')
    .select<PersonName[]>('people.id', 'people.name');
}

export async function evidenceOf(db: Knex, revision: StoredRevision): Promise<Evidence> {
  return {
    revision,
    design: await designOf(db, revision.designId),
    brief: await briefAt(db, revision.briefId, revision.briefVersion),
    authors: await authorsOf(db, revision.id),
    remarks: await remarksOf(db, revision.id),
    signatures: await signaturesOf(db, revision.id),
    runs: await runsOfRevision(db, revision.id),
  };
}

/** SHA-256 over all of it as it stands: what a signature signs. The way itself (state, version) is not part of it. */
export function digestOf({ revision, design, brief, authors, remarks, signatures, runs }: Evidence): string {
  return sha256(
    canonicalJson({
      revision: { id: revision.id, design: design.number, letter: revision.letter },
      brief: { number: brief.number, version: brief.version, document: brief.document },
      document: revision.document ?? revision.draft,
      documentDigest: revision.documentDigest,
      estimate: revision.estimateDigest,
      authors: authors.map(({ id }) => id),
      remarks,
      signatures,
      runs,
    }),
  );
}
