import type { Knex } from 'knex';
import { z } from 'zod';
import type { Change } from '#contracts/error';
import type { Activity } from '#contracts/revisions';
import type { RevisionState } from '#workflows/revision';
import { AuditDetail } from '../audit';
import type { AuditRow } from '../audit';

/** What is written into the audit trail about a revision: the words of the way, in the past. */
export const deedOfEvent = {
  submit: 'submitted',
  remark: 'remarked',
  closeRemark: 'closedRemark',
  approve: 'approved',
  requestChanges: 'requestedChanges',
  rework: 'startedNextRevision',
  startRun: 'startedRun',
  stopRun: 'stoppedRun',
  signResult: 'signedResult',
  retest: 'askedForRetest',
  grantConcession: 'grantedConcession',
  returnToBench: 'returnedToBench',
  release: 'released',
  supersede: 'superseded',
  recall: 'recalled',
  abandon: 'abandoned',
} as const;

export type Deed =
  | (typeof deedOfEvent)[keyof typeof deedOfEvent]
  | 'created'
  | 'savedDraft'
  | 'statedConditions'
  | 'tookReading'
  | 'struckReading'
  | 'laterReleased'
  | 'laterRecalled'
  | 'laterAbandoned';

const text = (detail: Record<string, unknown>, key: string): string => {
  const value = detail[key];
  return typeof value === 'string' || typeof value === 'number' ? String(value) : '';
};
/** “: reason”, where one was given. */
const because = (words: string): string => (words === '' ? '' : `: ${words.replace(/[.\s]+$/, '')}`);

/** What was done, to be put after the name of who did it. */
const phrases: Record<Deed, (detail: Record<string, unknown>, it: string) => string> = {
  created: (detail, it) => {
    const what = it === 'it' ? 'this revision' : it;
    return text(detail, 'from') === '' ? `created ${what}` : `drafted ${what} from ${text(detail, 'from')}`;
  },
  savedDraft: () => 'saved the draft',
  submitted: (detail, it) => `submitted ${it} for review${because(text(detail, 'note'))}`,
  remarked: (detail, it) =>
    `put ${detail['blocking'] === true ? 'a blocking' : 'a'} remark on ${it}${because(text(detail, 'text'))}`,
  closedRemark: (detail, it) => `closed a remark on ${it}${because(text(detail, 'answer'))}`,
  approved: (detail, it) =>
    `approved ${it} (${text(detail, 'approvals')} of ${text(detail, 'approvalsNeeded')})${because(text(detail, 'note'))}`,
  requestedChanges: (detail, it) => `requested changes to ${it}${because(text(detail, 'reason'))}`,
  startedNextRevision: (detail, it) =>
    `started revision ${text(detail, 'letter')} from ${it}${because(text(detail, 'reason'))}`,
  startedRun: (detail) => `started ${text(detail, 'run')} with specimen ${text(detail, 'specimen')}`,
  stoppedRun: (detail) => `stopped ${text(detail, 'run')} without a result${because(text(detail, 'reason'))}`,
  signedResult: (detail) =>
    `signed ${text(detail, 'run')} as ${text(detail, 'result')}${because(text(detail, 'statement'))}`,
  askedForRetest: (detail, it) => `sent ${it} to be tested again${because(text(detail, 'reason'))}`,
  grantedConcession: (detail, it) =>
    `granted ${it} a concession for “${text(detail, 'shortfall')}”${because(text(detail, 'reason'))}`,
  returnedToBench: (detail, it) => `returned ${it} to the bench${because(text(detail, 'reason'))}`,
  released: (detail, it) => `released ${it} as ${text(detail, 'releaseNumber')}`,
  superseded: (detail, it) =>
    `marked ${it} as superseded by revision ${text(detail, 'by')}${because(text(detail, 'reason'))}`,
  recalled: (detail, it) => `recalled ${it}${because(text(detail, 'reason'))}`,
  abandoned: (detail, it) => `abandoned ${it}${because(text(detail, 'reason'))}`,
  statedConditions: (detail) => `stated the conditions of ${text(detail, 'run')}`,
  tookReading: (detail) => `entered a reading of “${text(detail, 'quantity')}” in ${text(detail, 'run')}`,
  struckReading: (detail) =>
    `struck a reading of “${text(detail, 'quantity')}” in ${text(detail, 'run')}${because(text(detail, 'reason'))}`,
  laterReleased: (detail) => `released revision ${text(detail, 'letter')}, which may supersede this one`,
  laterRecalled: (detail) => `recalled revision ${text(detail, 'letter')}, which no longer supersedes this one`,
  laterAbandoned: (detail) => `abandoned revision ${text(detail, 'letter')}, which was drafted from this one`,
};

export const phraseOf = (deed: Deed, detail: Record<string, unknown>, it = 'it'): string => phrases[deed](detail, it);

const isDeed = (action: string): action is Deed => action in phrases;

interface Entry {
  version: number;
  at: string;
  by: { id: string; name: string } | null;
  deed: Deed;
  phrase: string;
}

type TrailRow = Pick<AuditRow, 'at' | 'action' | 'detail' | 'actor_id'> & { name: string | null };
const Versioned = z.looseObject({ version: z.number().int() });

/** All that the trail tells of a revision, oldest first. */
async function entriesOf(db: Knex, revisionId: string): Promise<Entry[]> {
  const rows = await db('audit_entries')
    .leftJoin('people', 'people.id', 'audit_entries.actor_id')
    .where({ subject: 'revision', subject_id: revisionId })
    .orderBy('sequence')
    .select<TrailRow[]>('at', 'action', 'detail', 'actor_id', 'people.name');
  return rows.flatMap(({ at, action, detail: stored, actor_id, name }) => {
    if (!isDeed(action)) return [];
    const detail = AuditDetail.parse(JSON.parse(stored));
    const by = actor_id === null ? null : { id: actor_id, name: name ?? '' };
    return [{ version: Versioned.parse(detail).version, at, by, deed: action, phrase: phraseOf(action, detail) }];
  });
}

/** One entry for a series of saves by the same person: drafts are saved as people type. */
function withoutRepeatedSaves(entries: Entry[]): Entry[] {
  return entries.filter((entry, index) => {
    const next = entries[index + 1];
    return !(entry.deed === 'savedDraft' && next?.deed === 'savedDraft' && next.by?.id === entry.by?.id);
  });
}

/** Deeds that speak of drafts, which those who see releases only know nothing of. */
const ofDrafts: readonly Deed[] = ['savedDraft', 'startedNextRevision', 'laterAbandoned'];

/** What happened to a revision, in sentences, oldest first. */
export async function activityOf(db: Knex, revisionId: string, { drafts }: { drafts: boolean }): Promise<Activity[]> {
  const entries = withoutRepeatedSaves(await entriesOf(db, revisionId)).filter(
    ({ deed }) => drafts || !ofDrafts.includes(deed),
  );
  return entries.map(({ at, by, phrase }) => ({ at, by, sentence: `${by?.name ?? 'The server'} ${phrase}.` }));
}

const capitalised = (phrase: string): string => `${phrase.charAt(0).toUpperCase()}${phrase.slice(1)}.`;

/** What happened since the version that somebody still had on the page: told with a 409. */
export async function changesSince(db: Knex, revisionId: string, version: number): Promise<Change[]> {
  const entries = (await entriesOf(db, revisionId)).filter((entry) => entry.version > version);
  return withoutRepeatedSaves(entries).map((entry) => ({
    version: entry.version,
    by: entry.by?.name ?? null,
    at: entry.at,
    what: capitalised(entry.phrase),
  }));
}

type PlacedRow = TrailRow & { letter: string; design_id: string; number: string; title: string };
type Placed = Activity & { href: string; title: string };

/**
 * The latest of what happened to revisions, newest first. Saves of drafts are left out; for those who see releases only, so is
 * everything about other revisions.
 */
export async function latestDeeds(db: Knex, states: readonly RevisionState[] | 'all', most: number): Promise<Placed[]> {
  const rows = db('audit_entries')
    .join('revisions', 'revisions.id', 'audit_entries.subject_id')
    .join('designs', 'designs.id', 'revisions.design_id')
    .leftJoin('people', 'people.id', 'audit_entries.actor_id')
    .where({ subject: 'revision' })
    .whereNotIn('action', ['savedDraft', 'tookReading', 'statedConditions'])
    .orderBy('sequence', 'desc')
    .limit(most)
    .select<PlacedRow[]>(
      'audit_entries.at',
      'action',
      'detail',
      'actor_id',
      'people.name',
      'letter',
      'design_id',
      'designs.number',
      'designs.title',
    );
  if (states !== 'all') rows.whereIn('revisions.state', [...states]).whereNotIn('action', [...ofDrafts]);
  return (await rows).flatMap(({ at, action, detail, actor_id, name, letter, design_id, number, title }) => {
    if (!isDeed(action)) return [];
    const phrase = phraseOf(action, AuditDetail.parse(JSON.parse(detail)), `${number} ${letter}`);
    return [
      {
        at,
        by: actor_id === null ? null : { id: actor_id, name: name ?? '' },
        sentence: `${name ?? 'The server'} ${phrase}.`,
        href: `/designs/${design_id}/${letter}`,
        title: `${number} ${letter} · ${title}`,
      },
    ];
  });
}
