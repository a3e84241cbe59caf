import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { Brief, BriefDocument, BriefSummary } from '#contracts/briefs';
import type { Change } from '#contracts/error';
import { readVibrationDocument } from '#physics/vibration-document';
import type { Actor } from '#workflows/revision';
import type { Deps } from '../../app';
import { appendAudit } from '../../audit';
import { canonicalJson } from '../../canonical-json';
import { conflict, invalid } from '../../errors';
import { nextNumber } from '../../numbers';
import { personNames } from '../people/reads';
import { designCounts, designsOfBrief, loadBrief, loadBriefs, storeBrief } from './store';
import type { StoredBrief } from './store';
import { vibrationInWords } from './vibration-words';

type Needed = Pick<Deps, 'db' | 'now'>;

const mayWrite = ({ roles }: Actor): boolean => roles.includes('designer');
const nobody = { id: '', name: '' };

/** What is wrong with a brief beyond its form: its vibration, and requirements that share an id. */
function refuseFaults(document: BriefDocument, at: string): void {
  const reading = readVibrationDocument(document.vibration);
  const issues = reading.ok
    ? []
    : reading.issues.map(({ path, value, message, limit }) => ({
        path: [at, 'vibration', path].filter((part) => part !== '').join('.'),
        value,
        message,
        ...(limit === undefined ? {} : { limit }),
      }));
  const seen = new Set<string>();
  document.requirements.forEach(({ id }, index) => {
    const path = [at, 'requirements', index, 'id'].filter((part) => part !== '').join('.');
    if (seen.has(id)) issues.push({ path, value: id, message: 'Another requirement has this id.' });
    seen.add(id);
  });
  if (issues.length > 0) throw invalid(issues, 'This brief cannot be taken.');
}

async function present(db: Knex, brief: StoredBrief, actor: Actor): Promise<Brief> {
  const names = await personNames(db, [brief.created_by_id, brief.updated_by_id]);
  const mayEdit = mayWrite(actor);
  return {
    id: brief.id,
    number: brief.number,
    version: brief.version,
    document: brief.document,
    vibrationInWords: vibrationInWords(brief.document.vibration),
    createdAt: brief.created_at,
    createdBy: names.get(brief.created_by_id) ?? nobody,
    updatedAt: brief.updated_at,
    updatedBy: names.get(brief.updated_by_id) ?? nobody,
    designs: await designsOfBrief(db, brief.id),
    mayEdit,
    whyNotEdit: mayEdit ? null : 'This needs the role designer.',
  };
}

export async function listBriefs(
  { db }: Needed,
  actor: Actor,
): Promise<{ briefs: BriefSummary[]; mayCreate: boolean }> {
  const briefs = await loadBriefs(db);
  const counts = await designCounts(db);
  const names = await personNames(
    db,
    briefs.map(({ updated_by_id }) => updated_by_id),
  );
  const summary = ({ id, number, version, document, updated_at, updated_by_id }: StoredBrief): BriefSummary => ({
    id,
    number,
    title: document.title,
    machine: document.machine,
    powerNeeded: document.powerNeeded,
    vibrationInWords: vibrationInWords(document.vibration),
    designs: counts.get(id) ?? 0,
    version,
    updatedAt: updated_at,
    updatedBy: names.get(updated_by_id) ?? nobody,
  });
  return { briefs: briefs.map(summary), mayCreate: mayWrite(actor) };
}

export const readBrief = async ({ db }: Needed, id: string, actor: Actor): Promise<Brief> =>
  present(db, await loadBrief(db, id), actor);

export async function createBrief({ db, now }: Needed, document: BriefDocument, actor: Actor): Promise<Brief> {
  refuseFaults(document, '');
  const at = now().toISOString();
  return db.transaction(async (trx) => {
    const brief: StoredBrief = {
      id: randomUUID(),
      number: await nextNumber(trx, 'brief'),
      version: 1,
      document,
      created_at: at,
      created_by_id: actor.id,
      updated_at: at,
      updated_by_id: actor.id,
    };
    await storeBrief(trx, brief);
    await appendAudit(trx, {
      at,
      actorId: actor.id,
      action: 'created',
      subject: 'brief',
      subjectId: brief.id,
      detail: { number: brief.number, version: 1, title: document.title },
    });
    return present(trx, brief, actor);
  });
}

const words: Record<keyof BriefDocument, string> = {
  title: 'the title',
  machine: 'the machine',
  place: 'the place',
  customerContact: 'the contact',
  vibration: 'the vibration',
  powerNeeded: 'the power needed',
  loadNote: 'the note on the load',
  envelope: 'the envelope',
  massLimit: 'the mass limit',
  temperature: 'the temperature range',
  lifeCycles: 'the life',
  orientation: 'the orientation',
  requirements: 'the requirements',
  notes: 'the notes',
};

const changedParts = (before: BriefDocument, after: BriefDocument): string[] =>
  (Object.keys(words) as (keyof BriefDocument)[])
    .filter((part) => canonicalJson(before[part]) !== canonicalJson(after[part]))
    .map((part) => words[part]);

/** What was changed in each version since the one that somebody still had on the page. */
async function changesSince(db: Knex, briefId: string, version: number): Promise<Change[]> {
  const rows = await db('audit_entries')
    .leftJoin('people', 'people.id', 'audit_entries.actor_id')
    .where({ subject: 'brief', subject_id: briefId })
    .orderBy('sequence')
    .select<{ at: string; detail: string; name: string | null }[]>('at', 'detail', 'people.name');
  return rows
    .map(({ at, detail, name }) => ({
      at,
      by: name,
      ...(JSON.parse(detail) as { version: number; changed?: string[] }),
    }))
    .filter((entry) => entry.version > version)
    .map((entry) => ({
      version: entry.version,
      by: entry.by,
      at: entry.at,
      what: `Changed ${(entry.changed ?? []).join(', ') || 'nothing but the version'}.`,
    }));
}

/** Changes a brief. What was submitted before keeps the version it was submitted with. */
export async function changeBrief(
  { db, now }: Needed,
  id: string,
  { version, document }: { version: number; document: BriefDocument },
  actor: Actor,
): Promise<Brief> {
  refuseFaults(document, 'document');
  const at = now().toISOString();
  return db.transaction(async (trx) => {
    const before = await loadBrief(trx, id);
    if (before.version !== version) {
      throw conflict('This brief was changed meanwhile.', await changesSince(trx, id, version));
    }
    const after: StoredBrief = {
      ...before,
      document,
      version: version + 1,
      updated_at: at,
      updated_by_id: actor.id,
    };
    await storeBrief(trx, after);
    await appendAudit(trx, {
      at,
      actorId: actor.id,
      action: 'changed',
      subject: 'brief',
      subjectId: id,
      detail: { number: before.number, version: after.version, changed: changedParts(before.document, document) },
    });
    return present(trx, after, actor);
  });
}
