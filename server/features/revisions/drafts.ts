import type { Issue } from '#contracts/error';
import type { SaveDraft } from '#contracts/revisions';
import { canonicalText } from '#physics/canonical';
import { digestOfDocument } from '#physics/digest';
import type { Actor } from '#workflows/revision';
import type { Deps } from '../../app';
import { sha256 } from '../../canonical-json';
import { DomainError, conflict, invalid } from '../../errors';
import { draftText } from '../../way/draft-text';
import { holdersOf } from '../../way/notices';
import { addAuthors, loadRevision } from '../../way/revisions';
import { conclude, decide, nameOf, openStep } from '../../way/step';
import type { OpenStep, Outcome } from '../../way/step';
import { briefAt } from '../briefs/reads';
import { checkDraft } from './draft-check';

/** Stores what was typed, faults and all, and keeps the person among the authors. */
export async function saveDraft(
  deps: Deps,
  revisionId: string,
  { version, document }: SaveDraft,
  actor: Actor,
): Promise<void> {
  const draft = draftText(document);
  const before = await loadRevision(deps.db, revisionId);
  const brief = await briefAt(deps.db, before.briefId, null);
  const check = await checkDraft(deps, document, brief.document);
  await deps.db.transaction(async (trx) => {
    const open = await openStep(trx, deps, actor, revisionId, version);
    const { revision, at } = open;
    if (revision.state !== 'draft') throw conflict('Only a draft can be changed. Changes go into the next revision.');
    if (draft === JSON.stringify(revision.draft)) return;
    const authorIds = [...new Set([...revision.facts.authorIds, actor.id])];
    await addAuthors(trx, revisionId, [actor.id], at);
    await conclude(
      open,
      { state: 'draft', facts: { ...revision.facts, authorIds, submitObstacles: check.obstacles } },
      {
        deed: 'savedDraft',
        detail: { digest: sha256(draft) },
        columns: { draft, document_issues: JSON.stringify(check.issues) },
      },
    );
  });
}

/** The check made of the draft and the brief as they were read, outside the transaction. */
async function checked(deps: Deps, revisionId: string) {
  const revision = await loadRevision(deps.db, revisionId);
  const brief = await briefAt(deps.db, revision.briefId, null);
  const check = revision.state === 'draft' ? await checkDraft(deps, revision.draft, brief.document) : null;
  return { version: revision.version, briefVersion: brief.version, check };
}

/** Asks the chart; where the document is what stands in the way, each of its faults is named at its place. */
function decideWithFaults(open: OpenStep, faults: readonly Issue[]): Outcome {
  try {
    return decide(open, { type: 'submit', actor: open.actor });
  } catch (error) {
    if (!(error instanceof DomainError) || error.code !== 'invalid' || faults.length === 0) throw error;
    const issues = faults.map((issue) => ({ ...issue, path: ['document', issue.path].filter(Boolean).join('.') }));
    throw invalid(issues, error.message);
  }
}

/**
 * Freezes document, digest, estimate and the brief's version, and puts the revision before the reviewers. The estimate is
 * computed before the transaction; inside, it is made sure that neither the draft nor the brief has changed since.
 */
export async function submit(
  deps: Deps,
  revisionId: string,
  { version, note = '' }: { version: number; note?: string },
  actor: Actor,
): Promise<void> {
  const prepared = await checked(deps, revisionId);
  await deps.db.transaction(async (trx) => {
    const open = await openStep(trx, deps, actor, revisionId, version);
    const { revision, at } = open;
    const brief = await briefAt(trx, revision.briefId, null);
    const { check } = prepared;
    if (prepared.version !== revision.version || prepared.briefVersion !== brief.version) {
      throw conflict('The draft or its brief was changed at the same moment. Look at it again, then submit.');
    }
    revision.facts.submitObstacles = check?.obstacles ?? [];
    const next = decideWithFaults(open, check?.issues ?? []);
    const sound = check?.sound ?? null;
    if (sound === null) throw new Error('A draft without obstacles has a document and an estimate.');
    await addAuthors(trx, revisionId, [actor.id], at);
    const reviewers = (await holdersOf(trx, 'reviewer')).filter((id) => !next.facts.authorIds.includes(id));
    await conclude(open, next, {
      deed: 'submitted',
      detail: {
        note,
        document: digestOfDocument(sound.document),
        estimate: sound.estimate.digest,
        brief: brief.version,
      },
      notices: [
        { to: reviewers, means: `You may review ${nameOf(open)}: remark on it, approve it, or ask for changes.` },
      ],
      columns: {
        document: canonicalText(sound.document),
        document_digest: digestOfDocument(sound.document),
        document_issues: '[]',
        estimate: JSON.stringify(sound.estimate),
        load_power: sound.estimate.response.loadPower,
        brief_version: brief.version,
        submitted_at: at,
        submitted_by_id: actor.id,
      },
    });
  });
}
