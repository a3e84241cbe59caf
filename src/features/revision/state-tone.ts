import type { RevisionState } from '#workflows/revision';
import type { Tone } from '../../ui/status';

/** How a state is coloured and shaped, everywhere. */
export const stateTone: Record<RevisionState, Tone> = {
  draft: 'active',
  inReview: 'active',
  changesRequested: 'attention',
  clearedForBench: 'active',
  onBench: 'active',
  nonconforming: 'bad',
  releaseReview: 'active',
  released: 'good',
  superseded: 'neutral',
  recalled: 'bad',
  reworked: 'neutral',
  abandoned: 'neutral',
};
