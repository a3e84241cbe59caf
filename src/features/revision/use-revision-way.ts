import { useSelector } from '@xstate/react';
import { useMemo } from 'react';
import { createActor, getNextTransitions } from 'xstate';
import { revisionMachine } from '#workflows/revision';
import type { RevisionEventType, RevisionFacts, RevisionState } from '#workflows/revision';

/**
 * The chart needs facts to be restored, and this side does not have them: who may do what is the server's answer
 * (`availableEvents`, `whyNot`). These stand in and are never asked.
 */
const factsOfNobody: RevisionFacts = {
  authorIds: [],
  submitObstacles: [],
  approvalsNeeded: 1,
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
};

export interface WayEvent {
  type: RevisionEventType;
  /** States it may lead to; empty where the revision stays where it is. */
  leadsTo: RevisionState[];
}

/** Events of a restored state in the order of the chart, with where they lead. */
function eventsOfSnapshot(snapshot: ReturnType<typeof restored>): WayEvent[] {
  const found = new Map<RevisionEventType, Set<RevisionState>>();
  for (const { eventType, target } of getNextTransitions(snapshot)) {
    const type = eventType as RevisionEventType;
    const targets = found.get(type) ?? new Set<RevisionState>();
    for (const node of target ?? []) targets.add(node.key as RevisionState);
    found.set(type, targets);
  }
  return [...found].map(([type, targets]) => ({ type, leadsTo: [...targets] }));
}

const restored = (state: RevisionState) => revisionMachine.resolveState({ value: state, context: factsOfNobody });

/** The chart standing where the server says the revision stands: which events exist there and where they lead. */
export function useRevisionWay(state: RevisionState): { state: RevisionState; events: WayEvent[]; ended: boolean } {
  const actor = useMemo(
    () => createActor(revisionMachine, { input: factsOfNobody, snapshot: restored(state) }),
    [state],
  );
  const snapshot = useSelector(actor, (current) => current);
  return useMemo(() => {
    const events = eventsOfSnapshot(snapshot);
    return { state: snapshot.value, events, ended: events.length === 0 };
  }, [snapshot]);
}
