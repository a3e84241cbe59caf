import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { Design, DesignCreate, DesignSummary } from '#contracts/designs';
import type { Actor } from '#workflows/revision';
import type { Deps } from '../../app';
import { appendAudit } from '../../audit';
import { DomainError, invalid, notFound } from '../../errors';
import { nextNumber } from '../../numbers';
import { addRevision } from '../../way/new-revision';
import { maySee } from '../../way/revisions';
import { briefAt } from '../briefs/reads';
import type { BriefAt } from '../briefs/reads';
import { personNames } from '../people/reads';
import { starterFor } from './starter';
import { documentsOf, linesOf, loadDesign, loadDesigns, presentLine } from './store';
import type { DesignRow, LineRow } from './store';

const nobody = { id: '', name: '' };
const briefOf = ({ brief_id, brief_number, brief_title }: DesignRow) => ({
  id: brief_id,
  number: brief_number,
  title: brief_title,
});

export async function listDesigns(
  { db }: Pick<Deps, 'db'>,
  { roles }: Actor,
): Promise<{ designs: DesignSummary[]; mayCreate: boolean }> {
  const designs = await loadDesigns(db);
  const latest = new Map<string, LineRow>();
  for (const line of await linesOf(db)) latest.set(line.design_id, line);
  const documents = await documentsOf(
    db,
    [...latest.values()].map(({ id }) => id),
  );
  const names = await personNames(
    db,
    designs.map(({ created_by_id }) => created_by_id),
  );
  return {
    mayCreate: roles.includes('designer'),
    designs: designs.flatMap((design): DesignSummary[] => {
      const line = latest.get(design.id);
      if (line === undefined) return [];
      return [
        {
          id: design.id,
          number: design.number,
          title: design.title,
          brief: briefOf(design),
          latest: presentLine(line),
          document: documents.get(line.id) ?? null,
          createdBy: names.get(design.created_by_id) ?? nobody,
          updatedAt: line.updated_at,
        },
      ];
    }),
  };
}

/** A design with the revisions that the actor may see; one without any does not exist for them. */
export async function readDesign({ db }: { db: Knex }, id: string, actor: Actor): Promise<Design> {
  const design = await loadDesign(db, id);
  const lines = (await linesOf(db, id)).filter(({ state }) => maySee(actor, state));
  if (lines.length === 0) throw notFound('This design');
  const names = await personNames(db, [design.created_by_id]);
  return {
    id: design.id,
    number: design.number,
    title: design.title,
    brief: briefOf(design),
    createdAt: design.created_at,
    createdBy: names.get(design.created_by_id) ?? nobody,
    revisions: lines.map(presentLine),
  };
}

/** The brief as it stands, or an error at the field where it was chosen. */
async function chosenBrief(db: Knex, briefId: string): Promise<BriefAt> {
  return briefAt(db, briefId, null).catch((error: unknown) => {
    if (!(error instanceof DomainError) || error.code !== 'notFound') throw error;
    throw invalid([{ path: 'briefId', value: briefId, message: 'There is no such brief.' }]);
  });
}

/** Starts a design for a brief, with revision A as a draft of the given document or of a starting point. */
export async function createDesign(deps: Deps, body: DesignCreate, actor: Actor): Promise<Design> {
  const { db, now } = deps;
  const { title, briefId } = body;
  const brief = await chosenBrief(db, briefId);
  const draft = body.document ?? (await starterFor(deps, brief.document, title));
  const at = now().toISOString();
  return db.transaction(async (trx) => {
    const id = randomUUID();
    const number = await nextNumber(trx, 'design');
    const row = { id, number, title, brief_id: briefId, created_at: at, created_by_id: actor.id };
    await trx('designs').insert(row);
    const detail = { number, title, brief: brief.number };
    await appendAudit(trx, { at, actorId: actor.id, action: 'created', subject: 'design', subjectId: id, detail });
    await addRevision(trx, {
      design: { id, number, briefId },
      letter: 'A',
      draft,
      authorIds: [],
      actorId: actor.id,
      at,
      from: null,
    });
    return readDesign({ db: trx }, id, actor);
  });
}
