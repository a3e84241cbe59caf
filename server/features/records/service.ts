import type { Knex } from 'knex';
import { z } from 'zod';
import type { PersonName } from '#contracts/basics';
import { Dossier } from '#contracts/records';
import type { RecordSummary, ReleaseRecord } from '#contracts/records';
import type { RevisionState } from '#workflows/revision';
import { canonicalJson, sha256 } from '../../canonical-json';
import { notFound } from '../../errors';
import { personNames } from '../people/reads';

interface RecordRow {
  id: string;
  release_number: string;
  revision_id: string;
  dossier: string;
  digest: string;
  released_at: string;
  released_by_id: string;
  letter: string;
  state: RevisionState;
  load_power: number | null;
  facts: string;
  design_id: string;
  number: string;
  title: string;
}

const withDesign = (db: Knex) =>
  db('records')
    .join('revisions', 'revisions.id', 'records.revision_id')
    .join('designs', 'designs.id', 'revisions.design_id')
    .select<RecordRow[]>(
      'records.*',
      'revisions.letter',
      'revisions.state',
      'revisions.load_power',
      'revisions.facts',
      'revisions.design_id',
      'designs.number',
      'designs.title',
    );

const summary = (row: RecordRow, names: Map<string, PersonName>): RecordSummary => ({
  id: row.id,
  releaseNumber: row.release_number,
  designId: row.design_id,
  designNumber: row.number,
  designTitle: row.title,
  letter: row.letter,
  revisionId: row.revision_id,
  state: row.state,
  releasedAt: row.released_at,
  releasedBy: names.get(row.released_by_id) ?? { id: row.released_by_id, name: '' },
  loadPower: row.load_power,
});

const namesFor = (db: Knex, rows: readonly RecordRow[]) =>
  personNames(
    db,
    rows.map(({ released_by_id }) => released_by_id),
  );

export async function listRecords(db: Knex): Promise<RecordSummary[]> {
  const rows = await withDesign(db).orderBy('records.rowid', 'desc');
  const names = await namesFor(db, rows);
  return rows.map((row) => summary(row, names));
}

const Superseding = z.looseObject({ laterReleased: z.string().nullable() });

async function recallOf(db: Knex, revisionId: string): Promise<ReleaseRecord['recall']> {
  const row = await db('signatures')
    .where({ revision_id: revisionId, event: 'recall' })
    .first<{ by_id: string; by_name: string; at: string; statement: string } | undefined>();
  return row === undefined ? null : { by: { id: row.by_id, name: row.by_name }, at: row.at, reason: row.statement };
}

/** Whether the stored text still has its digest: the text itself, and as it would be written again. */
function isIntact(text: string, digest: string): boolean {
  return sha256(text) === digest && canonicalJson(JSON.parse(text)) === text;
}

export async function readRecord(db: Knex, id: string): Promise<ReleaseRecord> {
  const [row] = await withDesign(db).where({ 'records.id': id });
  if (row === undefined) throw notFound('This record');
  const { laterReleased } = Superseding.parse(JSON.parse(row.facts));
  return {
    ...summary(row, await namesFor(db, [row])),
    dossier: Dossier.parse(JSON.parse(row.dossier)),
    digest: row.digest,
    intact: isIntact(row.dossier, row.digest),
    recall: await recallOf(db, row.revision_id),
    supersededBy: row.state === 'superseded' ? laterReleased : null,
  };
}
