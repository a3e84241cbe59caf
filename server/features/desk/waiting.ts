import type { Knex } from 'knex';
import type { DeskItem } from '#contracts/desk';
import { RevisionFacts, offersFor, stateWords } from '#workflows/revision';
import type { Actor, RevisionEventType, RevisionState } from '#workflows/revision';

interface Row {
  id: string;
  letter: string;
  state: RevisionState;
  state_since: string;
  facts: string;
  design_id: string;
  number: string;
  title: string;
  run_id: string | null;
  run_number: string | null;
}

export interface Standing extends Omit<Row, 'facts'> {
  facts: RevisionFacts;
  authored: boolean;
}

const ended: readonly RevisionState[] = ['superseded', 'recalled', 'reworked', 'abandoned'];

/** Every revision that is still on its way, with what a desk has to know of it. */
export async function onTheWay(db: Knex, actorId: string): Promise<Standing[]> {
  const rows = await db('revisions')
    .join('designs', 'designs.id', 'revisions.design_id')
    .leftJoin('runs', (join) => {
      join.on('runs.revision_id', 'revisions.id').andOnVal('runs.state', 'open');
    })
    .whereNotIn('revisions.state', [...ended])
    .orderBy('state_since')
    .select<Row[]>(
      'revisions.id',
      'letter',
      'revisions.state',
      'state_since',
      'facts',
      'design_id',
      'designs.number',
      'designs.title',
      'runs.id as run_id',
      'runs.number as run_number',
    );
  return rows.map((row) => {
    const facts = RevisionFacts.parse(JSON.parse(row.facts));
    return { ...row, facts, authored: facts.authorIds.includes(actorId) };
  });
}

const item = (row: Standing, what: string): DeskItem => ({
  href: row.run_id === null ? `/designs/${row.design_id}/${row.letter}` : `/bench/runs/${row.run_id}`,
  title: `${row.number} ${row.letter} · ${row.title}`,
  what,
  since: row.state_since,
});

/** What is asked of this person in a state, by the events the chart would accept from them; null where nothing is. */
function asked(row: Standing, actor: Actor): string | null {
  const { state, facts, authored } = row;
  const { availableEvents } = offersFor(state, facts, actor);
  const may = (...types: RevisionEventType[]) => types.some((type) => availableEvents.includes(type));
  switch (state) {
    case 'draft':
      return authored && actor.roles.includes('designer') ? 'Finish the draft and submit it: you are an author.' : null;
    case 'inReview':
      if (may('approve', 'requestChanges') && !facts.approvedBy.includes(actor.id)) {
        return facts.openBlockingRemarks > 0
          ? 'Review it: a blocking remark is open, and you did not draw it.'
          : 'Review it: you are a reviewer and did not draw it.';
      }
      return authored && may('closeRemark') ? 'Answer the open remarks: you are an author.' : null;
    case 'changesRequested':
      return authored && may('rework')
        ? 'Start the next revision: changes were requested and you are an author.'
        : null;
    case 'clearedForBench':
      return may('startRun') ? 'Start a run: it is cleared for the bench.' : null;
    case 'onBench': {
      if (!may('signResult', 'stopRun')) return null;
      const run = row.run_number ?? 'the run';
      return facts.missingReadings.length > 0
        ? `Go on with ${run}: ${facts.missingReadings.length} of its lines have no reading yet.`
        : `Sign the result of ${run}: every line has a reading.`;
    }
    case 'nonconforming':
      if (may('grantConcession')) return 'Decide on a concession: the bench result is nonconforming.';
      if (authored && may('rework'))
        return 'The bench result is nonconforming: rework it, or ask for a retest or a concession.';
      return may('retest') ? 'Test it again, where the test was at fault: the result is nonconforming.' : null;
    case 'releaseReview':
      if (may('release')) return 'Weigh the evidence and release it: the evidence is complete.';
      if (may('returnToBench')) return 'Weigh the evidence: something still stands in the way of a release.';
      return authored && may('closeRemark') ? 'Answer the open remarks: you are an author.' : null;
    case 'released':
      return may('supersede') ? `Mark it as superseded: revision ${facts.laterReleased ?? ''} is released.` : null;
    default:
      return null;
  }
}

const waitedFor: Partial<Record<RevisionState, string>> = {
  inReview: 'A reviewer who did not draw it has to decide.',
  clearedForBench: 'The bench has to start a run.',
  onBench: 'The bench has to sign the result.',
  nonconforming: 'Rework, a retest or a concession has to be decided.',
  releaseReview: 'A release authority has to decide.',
  changesRequested: 'An author has to start the next revision.',
};

/** What waits for this person, the longest first, and what the person waits for: own work that lies with others. */
export function waiting(rows: readonly Standing[], actor: Actor): { waitsForMe: DeskItem[]; iWaitFor: DeskItem[] } {
  const waitsForMe: DeskItem[] = [];
  const iWaitFor: DeskItem[] = [];
  for (const row of rows) {
    const mine = asked(row, actor);
    const others = waitedFor[row.state];
    const took = row.authored || row.facts.approvedBy.includes(actor.id) || row.facts.openRunStartedBy === actor.id;
    if (mine !== null) waitsForMe.push(item(row, mine));
    else if (took && others !== undefined) iWaitFor.push(item(row, `${stateWords[row.state]}. ${others}`));
  }
  return { waitsForMe, iWaitFor };
}
