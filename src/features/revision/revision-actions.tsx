import { useNavigate } from 'react-router-dom';
import type { Revision } from '#contracts/revisions';
import { stateWords } from '#workflows/revision';
import type { RevisionEventType } from '#workflows/revision';
import { tell } from '../../ui/toast';
import { EventActions } from './event-actions';
import type { BeforeSend } from './event-subject';
import { revisionSubject } from './revision-subject';

interface RevisionActionsProps {
  revision: Revision;
  /** Finishes a pending save and answers the revision with its newest version, before anything is sent. */
  beforeSend?: BeforeSend | undefined;
  /** Steps that belong to this page; all of the chart's unless given. */
  only?: readonly RevisionEventType[];
  /** The page has another primary action: all steps stand in the menu. */
  quiet?: boolean;
  /** Told after a step, in place of going where the step leads. */
  onDone?: (revision: Revision, event: RevisionEventType) => void;
}

/** Where a step takes the person who took it; null where that is the same page. */
function placeAfter(revision: Revision, event: RevisionEventType): string | null {
  if (event === 'rework')
    return revision.continuedAs === null ? null : `/designs/${revision.design.id}/${revision.continuedAs}`;
  if (event === 'release') return revision.recordId === null ? null : `/records/${revision.recordId}`;
  if (event !== 'startRun') return null;
  const run = revision.runs.find(({ state }) => state === 'open');
  return run ? `/bench/runs/${run.id}` : null;
}

/** The primary action of a revision, named by its verb, and the other steps of where it stands. */
export function RevisionActions({ revision, beforeSend, only, quiet, onDone }: RevisionActionsProps) {
  const navigate = useNavigate();
  const done = (after: Revision, event: RevisionEventType) => {
    tell.done(`${after.design.number} ${after.letter}: ${stateWords[after.state].toLowerCase()}`);
    if (onDone) {
      onDone(after, event);
      return;
    }
    const place = placeAfter(after, event);
    if (place !== null) void navigate(place);
  };
  return <EventActions subject={revisionSubject(revision)} {...{ beforeSend, only, quiet }} onDone={done} />;
}
