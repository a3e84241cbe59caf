import { holdersOf } from '../../way/notices';
import { loadRevision } from '../../way/revisions';
import type { StoredRevision } from '../../way/revisions';
import { conclude, conveyTo, decide, nameOf } from '../../way/step';
import type { OpenStep } from '../../way/step';
import { keepRecord } from './record';
import type { Sent } from './review-steps';
import { sign } from './signing';

export async function grantConcession(
  open: OpenStep,
  { shortfall, reason, signedDigest }: Sent<'grantConcession'>,
): Promise<void> {
  const { trx, actor, revision } = open;
  const next = decide(open, { type: 'grantConcession', actor });
  await sign(open, 'grantConcession', signedDigest, `Shortfall: ${shortfall}\nReason: ${reason}`);
  await conclude(open, next, {
    deed: 'grantedConcession',
    detail: { shortfall, reason },
    notices: [
      { to: revision.facts.authorIds, means: 'It goes to the release review with the shortfall named.' },
      { to: await holdersOf(trx, 'releaseAuthority'), means: 'You may weigh the evidence and release it.' },
    ],
  });
}

export async function returnToBench(open: OpenStep, { reason }: Sent<'returnToBench'>): Promise<void> {
  const next = decide(open, { type: 'returnToBench', actor: open.actor });
  await conclude(open, next, {
    deed: 'returnedToBench',
    detail: { reason },
    notices: [
      { to: await holdersOf(open.trx, 'bench'), means: 'A new run can be started.' },
      { to: open.revision.facts.authorIds, means: 'It waits for a new run.' },
    ],
  });
}

/** Everybody who works by releases. */
const readersOfReleases = async ({ trx, revision }: OpenStep): Promise<string[]> => [
  ...revision.facts.authorIds,
  ...(await holdersOf(trx, 'reviewer', 'bench', 'observer')),
];

const order = ({ letter }: StoredRevision): string => letter.padStart(8, ' ');

/** Other revisions of the design in one of these states, in the order of their letters. */
async function othersOf(
  { trx, design, revision }: OpenStep,
  states: StoredRevision['state'][],
): Promise<StoredRevision[]> {
  const ids = await trx('revisions')
    .where({ design_id: design.id })
    .whereNot({ id: revision.id })
    .whereIn('state', states)
    .pluck<string[]>('id');
  const others: StoredRevision[] = [];
  for (const id of ids) others.push(await loadRevision(trx, id));
  return others.sort((a, b) => (order(a) < order(b) ? -1 : 1));
}

/** Signs the release, leaves the record, and tells earlier releases of the design that they may be superseded. */
export async function release(open: OpenStep, { statement, signedDigest }: Sent<'release'>): Promise<void> {
  const { actor, revision } = open;
  const next = decide(open, { type: 'release', actor });
  await sign(open, 'release', signedDigest, statement);
  const { releaseNumber, recordId, digest } = await keepRecord(open);
  await conclude(open, next, {
    deed: 'released',
    detail: { releaseNumber, recordId, digest, statement },
    notices: [{ to: await readersOfReleases(open), means: `Its record is ${releaseNumber}.` }],
  });
  for (const other of await othersOf(open, ['released'])) {
    if (order(other) < order(revision))
      await conveyTo(open, other, { laterReleased: revision.letter }, 'laterReleased');
  }
}

export async function supersede(open: OpenStep, { reason }: Sent<'supersede'>): Promise<void> {
  const next = decide(open, { type: 'supersede', actor: open.actor });
  const by = open.revision.facts.laterReleased ?? '';
  await conclude(open, next, {
    deed: 'superseded',
    detail: { by, reason },
    notices: [{ to: await readersOfReleases(open), means: `Use revision ${by} of ${open.design.number} instead.` }],
  });
}

/** Recalls a release. Earlier releases are no longer superseded by it; the latest other release counts for them. */
export async function recall(open: OpenStep, { reason, signedDigest }: Sent<'recall'>): Promise<void> {
  const { actor, revision } = open;
  const next = decide(open, { type: 'recall', actor });
  await sign(open, 'recall', signedDigest, reason);
  await conclude(open, next, {
    deed: 'recalled',
    detail: { reason },
    notices: [
      { to: await readersOfReleases(open), means: `Do not build or ship ${nameOf(open)} until you hear more.` },
    ],
  });
  const released = await othersOf(open, ['released']);
  for (const other of released) {
    if (other.facts.laterReleased !== revision.letter) continue;
    const later = released.filter((candidate) => order(candidate) > order(other)).at(-1);
    await conveyTo(open, other, { laterReleased: later?.letter ?? null }, 'laterRecalled');
  }
}
