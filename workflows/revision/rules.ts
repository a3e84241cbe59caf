import type { Actor, RevisionEventType, RevisionFacts, Role, RunResult } from './vocabulary';
import { roleWords } from './vocabulary';

/** What an event carries besides the actor, as far as the rules look at it. */
export type RuleEvent =
  | { type: Exclude<RevisionEventType, 'signResult' | 'closeRemark'>; actor: Actor }
  | { type: 'signResult'; actor: Actor; result?: RunResult }
  | { type: 'closeRemark'; actor: Actor; remarkId?: string };

/** `true`, or the reason why not in words that a person can act on. */
export type Verdict = true | string;
type Rule = (facts: RevisionFacts, event: RuleEvent) => Verdict;

const holds =
  (...allowed: Role[]): Rule =>
  (_facts, { actor }) =>
    allowed.some((role) => actor.roles.includes(role)) ||
    `This needs the role ${allowed.map((role) => roleWords[role]).join(' or ')}.`;

const notOwnWork: Rule = (facts, { actor }) =>
  !facts.authorIds.includes(actor.id) ||
  'You wrote, edited or submitted this revision; somebody else has to decide on it.';

const noObstacles: Rule = ({ submitObstacles }) => submitObstacles.length === 0 || submitObstacles.join(' ');

const notYetApproved: Rule = (facts, { actor }) =>
  !facts.approvedBy.includes(actor.id) || 'You have approved this revision already.';

const blockingClosed: Rule = ({ openBlockingRemarks }) =>
  openBlockingRemarks === 0 ||
  (openBlockingRemarks === 1
    ? 'One blocking remark is still open.'
    : `${openBlockingRemarks} blocking remarks are still open.`);

const remarkIsOpen: Rule = (facts, event) => {
  if (facts.openRemarkIds.length === 0) return 'No remark is open.';
  if (event.type !== 'closeRemark' || event.remarkId === undefined) return true;
  return facts.openRemarkIds.includes(event.remarkId) || 'This remark is closed already.';
};

const everyReadingTaken: Rule = ({ missingReadings }) =>
  missingReadings.length === 0 || `Still without a reading: ${missingReadings.join(', ')}.`;

const resultFollowsReadings: Rule = (facts, event) => {
  if (event.type !== 'signResult' || event.result !== 'conforming') return true;
  return (
    facts.readingsMeet === true ||
    'A reading misses its requirement, so the result cannot be conforming; sign it as nonconforming.'
  );
};

const evidenceComplete: Rule = (facts) => {
  const missing: string[] = [];
  if (facts.approvedBy.length < facts.approvalsNeeded) {
    missing.push(`${facts.approvedBy.length} of ${facts.approvalsNeeded} approvals`);
  }
  if (facts.lastResult === null) missing.push('no signed bench result');
  if (facts.lastResult === 'nonconforming' && !facts.concessionGranted) {
    missing.push('the bench result is nonconforming and no concession has been granted');
  }
  return missing.length === 0 || `The evidence is not complete: ${missing.join('; ')}.`;
};

const successorReleased: Rule = ({ laterReleased }) =>
  laterReleased !== null || 'No later revision of this design has been released.';

const notContinued: Rule = ({ continuedAs }) =>
  continuedAs === null || `Revision ${continuedAs} was drafted from this one already.`;

/**
 * Rules of each event, in the order in which a refusal is told: first those that look at who asks, then those that look at
 * how things stand. The chart decides in which states the event exists.
 */
const rulesOf: Record<RevisionEventType, { who: readonly Rule[]; what: readonly Rule[] }> = {
  submit: { who: [holds('designer')], what: [noObstacles] },
  remark: { who: [holds('reviewer', 'designer', 'releaseAuthority')], what: [] },
  closeRemark: { who: [holds('reviewer', 'designer', 'releaseAuthority')], what: [remarkIsOpen] },
  approve: { who: [holds('reviewer'), notOwnWork, notYetApproved], what: [blockingClosed] },
  requestChanges: { who: [holds('reviewer', 'releaseAuthority'), notOwnWork], what: [] },
  rework: { who: [holds('designer')], what: [notContinued] },
  startRun: { who: [holds('bench')], what: [] },
  stopRun: { who: [holds('bench')], what: [] },
  signResult: { who: [holds('bench')], what: [everyReadingTaken, resultFollowsReadings] },
  retest: { who: [holds('bench')], what: [] },
  grantConcession: { who: [holds('releaseAuthority'), notOwnWork], what: [] },
  returnToBench: { who: [holds('releaseAuthority'), notOwnWork], what: [] },
  release: { who: [holds('releaseAuthority'), notOwnWork], what: [evidenceComplete, blockingClosed] },
  supersede: { who: [holds('releaseAuthority'), notOwnWork], what: [successorReleased] },
  recall: { who: [holds('releaseAuthority')], what: [] },
  abandon: { who: [holds('designer', 'releaseAuthority')], what: [] },
};

const firstRefusal = (rules: readonly Rule[], facts: RevisionFacts, event: RuleEvent): Verdict => {
  for (const rule of rules) {
    const verdict = rule(facts, event);
    if (verdict !== true) return verdict;
  }
  return true;
};

/** Whether this person may ever send this event for this revision, however things stand. */
export const mayBeSentBy = (facts: RevisionFacts, event: RuleEvent): Verdict =>
  firstRefusal(rulesOf[event.type].who, facts, event);

/** Whether the event's own rules allow it, state aside. The first refusal is the answer. */
export const mayHappen = (facts: RevisionFacts, event: RuleEvent): Verdict => {
  const verdict = mayBeSentBy(facts, event);
  return verdict === true ? firstRefusal(rulesOf[event.type].what, facts, event) : verdict;
};

/** Approvals needed are reached once this approval is counted. */
export const completesApproval = (facts: RevisionFacts): boolean =>
  facts.approvedBy.length + 1 >= facts.approvalsNeeded;
