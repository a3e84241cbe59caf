import { getNextSnapshot } from 'xstate';
import { revisionMachine } from './machine';
import type { RevisionEvent } from './machine';
import { mayBeSentBy, mayHappen } from './rules';
import type { RuleEvent, Verdict } from './rules';
import type { Actor, RevisionEventType, RevisionFacts, RevisionState } from './vocabulary';
import { eventTypes, stateWords } from './vocabulary';

export { revisionMachine } from './machine';
export type { RevisionEvent } from './machine';
export type { Verdict } from './rules';
export * from './vocabulary';

/** Events that the chart knows in a state, whoever asks. */
export function eventsOf(state: RevisionState): RevisionEventType[] {
  const { on } = revisionMachine.config.states?.[state] ?? {};
  return eventTypes.filter((type) => on !== undefined && type in on);
}

/** Whether this event may happen now: `true`, or the reason in words. The same answer is offered and enforced. */
export function verdictOn(state: RevisionState, facts: RevisionFacts, event: RuleEvent): Verdict {
  if (!eventsOf(state).includes(event.type)) return `Not possible while the revision is “${stateWords[state]}”.`;
  return mayHappen(facts, event);
}

/** What a person is offered in a state: events that would be accepted, and the reasons for the others of this state. */
export function offersFor(
  state: RevisionState,
  facts: RevisionFacts,
  actor: Actor,
): { availableEvents: RevisionEventType[]; whyNot: Partial<Record<RevisionEventType, string>> } {
  const availableEvents: RevisionEventType[] = [];
  const whyNot: Partial<Record<RevisionEventType, string>> = {};
  for (const type of eventsOf(state)) {
    const verdict = verdictOn(state, facts, { type, actor });
    if (verdict === true) availableEvents.push(type);
    else whyNot[type] = verdict;
  }
  return { availableEvents, whyNot };
}

/** What stands in the way of a refused step: the state it is in, the person who asks, or how things stand. */
export type Obstacle = 'state' | 'person' | 'facts';
export type Step =
  | { accepted: true; state: RevisionState; facts: RevisionFacts }
  | { accepted: false; reason: string; obstacle: Obstacle };

/**
 * Takes one step. Returns the new state name and facts, or the reason why the step is refused; the caller stores both in
 * the transaction of the step.
 */
export function step(state: RevisionState, facts: RevisionFacts, event: RevisionEvent): Step {
  const verdict = verdictOn(state, facts, event);
  if (verdict !== true) {
    const elsewhere = !eventsOf(state).includes(event.type);
    const obstacle = elsewhere ? 'state' : mayBeSentBy(facts, event) === true ? 'facts' : 'person';
    return { accepted: false, reason: verdict, obstacle };
  }
  const next = getNextSnapshot(revisionMachine, revisionMachine.resolveState({ value: state, context: facts }), event);
  return { accepted: true, state: next.value, facts: next.context };
}
