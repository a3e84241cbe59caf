import { randomUUID } from 'node:crypto';
import { nextNumber } from '../../numbers';
import { holdersOf } from '../../way/notices';
import { conclude, decide } from '../../way/step';
import type { OpenStep } from '../../way/step';
import { briefAt } from '../briefs/reads';
import { benchRequirements, findRun } from '../runs/reads';
import type { StoredRun } from '../runs/reads';
import type { Sent } from './review-steps';
import { sign } from './signing';

/** Opens a run with one line for each requirement of the submitted brief that the bench has to show. */
export async function startRun(open: OpenStep, { specimen }: Sent<'startRun'>): Promise<void> {
  const { trx, at, actor, revision } = open;
  const brief = await briefAt(trx, revision.briefId, revision.briefVersion);
  const runId = randomUUID();
  const missingReadings = benchRequirements(brief.document.requirements).map(({ title }) => title);
  const next = decide(open, { type: 'startRun', actor, runId, missingReadings });
  const run = await nextNumber(trx, 'run');
  await trx('runs').insert({
    id: runId,
    number: run,
    revision_id: revision.id,
    state: 'open',
    specimen,
    started_at: at,
    started_by_id: actor.id,
  });
  await conclude(open, next, {
    deed: 'startedRun',
    detail: { runId, run, specimen },
    notices: [{ to: revision.facts.authorIds, means: 'You can follow the readings as they are entered.' }],
  });
}

async function openRunOf({ trx, revision }: OpenStep): Promise<StoredRun> {
  const run = revision.facts.openRunId === null ? undefined : await findRun(trx, revision.facts.openRunId);
  if (run === undefined) throw new Error(`Revision ${revision.id} is on the bench without a run.`);
  return run;
}

/** Closes the run for good: from here on the database refuses every change to it. */
const closeRun = (
  { trx, at, actor }: OpenStep,
  { id }: StoredRun,
  closing:
    { state: 'stopped'; stop_reason: string } | { state: 'signed'; result: StoredRun['result']; statement: string },
): Promise<unknown> =>
  trx('runs')
    .where({ id })
    .update({ ...closing, closed_at: at, closed_by_id: actor.id });

export async function stopRun(open: OpenStep, { reason }: Sent<'stopRun'>): Promise<void> {
  const next = decide(open, { type: 'stopRun', actor: open.actor });
  const run = await openRunOf(open);
  await closeRun(open, run, { state: 'stopped', stop_reason: reason });
  await conclude(open, next, {
    deed: 'stoppedRun',
    detail: { runId: run.id, run: run.number, reason },
    notices: [{ to: open.revision.facts.authorIds, means: 'It waits for the bench again.' }],
  });
}

export async function signResult(
  open: OpenStep,
  { result, statement, signedDigest }: Sent<'signResult'>,
): Promise<void> {
  const { trx, revision } = open;
  const next = decide(open, { type: 'signResult', actor: open.actor, result });
  const run = await openRunOf(open);
  await sign(open, 'signResult', signedDigest, statement);
  await closeRun(open, run, { state: 'signed', result, statement });
  const { authorIds } = revision.facts;
  const deciders =
    next.state === 'releaseReview'
      ? (await holdersOf(trx, 'releaseAuthority')).filter((id) => !authorIds.includes(id))
      : [];
  await conclude(open, next, {
    deed: 'signedResult',
    detail: { runId: run.id, run: run.number, result, statement },
    notices: [
      { to: deciders, means: 'You may weigh the evidence and release it.' },
      {
        to: authorIds,
        means:
          result === 'conforming'
            ? 'It goes to the release review.'
            : 'It can be reworked, tested again, or go on with a concession.',
      },
    ],
  });
}

export async function retest(open: OpenStep, { reason }: Sent<'retest'>): Promise<void> {
  const next = decide(open, { type: 'retest', actor: open.actor });
  await conclude(open, next, {
    deed: 'askedForRetest',
    detail: { reason },
    notices: [
      { to: await holdersOf(open.trx, 'bench'), means: 'A new run can be started.' },
      { to: open.revision.facts.authorIds, means: 'It waits for a new run; the earlier result stays in the history.' },
    ],
  });
}
