import {
  comparisonSign,
  estimateMargins,
  marginOf,
  requirementQuantities,
  shownByWords,
  verdictWords,
} from '#contracts/requirement';
import type { Comparison, Margin, Requirement, Verdict } from '#contracts/requirement';
import type { Estimate } from '#contracts/estimates';
import { formatNumber, formatSigned } from '../../lib/format';
import { formatInUnit, unitScale } from '../../lib/quantities';
import type { Dimension } from '../../lib/quantities';
import { classNames } from '../../ui/class-names';
import { previousFigures } from './freshness-words';
import { Quantity } from '../../ui/quantity';
import { Status } from '../../ui/status';
import type { Tone } from '../../ui/status';

const tones: Record<Verdict, Tone> = { meets: 'good', marginal: 'attention', fails: 'bad', notComputed: 'neutral' };
const fills: Record<Verdict, string> = {
  meets: 'bg-verdigris',
  marginal: 'bg-amber',
  fails: 'bg-cinnabar',
  notComputed: 'bg-graphite',
};

/** Share of the bar that a value fills: the limit stands in its middle, twice the limit at its end. */
export const barShare = (value: number, limit: number): number | null =>
  limit > 0 ? Math.min(1, Math.max(0, Math.abs(value) / (2 * limit))) : null;

/** One limit and how far a figure is from it, whatever asked for it. */
export interface LimitLine {
  key: string;
  title: string;
  comparison: Comparison;
  limit: number;
  dimension: Dimension;
  unit: string;
  value: number | null;
}

const dimensionOf = ({ quantity }: Requirement): Dimension => requirementQuantities[quantity].dimension;

const lineOf = ({ requirement, value }: Margin): LimitLine => ({
  key: requirement.id,
  title: requirement.title,
  comparison: requirement.comparison,
  limit: requirement.limit,
  dimension: dimensionOf(requirement),
  unit: requirement.unit,
  value,
});

/** Margin and verdict by the same rule as every requirement. */
const judged = ({ comparison, limit, value }: LimitLine) =>
  marginOf({ id: '', title: '', quantity: 'loadPower', comparison, limit, unit: '', shownBy: 'estimate' }, value);

/** The figure as a bar; a notch marks the limit and the side where it would fail is hatched. */
function MarginBar({ line, verdict }: { line: LimitLine; verdict: Verdict }) {
  const share = line.value === null ? null : barShare(line.value, line.limit);
  if (share === null) return null;
  return (
    <div aria-hidden className="relative my-0.5 h-1.5 overflow-hidden rounded-[2px] bg-wash">
      <div
        className={classNames('absolute inset-y-0 w-1/2', line.comparison === 'atLeast' ? 'left-0' : 'right-0')}
        style={{ backgroundImage: 'repeating-linear-gradient(135deg, var(--rule) 0 2px, transparent 2px 5px)' }}
      />
      <div className={classNames('absolute inset-y-0 left-0', fills[verdict])} style={{ width: `${share * 100}%` }} />
      <div className="absolute inset-y-0 left-1/2 w-0.5 -translate-x-1/2 bg-ink" />
    </div>
  );
}

/** A difference in the unit that the limit was written in, and as a share of it. */
function marginText({ dimension, unit }: LimitLine, margin: number, relative: number | null): string {
  const scale = unitScale(dimension, unit);
  const own = scale === null ? formatSigned(margin) : `${formatSigned(margin / scale)} ${unit}`.trim();
  return relative === null ? own : `${own} · ${formatSigned(relative * 100, 2)} %`;
}

function MarginLine({ line }: { line: LimitLine }) {
  const { title, comparison, limit, dimension, unit, value } = line;
  const { margin, relative, verdict } = judged(line);
  return (
    <li className="flex flex-col gap-0.5 border-b border-rule py-2 last:border-b-0">
      <p className="flex items-baseline justify-between gap-3">
        <span className="font-semibold">{title}</span>
        <span className="whitespace-nowrap text-graphite">
          {comparisonSign[comparison]} {formatInUnit(limit, dimension, unit)}
        </span>
      </p>
      <MarginBar {...{ line, verdict }} />
      <p className="flex items-baseline justify-between gap-3">
        {margin === null ? (
          <span className="text-graphite italic">not computed</span>
        ) : (
          <span className="font-mono text-sm">{marginText(line, margin, relative)}</span>
        )}
        <Status tone={tones[verdict]}>{verdictWords[verdict]}</Status>
      </p>
      {value === null ? null : (
        <p className="sr-only">
          Here: <Quantity value={value} dimension={dimension} unit={unit} />
        </p>
      )}
    </li>
  );
}

interface MarginsProps {
  requirements: readonly Requirement[];
  estimate: Estimate | null;
  /** Limits of the brief besides its requirements, such as the room there is. */
  others: readonly LimitLine[];
  previous: boolean;
}

/** The requirements of the brief with how far the estimate is from each, then those that only the bench can show. */
export function RequirementMargins({ requirements, estimate, others, previous }: MarginsProps) {
  const lines = [...estimateMargins([...requirements], estimate).map(lineOf), ...others];
  const benchOnly = requirements.filter(({ shownBy }) => shownBy === 'bench');
  if (requirements.length === 0 && others.length === 0)
    return <p className="text-graphite">The brief has no requirements yet.</p>;
  return (
    <div className={classNames(previous && previousFigures)}>
      <ul>
        {lines.map((line) => (
          <MarginLine key={line.key} line={line} />
        ))}
      </ul>
      {benchOnly.length > 0 ? (
        <ul className="border-t border-rule pt-2 text-sm text-graphite">
          {benchOnly.map((requirement) => (
            <li key={requirement.id} className="flex justify-between gap-3 py-0.5">
              <span>{requirement.title}</span>
              <span>
                {comparisonSign[requirement.comparison]}{' '}
                {formatInUnit(requirement.limit, dimensionOf(requirement), requirement.unit)}, {shownByWords.bench}
              </span>
            </li>
          ))}
        </ul>
      ) : null}
    </div>
  );
}

/** “meets 3 of 4” for a line where there is no room for more. */
export function marginsInWords(requirements: readonly Requirement[], estimate: Estimate | null): string {
  const margins = estimateMargins([...requirements], estimate);
  const met = margins.filter(({ verdict }) => verdict === 'meets' || verdict === 'marginal').length;
  return margins.length === 0 ? '' : `meets ${formatNumber(met, 1)} of ${margins.length}`;
}
