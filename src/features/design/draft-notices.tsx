import type { Revision } from '#contracts/revisions';
import { stateWords } from '#workflows/revision';
import { formatDateTime } from '../../lib/format';
import { Caution } from '../../ui/caution';

/** What was typed here before and had not reached the server; or why the server will not have it. */
export function RestoredNotice({
  restored,
  saved,
  refused,
}: {
  restored: boolean;
  saved: boolean;
  refused: string | null;
}) {
  if (refused !== null)
    return (
      <Caution severity="stop" title="The draft was not saved.">
        {refused} What you typed is kept in this browser.
      </Caution>
    );
  if (!restored) return null;
  return (
    <Caution severity="info" title="Restored.">
      What you typed here last time had not reached the server; it was kept in this browser and{' '}
      {saved ? 'has been saved now' : 'is being saved'}.
    </Caution>
  );
}

/** Why nothing can be typed, and from when the figures are. */
export function FrozenNotice({ revision }: { revision: Revision }) {
  const { submittedAt, estimate, state, whyNotEdit } = revision;
  if (submittedAt === null)
    return (
      <Caution severity="info" title={`${stateWords[state]}, read only.`}>
        {whyNotEdit ?? 'Your roles do not include changing designs.'}
      </Caution>
    );
  return (
    <Caution severity="info" title={`Frozen at submission, ${formatDateTime(submittedAt)}.`}>
      {estimate
        ? `The figures are those stored then, computed by engine ${estimate.engine} for the brief as it stood in version ${revision.brief.version}.`
        : 'No estimate was stored with it; the figures are computed now.'}
    </Caution>
  );
}
