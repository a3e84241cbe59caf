import { useNavigate } from 'react-router-dom';
import type { Run } from '#contracts/runs';
import type { RunResult } from '#workflows/revision';
import { formatCount } from '../../lib/format';
import { tell } from '../../ui/toast';
import { EventActions } from './event-actions';
import type { EventSubject } from './event-subject';

/** What the standing readings speak for; null while a requirement is without one. */
function readingsSay({ lines }: Run): RunResult | null {
  if (lines.some(({ measured }) => measured === null)) return null;
  return lines.every(({ margin }) => margin === null || margin >= 0) ? 'conforming' : 'nonconforming';
}

export function runSubject(run: Run): EventSubject {
  const missed = run.lines.filter(({ verdict }) => verdict === 'fails').length;
  const standing = run.readings.filter(({ struck }) => struck === null);
  const outside = standing.filter(({ outOfCalibrationReason }) => outOfCalibrationReason !== null).length;
  return {
    revisionId: run.revision.id,
    name: run.number,
    // Steps of a run exist while its revision is on the bench, and nowhere else.
    state: 'onBench',
    version: run.revision.version,
    digest: run.revision.digest,
    availableEvents: run.availableEvents,
    whyNot: run.whyNot,
    readingsSay: readingsSay(run),
    facts: {
      signResult: (
        <ul className="list-disc pl-5">
          <li>
            {formatCount(standing.length, 'standing reading')} for {formatCount(run.lines.length, 'requirement')};{' '}
            {missed === 0 ? 'none is missed' : `${missed} missed`}.
          </li>
          {outside > 0 ? (
            <li>{formatCount(outside, 'reading was', 'readings were')} taken with an instrument out of calibration.</li>
          ) : null}
        </ul>
      ),
    },
  };
}

/** The steps that close a run: sign its result, or stop it. */
export function RunActions({ run }: { run: Run }) {
  const navigate = useNavigate();
  if (run.state !== 'open') return null;
  return (
    <EventActions
      subject={runSubject(run)}
      onDone={(revision, event) => {
        tell.done(event === 'signResult' ? `Result of ${run.number} signed` : `${run.number} stopped`);
        void navigate(`/designs/${revision.design.id}/${revision.letter}`);
      }}
    />
  );
}
