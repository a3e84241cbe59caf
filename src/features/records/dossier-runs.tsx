import type { Dossier } from '#contracts/records';
import { formatCount } from '../../lib/format';
import { Status } from '../../ui/status';
import { RequirementLine } from './requirement-line';

type DossierRun = Dossier['runs'][number];

/** The bench evidence of a release: each run with its lines, and what was unusual about its readings. */
export function DossierRuns({ runs }: { runs: readonly DossierRun[] }) {
  if (runs.length === 0) return <p className="text-graphite">No run.</p>;
  return (
    <ul className="flex flex-col gap-4">
      {runs.map((run) => (
        <li key={run.id} className="flex flex-col gap-1.5">
          <p className="flex flex-wrap items-baseline gap-x-3">
            <span className="font-mono font-semibold">{run.number}</span>
            <Status tone={run.state === 'stopped' ? 'neutral' : run.result === 'conforming' ? 'good' : 'bad'}>
              {run.state === 'stopped' ? 'stopped without a result' : (run.result ?? 'open')}
            </Status>
            <span className="text-graphite">
              specimen <span className="font-mono">{run.specimen}</span>, {run.startedBy.name}
            </span>
          </p>
          <ul className="flex flex-col">
            {run.lines.map((line) => (
              <RequirementLine
                key={line.requirement.id}
                requirement={line.requirement}
                shown={{
                  words: 'measured',
                  value: line.measured,
                  absent: 'not measured',
                  after: <span className="text-sm text-graphite"> ({formatCount(line.readings, 'reading')})</span>,
                }}
                margin={line.margin}
                verdict={line.verdict}
              />
            ))}
          </ul>
          <ReadingNotes run={run} />
          {run.statement === null || run.statement === '' ? null : (
            <p className="wrap-anywhere whitespace-pre-line">{run.statement}</p>
          )}
        </li>
      ))}
    </ul>
  );
}

/** Instruments used, and every reading that was struck through or taken out of calibration. */
function ReadingNotes({ run: { readings } }: { run: DossierRun }) {
  const instruments = [...new Map(readings.map(({ instrument }) => [instrument.id, instrument])).values()];
  const outside = readings.filter(({ outOfCalibrationReason }) => outOfCalibrationReason !== null);
  const struck = readings.filter(({ struck: by }) => by !== null);
  if (instruments.length === 0) return null;
  return (
    <div className="text-sm text-graphite">
      <p>Instruments: {instruments.map(({ number, name }) => `${number} ${name}`).join('; ')}.</p>
      {outside.map(({ id, instrument, outOfCalibrationReason }) => (
        <p key={id} className="wrap-anywhere">
          <Status tone="attention">out of calibration</Status> {instrument.number}: {outOfCalibrationReason}
        </p>
      ))}
      {struck.map((reading) => (
        <p key={reading.id} className="wrap-anywhere">
          Struck through: {reading.struck?.reason} ({reading.struck?.by.name})
        </p>
      ))}
    </div>
  );
}
