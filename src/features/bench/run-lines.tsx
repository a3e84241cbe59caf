import { comparisonSign, requirementQuantities, verdictWords } from '#contracts/requirement';
import type { Verdict } from '#contracts/requirement';
import type { RunLine } from '#contracts/runs';
import { formatCount, formatPercent } from '../../lib/format';
import { Button } from '../../ui/button';
import { Quantity } from '../../ui/quantity';
import { Status } from '../../ui/status';
import type { Tone } from '../../ui/status';

const tones: Record<Verdict, Tone> = { meets: 'good', marginal: 'attention', fails: 'bad', notComputed: 'neutral' };
const words = (verdict: Verdict) => (verdict === 'notComputed' ? 'not measured' : verdictWords[verdict]);

interface RunLinesProps {
  lines: readonly RunLine[];
  /** Opens the entry of a reading for a requirement; null where none may be taken. */
  onMeasure: ((requirementId: string) => void) | null;
}

/** The requirements that this run is to show: limit, estimate, measured mean, margin, verdict. */
export function RunLines({ lines, onMeasure }: RunLinesProps) {
  if (lines.length === 0)
    return (
      <p className="text-graphite">The brief asks nothing of the bench: readings are taken for information only.</p>
    );
  return (
    <ul className="grid gap-3 @2xl:grid-cols-2">
      {lines.map((line) => (
        <li key={line.requirement.id} className="sheet flex flex-col gap-2 p-4">
          <LineFigures line={line} />
          {onMeasure ? (
            <Button
              className="min-h-12 w-full @2xl:min-h-10 @2xl:w-fit"
              aria-label={`Enter a reading for ${line.requirement.title}`}
              onPress={() => onMeasure(line.requirement.id)}
            >
              Enter a reading
            </Button>
          ) : null}
        </li>
      ))}
    </ul>
  );
}

function LineFigures({ line: { requirement, estimated, measured, margin, readings, verdict } }: { line: RunLine }) {
  const { dimension } = requirementQuantities[requirement.quantity];
  const unit = requirement.unit === '' ? {} : { unit: requirement.unit };
  const relative = margin !== null && requirement.limit !== 0 ? margin / Math.abs(requirement.limit) : null;
  const ofEstimate = measured !== null && estimated !== null && estimated !== 0 ? measured / estimated : null;
  return (
    <>
      <div className="flex items-baseline justify-between gap-3">
        <h3 className="min-w-0 wrap-anywhere">{requirement.title}</h3>
        <Status tone={tones[verdict]} className="shrink-0">
          {words(verdict)}
        </Status>
      </div>
      <dl className="grid grid-cols-3 gap-x-3">
        <div>
          <dt className="text-sm text-graphite">Limit</dt>
          <dd>
            {comparisonSign[requirement.comparison]}{' '}
            <Quantity value={requirement.limit} dimension={dimension} {...unit} />
          </dd>
        </div>
        <div>
          <dt className="text-sm text-graphite">Estimate</dt>
          <dd>
            <Quantity value={estimated} dimension={dimension} {...unit} />
          </dd>
        </div>
        <div>
          <dt className="text-sm text-graphite">Measured</dt>
          <dd className="font-semibold">
            <Quantity value={measured} dimension={dimension} {...unit} absent="no reading" />
          </dd>
        </div>
      </dl>
      <p className="text-graphite">
        {margin === null ? (
          'No standing reading yet.'
        ) : (
          <>
            Margin <Quantity value={margin} dimension={dimension} {...unit} signed className="text-ink" />
            {relative === null ? null : ` (${relative > 0 ? '+' : ''}${formatPercent(relative)})`}, mean of{' '}
            {formatCount(readings, 'reading')}
            {ofEstimate === null ? '.' : `; ${formatPercent(ofEstimate)} of the estimate.`}
          </>
        )}
      </p>
    </>
  );
}
