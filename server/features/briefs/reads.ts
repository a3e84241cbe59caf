import type { Knex } from 'knex';
import type { BriefDocument } from '#contracts/briefs';
import { notFound } from '../../errors';
import { loadBrief, parseBrief } from './store';

export { mainTone } from './vibration-words';

export interface BriefAt {
  id: string;
  number: string;
  version: number;
  document: BriefDocument;
}

/** A brief as it stood at a version; as it stands now where `version` is null. */
export async function briefAt(db: Knex, briefId: string, version: number | null): Promise<BriefAt> {
  const { id, number, ...current } = await loadBrief(db, briefId);
  if (version === null || version === current.version) {
    return { id, number, version: current.version, document: current.document };
  }
  const kept = await db('brief_versions')
    .where({ brief_id: briefId, version })
    .first<{ document: string } | undefined>();
  if (kept === undefined) throw notFound('This version of the brief');
  return { id, number, version, document: parseBrief(kept.document) };
}
