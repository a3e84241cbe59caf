import { revisionMachine } from '#workflows/revision';
import type { RevisionEventType, RevisionState } from '#workflows/revision';

/** Steps that carry a revision from draft to release when nothing goes wrong. */
const onward: readonly RevisionEventType[] = ['submit', 'approve', 'startRun', 'signResult', 'release'];

export type Stage = 'draft' | 'review' | 'bench' | 'release';
const stageOfMainState: Partial<Record<RevisionState, Stage>> = {
  draft: 'draft',
  inReview: 'review',
  clearedForBench: 'bench',
  onBench: 'bench',
  releaseReview: 'release',
  released: 'release',
};
/** The side states hang on a stage of the way; those that may hang on several end or leave it. */
const stageOfSideState: Partial<Record<RevisionState, Stage>> = {
  nonconforming: 'bench',
  superseded: 'release',
  recalled: 'release',
};

/** States of the straight way, read from the chart by taking the first target of each onward step. */
export function mainWay(): RevisionState[] {
  const way: RevisionState[] = ['draft'];
  for (const event of onward) {
    const here = way[way.length - 1];
    const node = here === undefined ? undefined : revisionMachine.states[here];
    const [target] = node?.on[event]?.find((transition) => transition.target !== undefined)?.target ?? [];
    if (target) way.push(target.key as RevisionState);
  }
  return way;
}

/** The gates in the order of the chart. */
export const stages: readonly Stage[] = [...new Set(mainWay().map((state) => stageOfMainState[state]))].filter(
  (stage) => stage !== undefined,
);

export interface Standing {
  /** Last stage reached; null where the state itself does not tell. */
  stage: Stage | null;
  /** The state stands beside the straight way. */
  aside: boolean;
}

export function standingOf(state: RevisionState): Standing {
  const main = stageOfMainState[state];
  if (main !== undefined) return { stage: main, aside: false };
  return { stage: stageOfSideState[state] ?? null, aside: true };
}
