import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { RevisionFacts } from '#workflows/revision';
import { appendAudit } from '../audit';
import { draftText } from './draft-text';
import { addAuthors } from './revisions';
import type { RevisionRow } from './revisions';
import type { Deed } from './story';

/** Reviewers who have to agree before a revision goes to the bench. */
const approvalsNeeded = 1;

interface NewRevision {
  design: { id: string; number: string; briefId: string };
  letter: string;
  draft: Record<string, unknown>;
  authorIds: readonly string[];
  actorId: string;
  at: string;
  /** The revision it is drafted from. */
  from: { id: string; letter: string } | null;
}

const freshFacts = (authorIds: readonly string[]): RevisionFacts => ({
  authorIds: [...authorIds],
  submitObstacles: [],
  approvalsNeeded,
  approvedBy: [],
  openBlockingRemarks: 0,
  openRemarkIds: [],
  openRunId: null,
  openRunStartedBy: null,
  missingReadings: [],
  readingsMeet: null,
  lastResult: null,
  concessionGranted: false,
  laterReleased: null,
  continuedAs: null,
});

/** Adds a revision as a draft. Whoever wrote what it is drafted from stays among its authors. */
export async function addRevision(
  trx: Knex.Transaction,
  { design, letter, draft, authorIds, actorId, at, from }: NewRevision,
): Promise<string> {
  const id = randomUUID();
  const authors = [...new Set([...authorIds, actorId])];
  await trx<RevisionRow>('revisions').insert({
    id,
    design_id: design.id,
    brief_id: design.briefId,
    letter,
    state: 'draft',
    state_since: at,
    version: 1,
    facts: JSON.stringify(freshFacts(authors)),
    draft: draftText(draft),
    document_issues: '[]',
    continued_from_id: from?.id ?? null,
    created_at: at,
    created_by_id: actorId,
    updated_at: at,
  });
  await addAuthors(trx, id, authors, at);
  const action: Deed = 'created';
  await appendAudit(trx, {
    at,
    actorId,
    action,
    subject: 'revision',
    subjectId: id,
    detail: { version: 1, name: `${design.number} ${letter}`, ...(from === null ? {} : { from: from.letter }) },
  });
  return id;
}
