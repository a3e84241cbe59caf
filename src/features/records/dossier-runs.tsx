import type { Dossier } from '#contracts/records';
import { comparisonSign, requirementQuantities, verdictWords } from '#contracts/requirement';
import type { Verdict } from '#contracts/requirement';
import type { RunLine } from '#contracts/runs';
import { formatCount } from '../../lib/format';
import { Quantity } from '../../ui/quantity';
import { Status } from '../../ui/status';
import type { Tone } from '../../ui/status';

type DossierRun = Dossier['runs'][number];
const tones: Record<Verdict, Tone> = { meets: 'good', marginal: 'attention', fails: 'bad', notComputed: 'neutral' };

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
              <LineItem key={line.requirement.id} line={line} />
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

function LineItem({ line: { requirement, measured, readings, margin, verdict } }: { line: RunLine }) {
  const { dimension } = requirementQuantities[requirement.quantity];
  const unit = requirement.unit === '' ? {} : { unit: requirement.unit };
  return (
    <li className="flex flex-wrap items-baseline gap-x-3 border-b border-rule py-1">
      <span className="font-medium">{requirement.title}</span>
      <span>
        {comparisonSign[requirement.comparison]} <Quantity value={requirement.limit} dimension={dimension} {...unit} />
      </span>
      <span className="ml-auto">
        measured <Quantity value={measured} dimension={dimension} {...unit} absent="not measured" />
        {margin === null ? null : (
          <>
            , margin <Quantity value={margin} dimension={dimension} {...unit} signed />
          </>
        )}{' '}
        <span className="text-graphite">({formatCount(readings, 'reading')})</span>
      </span>
      <Status tone={tones[verdict]}>{verdict === 'notComputed' ? 'not measured' : verdictWords[verdict]}</Status>
    </li>
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
