import type { Knex } from 'knex';
import type { Revision } from '#contracts/revisions';
import { offersFor, stateWords } from '#workflows/revision';
import type { Actor } from '#workflows/revision';
import type { Deps } from '../../app';
import { activityOf } from '../../way/story';
import { maySee } from '../../way/revisions';
import type { StoredRevision } from '../../way/revisions';
import { recordOfRevision } from '../records/reads';
import { summaryOf } from '../runs/reads';
import { checkDraft } from './draft-check';
import { digestOf, evidenceOf } from './evidence';

const letterOf = async (db: Knex, id: string | null): Promise<string | null> =>
  id === null ? null : ((await db('revisions').where({ id }).first<{ letter: string }>('letter')).letter ?? null);

function whyNotEdit({ state }: StoredRevision, { roles }: Actor): string | null {
  if (state !== 'draft') {
    return `Only a draft can be changed, and this revision is “${stateWords[state]}”. Changes go into the next revision.`;
  }
  return roles.includes('designer') ? null : 'This needs the role designer.';
}

/** A revision with everything on its page. What is offered comes from the same functions that decide. */
export async function presentRevision(deps: Deps, revision: StoredRevision, actor: Actor): Promise<Revision> {
  const { db } = deps;
  const evidence = await evidenceOf(db, revision);
  const { design, brief, authors, remarks, signatures, runs } = evidence;
  const draft = revision.state === 'draft';
  const check = draft ? await checkDraft(deps, revision.draft, brief.document) : null;
  const facts = check === null ? revision.facts : { ...revision.facts, submitObstacles: check.obstacles };
  const record = await recordOfRevision(db, revision.id);
  const seesDrafts = maySee(actor, 'draft');
  const refusal = whyNotEdit(revision, actor);
  return {
    id: revision.id,
    letter: revision.letter,
    design,
    brief,
    state: revision.state,
    version: revision.version,
    document: revision.document ?? revision.draft,
    documentDigest: revision.documentDigest,
    documentIssues: check?.issues ?? revision.documentIssues,
    estimate: revision.estimate,
    digest: digestOf(evidence),
    authors,
    createdAt: revision.createdAt,
    updatedAt: revision.updatedAt,
    submittedAt: revision.submittedAt,
    remarks,
    signatures,
    approvalsNeeded: revision.facts.approvalsNeeded,
    runs: runs.map(summaryOf),
    continuedAs: seesDrafts ? revision.facts.continuedAs : null,
    continuedFrom: await letterOf(db, revision.continuedFromId),
    recordId: record?.id ?? null,
    activity: await activityOf(db, revision.id, { drafts: seesDrafts }),
    mayEdit: refusal === null,
    whyNotEdit: refusal,
    ...offersFor(revision.state, facts, actor),
  };
}
