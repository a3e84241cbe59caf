import type { Revision, SaveDraft, SendEvent } from '#contracts/revisions';
import type { Actor } from '#workflows/revision';
import type { Deps } from '../../app';
import { notFound } from '../../errors';
import { loadRevision, maySee } from '../../way/revisions';
import { decide, openStep } from '../../way/step';
import type { OpenStep } from '../../way/step';
import { retest, signResult, startRun, stopRun } from './bench-steps';
import { saveDraft, submit } from './drafts';
import { presentRevision } from './present';
import { grantConcession, recall, release, returnToBench, supersede } from './release-steps';
import { abandon, approve, closeRemark, remark, requestChanges, rework } from './review-steps';
import type { passwordCheck } from './signing';

export async function readRevision(deps: Deps, id: string, actor: Actor): Promise<Revision> {
  const revision = await loadRevision(deps.db, id);
  if (!maySee(actor, revision.state)) throw notFound('This revision');
  return presentRevision(deps, revision, actor);
}

export async function changeDraft(deps: Deps, id: string, body: SaveDraft, actor: Actor): Promise<Revision> {
  await saveDraft(deps, id, body, actor);
  return readRevision(deps, id, actor);
}

/** One step inside its transaction, by the kind of event. */
function take(open: OpenStep, event: Exclude<SendEvent, { type: 'submit' }>): Promise<void> {
  switch (event.type) {
    case 'remark':
      return remark(open, event);
    case 'closeRemark':
      return closeRemark(open, event);
    case 'approve':
      return approve(open, event);
    case 'requestChanges':
      return requestChanges(open, event);
    case 'rework':
      return rework(open, event);
    case 'startRun':
      return startRun(open, event);
    case 'stopRun':
      return stopRun(open, event);
    case 'signResult':
      return signResult(open, event);
    case 'retest':
      return retest(open, event);
    case 'grantConcession':
      return grantConcession(open, event);
    case 'returnToBench':
      return returnToBench(open, event);
    case 'release':
      return release(open, event);
    case 'supersede':
      return supersede(open, event);
    case 'recall':
      return recall(open, event);
    case 'abandon':
      return abandon(open, event);
  }
}

/** Takes a step of the way, all of it in one transaction, and answers the revision as it then stands. */
export async function sendEvent(
  deps: Deps,
  id: string,
  event: SendEvent,
  actor: Actor,
  confirmPassword: ReturnType<typeof passwordCheck>,
): Promise<Revision> {
  if (event.type === 'submit') {
    await submit(deps, id, event, actor);
  } else {
    if ('password' in event) {
      // Refusals that need no password come first; then the password, outside the transaction because it takes long.
      await deps.db.transaction(async (trx) =>
        decide(await openStep(trx, deps, actor, id, event.version), { ...event, actor }),
      );
      await confirmPassword(actor.id, event.password);
    }
    await deps.db.transaction(async (trx) => take(await openStep(trx, deps, actor, id, event.version), event));
  }
  return readRevision(deps, id, actor);
}
