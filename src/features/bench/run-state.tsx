import type { RunSummary } from '#contracts/revisions';
import { Status } from '../../ui/status';
import type { Tone } from '../../ui/status';

type Known = Pick<RunSummary, 'state' | 'result'>;

export function runStateWords({ state, result }: Known): string {
  if (state === 'open') return 'Open';
  if (state === 'stopped') return 'Stopped without a result';
  return result === 'conforming' ? 'Conforming' : 'Nonconforming';
}

function tone({ state, result }: Known): Tone {
  if (state === 'open') return 'active';
  if (state === 'stopped') return 'neutral';
  return result === 'conforming' ? 'good' : 'bad';
}

export const RunState = ({ run }: { run: Known }) => <Status tone={tone(run)}>{runStateWords(run)}</Status>;
