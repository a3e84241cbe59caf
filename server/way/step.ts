import type { Knex } from 'knex';
import { step } from '#workflows/revision';
import type { Actor, RevisionEvent, RevisionFacts, RevisionState } from '#workflows/revision';
import type { Deps } from '../app';
import { appendAudit } from '../audit';
import { conflict, forbidden, invalid, notFound } from '../errors';
import { tell } from './notices';
import type { Notice } from './notices';
import { loadRevision, maySee, storeRevision } from './revisions';
import type { DraftChange, StoredRevision, Submission } from './revisions';
import { changesSince, phraseOf } from './story';
import type { Deed } from './story';

/** A step of the way while its transaction is open. */
export interface OpenStep {
  trx: Knex.Transaction;
  at: string;
  actor: Actor;
  actorName: string;
  revision: StoredRevision;
  design: { id: string; number: string; title: string };
}

/** What follows from a step. */
export interface Outcome {
  state: RevisionState;
  facts: RevisionFacts;
}

interface Conclusion {
  deed: Deed;
  detail?: Record<string, unknown>;
  notices?: readonly Notice[];
  columns?: Partial<Submission & DraftChange>;
}

export async function designOf(db: Knex, designId: string): Promise<OpenStep['design']> {
  const design = await db('designs')
    .where({ id: designId })
    .first<OpenStep['design'] | undefined>('id', 'number', 'title');
  if (design === undefined) throw notFound('This design');
  return design;
}

/**
 * Begins a step inside its transaction: the revision as it stands now. Throws notFound where the actor may not know of it,
 * conflict with what changed where `version` is not the one that stands; `null` for what people may add without having
 * seen the latest.
 */
export async function openStep(
  trx: Knex.Transaction,
  { now }: Pick<Deps, 'now'>,
  actor: Actor,
  revisionId: string,
  version: number | null,
): Promise<OpenStep> {
  const revision = await loadRevision(trx, revisionId);
  if (!maySee(actor, revision.state)) throw notFound('This revision');
  if (version !== null && revision.version !== version) {
    throw conflict('This revision was changed meanwhile.', await changesSince(trx, revisionId, version));
  }
  const person = await trx('people').where({ id: actor.id }).first<{ name: string }>('name');
  const design = await designOf(trx, revision.designId);
  return { trx, at: now().toISOString(), actor, actorName: person.name, revision, design };
}

/** The field at which a refusal is shown, where the event has one for it. */
const fieldOf: Partial<Record<RevisionEvent['type'], string>> = { signResult: 'result', closeRemark: 'remarkId' };

/** Asks the chart. Throws what the refusal is: a state (409), a person who may not (403), or things as they stand (422). */
export function decide({ revision }: OpenStep, event: RevisionEvent): Outcome {
  const answer = step(revision.state, revision.facts, event);
  if (answer.accepted) return answer;
  const { reason, obstacle } = answer;
  if (obstacle === 'state') throw conflict(reason);
  if (obstacle === 'person') throw forbidden(reason);
  throw invalid([{ path: fieldOf[event.type] ?? 'type', value: event.type, message: reason }], reason);
}

export const nameOf = ({ design, revision }: Pick<OpenStep, 'design' | 'revision'>): string =>
  `${design.number} ${revision.letter}`;

/** Short forms for the subject of a message. */
const shortWords: Partial<Record<Deed, string>> = {
  submitted: 'submitted for review',
  remarked: 'has a new remark',
  closedRemark: 'has a remark closed',
  approved: 'approved',
  requestedChanges: 'sent back for changes',
  startedNextRevision: 'goes on as a new revision',
  startedRun: 'on the bench',
  stoppedRun: 'run stopped',
  signedResult: 'bench result',
  askedForRetest: 'to be tested again',
  grantedConcession: 'concession granted',
  returnedToBench: 'returned to the bench',
  released: 'released',
  superseded: 'superseded',
  recalled: 'recalled',
  abandoned: 'abandoned',
};

/** Ends a step: state and facts, audit entry, messages. */
export async function conclude(
  open: OpenStep,
  next: Outcome,
  { deed, detail = {}, notices = [], columns }: Conclusion,
): Promise<void> {
  const { trx, at, actor, actorName, revision, design } = open;
  const version = await storeRevision(trx, revision, next, at, columns);
  const told = {
    ...detail,
    version,
    name: nameOf(open),
    ...(next.state === revision.state ? {} : { state: next.state }),
  };
  await appendAudit(trx, {
    at,
    actorId: actor.id,
    action: deed,
    subject: 'revision',
    subjectId: revision.id,
    detail: told,
  });
  const happening = {
    eventId: `revision ${revision.id} version ${version}`,
    at,
    actorId: actor.id,
    designId: design.id,
    name: nameOf(open),
    letter: revision.letter,
    designTitle: design.title,
    sentence: `${actorName} ${phraseOf(deed, detail, nameOf(open))}.`,
    short: shortWords[deed] ?? 'changed',
  };
  await tell(trx, happening, notices);
}

/** Writes into another revision of the design what a step means for it. */
export async function conveyTo(
  open: OpenStep,
  other: StoredRevision,
  change: Partial<RevisionFacts>,
  deed: Deed,
): Promise<void> {
  const facts = { ...other.facts, ...change };
  await conclude(
    { ...open, revision: other },
    { state: other.state, facts },
    { deed, detail: { letter: open.revision.letter } },
  );
}
