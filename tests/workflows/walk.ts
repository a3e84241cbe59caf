import { eventsOf, RevisionFacts, step } from '#workflows/revision';
import type { Actor, RevisionEvent, RevisionEventType, RevisionState } from '#workflows/revision';
import { freshFacts } from './people';

export interface Stop {
  state: RevisionState;
  facts: RevisionFacts;
  /** Events that led here from the draft. */
  path: string[];
}

/** Ids end in “!” where the remark blocks; those of closed remarks are used again, which keeps the walk finite. */
function freeId({ openRemarkIds }: RevisionFacts, mark: string): string {
  const taken = openRemarkIds.map((id) => id.replace('!', ''));
  return `${['a', 'b', 'c'].find((id) => !taken.includes(id)) ?? 'd'}${mark}`;
}

/** Every form of an event worth trying in the given facts: with each open remark, each result, blocking or not. */
export function formsOf(type: RevisionEventType, actor: Actor, facts: RevisionFacts): RevisionEvent[] {
  switch (type) {
    case 'remark':
      return [true, false].map((blocking) => ({ type, actor, remarkId: freeId(facts, blocking ? '!' : ''), blocking }));
    case 'closeRemark':
      return [...facts.openRemarkIds, 'gone'].map((remarkId) => ({
        type,
        actor,
        remarkId,
        blocking: remarkId.endsWith('!'),
      }));
    case 'startRun':
      return [{ type, actor, runId: 'run', missingReadings: ['Power into the load'] }];
    case 'signResult':
      return [
        { type, actor, result: 'conforming' },
        { type, actor, result: 'nonconforming' },
      ];
    case 'rework':
      return [{ type, actor, letter: 'B' }];
    default:
      return [{ type, actor }];
  }
}

/** What other parts of the server write into the facts between steps: readings taken, a later release. */
function outsideChanges({ state, facts }: Stop): RevisionFacts[] {
  if (state === 'onBench') {
    return [
      { ...facts, missingReadings: [], readingsMeet: true },
      { ...facts, missingReadings: [], readingsMeet: false },
    ];
  }
  return state === 'released' ? [{ ...facts, laterReleased: 'B' }] : [];
}

/** Walks the whole graph from a fresh draft, at most two open remarks at a time, and returns every stop on it. */
export function everyStop(actors: readonly Actor[]): Stop[] {
  const seen = new Map<string, Stop>();
  const waiting: Stop[] = [];
  const arrive = (stop: Stop): void => {
    const key = JSON.stringify([stop.state, RevisionFacts.parse(stop.facts)]);
    if (stop.facts.openRemarkIds.length > 2 || seen.has(key)) return;
    seen.set(key, stop);
    waiting.push(stop);
  };
  for (const approvalsNeeded of [1, 2]) {
    arrive({ state: 'draft', facts: { ...freshFacts, approvalsNeeded }, path: [] });
    arrive({ state: 'draft', facts: { ...freshFacts, approvalsNeeded, submitObstacles: ['Faulty.'] }, path: [] });
  }
  for (let stop = waiting.shift(); stop !== undefined; stop = waiting.shift()) {
    const { state, facts, path } = stop;
    for (const changed of outsideChanges(stop)) arrive({ state, facts: changed, path });
    for (const actor of actors) {
      for (const type of eventsOf(state)) {
        for (const event of formsOf(type, actor, facts)) {
          const outcome = step(state, facts, event);
          if (outcome.accepted) arrive({ state: outcome.state, facts: outcome.facts, path: [...path, type] });
        }
      }
    }
  }
  return [...seen.values()];
}
