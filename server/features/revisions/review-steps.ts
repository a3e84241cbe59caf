import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { SendEvent } from '#contracts/revisions';
import { invalid } from '../../errors';
import { letterAfter } from '../../numbers';
import { addRevision } from '../../way/new-revision';
import { holdersOf } from '../../way/notices';
import { loadRevision } from '../../way/revisions';
import { conclude, conveyTo, decide, nameOf } from '../../way/step';
import type { OpenStep } from '../../way/step';
import { remarksOf, signaturesOf } from './evidence';
import { sign } from './signing';

export type Sent<Type extends z.infer<typeof SendEvent>['type']> = Extract<z.infer<typeof SendEvent>, { type: Type }>;

export async function remark(open: OpenStep, { text, blocking, target }: Sent<'remark'>): Promise<void> {
  const { trx, at, actor, revision } = open;
  const remarkId = randomUUID();
  const next = decide(open, { type: 'remark', actor, remarkId, blocking });
  await trx('remarks').insert({
    id: remarkId,
    revision_id: revision.id,
    by_id: actor.id,
    at,
    text,
    blocking: blocking ? 1 : 0,
    target,
  });
  const means = blocking
    ? 'It is blocking: it has to be closed before anything is approved or released.'
    : 'It does not block.';
  await conclude(open, next, {
    deed: 'remarked',
    detail: { remarkId, text, blocking, target },
    notices: [{ to: revision.facts.authorIds, means }],
  });
}

export async function closeRemark(open: OpenStep, { remarkId, answer }: Sent<'closeRemark'>): Promise<void> {
  const { trx, at, actor, revision } = open;
  const found = (await remarksOf(trx, revision.id)).find(({ id }) => id === remarkId);
  if (found === undefined) {
    throw invalid([{ path: 'remarkId', value: remarkId, message: 'This revision has no such remark.' }]);
  }
  const next = decide(open, { type: 'closeRemark', actor, remarkId, blocking: found.blocking });
  await trx('remarks').where({ id: remarkId }).update({ closed_by_id: actor.id, closed_at: at, answer });
  await conclude(open, next, {
    deed: 'closedRemark',
    detail: { remarkId, answer },
    notices: [{ to: [found.by.id], means: `Your remark was: ${found.text}` }],
  });
}

export async function approve(open: OpenStep, { note = '', signedDigest }: Sent<'approve'>): Promise<void> {
  const { trx, actor, revision } = open;
  const next = decide(open, { type: 'approve', actor });
  await sign(open, 'approve', signedDigest, note);
  const { approvedBy, approvalsNeeded } = next.facts;
  const cleared = next.state === 'clearedForBench';
  const rest = approvalsNeeded - approvedBy.length;
  await conclude(open, next, {
    deed: 'approved',
    detail: { note, approvals: approvedBy.length, approvalsNeeded },
    notices: [
      {
        to: revision.facts.authorIds,
        means: cleared
          ? 'It is cleared for the bench.'
          : `It needs ${rest} more ${rest === 1 ? 'approval' : 'approvals'}.`,
      },
      ...(cleared
        ? [{ to: await holdersOf(trx, 'bench'), means: 'It is cleared for the bench: a run can be started.' }]
        : []),
    ],
  });
}

export async function requestChanges(open: OpenStep, { reason }: Sent<'requestChanges'>): Promise<void> {
  const next = decide(open, { type: 'requestChanges', actor: open.actor });
  await conclude(open, next, {
    deed: 'requestedChanges',
    detail: { reason },
    notices: [
      {
        to: open.revision.facts.authorIds,
        means: 'The changes are made in the next revision, which you can start from it.',
      },
    ],
  });
}

/** Everybody who has put a remark on the revision or signed for it. */
async function involved({ trx, revision }: OpenStep): Promise<string[]> {
  const remarks = await remarksOf(trx, revision.id);
  const signatures = await signaturesOf(trx, revision.id);
  return [...remarks, ...signatures].map(({ by }) => by.id);
}

/** The next revision is a draft of what this one says, by everybody who wrote this one. */
export async function rework(open: OpenStep, { reason }: Sent<'rework'>): Promise<void> {
  const { trx, at, actor, revision, design } = open;
  const letters = await trx('revisions').where({ design_id: design.id }).orderBy('rowid').pluck<string[]>('letter');
  const letter = letterAfter(letters.at(-1) ?? revision.letter);
  const next = decide(open, { type: 'rework', actor, letter });
  await addRevision(trx, {
    design: { ...design, briefId: revision.briefId },
    letter,
    draft: revision.draft,
    authorIds: revision.facts.authorIds,
    actorId: actor.id,
    at,
    from: { id: revision.id, letter: revision.letter },
  });
  await conclude(open, next, {
    deed: 'startedNextRevision',
    detail: { letter, reason },
    notices: [
      { to: revision.facts.authorIds, means: `You stay an author: revision ${letter} is a draft now.` },
      { to: await involved(open), means: `You had a part in ${nameOf(open)}; revision ${letter} will come to review.` },
    ],
  });
}

export async function abandon(open: OpenStep, { reason }: Sent<'abandon'>): Promise<void> {
  const { trx, revision } = open;
  const next = decide(open, { type: 'abandon', actor: open.actor });
  await conclude(open, next, {
    deed: 'abandoned',
    detail: { reason },
    notices: [
      { to: revision.facts.authorIds, means: 'You are one of its authors.' },
      { to: await involved(open), means: `You had a part in ${nameOf(open)}.` },
    ],
  });
  if (revision.continuedFromId === null) return;
  // What was released goes on without this successor and may get another; what was reworked has ended with it.
  const before = await loadRevision(trx, revision.continuedFromId);
  if (before.state === 'reworked') return;
  await conveyTo(open, before, { continuedAs: null }, 'laterAbandoned');
}
