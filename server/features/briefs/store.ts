import type { Knex } from 'knex';
import { BriefDocument } from '#contracts/briefs';
import { notFound } from '../../errors';

export interface BriefRow {
  id: string;
  number: string;
  version: number;
  document: string;
  created_at: string;
  created_by_id: string;
  updated_at: string;
  updated_by_id: string;
}

export interface StoredBrief extends Omit<BriefRow, 'document'> {
  document: BriefDocument;
}

export const parseBrief = (text: string): BriefDocument => BriefDocument.parse(JSON.parse(text));

const parsed = (row: BriefRow): StoredBrief => ({ ...row, document: parseBrief(row.document) });

export async function loadBrief(db: Knex, id: string): Promise<StoredBrief> {
  const row = await db<BriefRow>('briefs').where({ id }).first();
  if (row === undefined) throw notFound('This brief');
  return parsed(row);
}

export const loadBriefs = async (db: Knex): Promise<StoredBrief[]> =>
  (await db<BriefRow>('briefs').orderBy('number')).map(parsed);

/** Writes the brief as it stands and keeps this version of it for good. */
export async function storeBrief(trx: Knex.Transaction, { document, ...row }: StoredBrief): Promise<void> {
  const text = JSON.stringify(document);
  if (row.version === 1) await trx<BriefRow>('briefs').insert({ ...row, document: text });
  else
    await trx<BriefRow>('briefs')
      .where({ id: row.id, version: row.version - 1 })
      .update({ ...row, document: text });
  await trx('brief_versions').insert({
    brief_id: row.id,
    version: row.version,
    document: text,
    at: row.updated_at,
    by_id: row.updated_by_id,
  });
}

interface DesignOfBrief {
  id: string;
  number: string;
  title: string;
}

export const designsOfBrief = (db: Knex, briefId: string): Promise<DesignOfBrief[]> =>
  db('designs').where({ brief_id: briefId }).orderBy('number').select<DesignOfBrief[]>('id', 'number', 'title');

export async function designCounts(db: Knex): Promise<Map<string, number>> {
  const rows = await db('designs')
    .groupBy('brief_id')
    .select<{ brief_id: string; count: number }[]>('brief_id')
    .count({ count: '*' });
  return new Map((rows as { brief_id: string; count: number }[]).map(({ brief_id, count }) => [brief_id, count]));
}
