import type { RevisionState } from '#workflows/revision';
import type { Tone } from '../../ui/status';

/** A record is in force, replaced, or recalled. */
export const recordTone = (state: RevisionState): Tone =>
  state === 'released' ? 'good' : state === 'recalled' ? 'bad' : 'neutral';
