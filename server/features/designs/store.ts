import type { Knex } from 'knex';
import type { RevisionLine } from '#contracts/designs';
import { notFound } from '../../errors';
import type { RevisionRow } from '../../way/revisions';

export interface DesignRow {
  id: string;
  number: string;
  title: string;
  brief_id: string;
  brief_number: string;
  brief_title: string;
  created_at: string;
  created_by_id: string;
}

const withBrief = (db: Knex) =>
  db('designs')
    .join('briefs', 'briefs.id', 'designs.brief_id')
    .select<DesignRow[]>(
      'designs.*',
      'briefs.number as brief_number',
      db.raw("json_extract(briefs.document, '$.title') as brief_title"),
    );

export const loadDesigns = (db: Knex): Promise<DesignRow[]> => withBrief(db).orderBy('designs.rowid', 'desc');

export async function loadDesign(db: Knex, id: string): Promise<DesignRow> {
  const [row] = await withBrief(db).where({ 'designs.id': id });
  if (row === undefined) throw notFound('This design');
  return row;
}

export type LineRow = Pick<
  RevisionRow,
  'id' | 'design_id' | 'letter' | 'state' | 'version' | 'load_power' | 'updated_at' | 'submitted_at'
>;

/** Revisions in the order in which they were drafted, without their documents. */
export const linesOf = (db: Knex, designId?: string): Promise<LineRow[]> => {
  const lines = db('revisions')
    .orderBy('rowid')
    .select<LineRow[]>('id', 'design_id', 'letter', 'state', 'version', 'load_power', 'updated_at', 'submitted_at');
  return designId === undefined ? lines : lines.where({ design_id: designId });
};

/** Documents of these revisions, canonical where there is one, else as typed. */
export async function documentsOf(db: Knex, ids: readonly string[]): Promise<Map<string, unknown>> {
  const rows = await db('revisions')
    .whereIn('id', [...ids])
    .select<{ id: string; text: string }[]>('id', db.raw('coalesce(document, draft) as text'));
  return new Map(rows.map(({ id, text }) => [id, JSON.parse(text) as unknown]));
}

export const presentLine = (row: LineRow): RevisionLine => ({
  id: row.id,
  letter: row.letter,
  state: row.state,
  version: row.version,
  loadPower: row.load_power,
  updatedAt: row.updated_at,
  submittedAt: row.submitted_at,
});
