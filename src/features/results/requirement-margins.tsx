import {
  comparisonSign,
  estimateMargins,
  requirementQuantities,
  shownByWords,
  verdictWords,
} from '#contracts/requirement';
import type { Margin, Requirement, Verdict } from '#contracts/requirement';
import type { Estimate } from '#contracts/estimates';
import { formatNumber, formatSigned } from '../../lib/format';
import { formatInUnit, unitScale } from '../../lib/quantities';
import type { Dimension } from '../../lib/quantities';
import { classNames } from '../../ui/class-names';
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

/** The figure as a bar; a notch marks the limit and the side where it would fail is hatched. */
function MarginBar({ margin }: { margin: Margin }) {
  const { value, requirement, verdict } = margin;
  const share = value === null ? null : barShare(value, requirement.limit);
  if (share === null) return null;
  const failsBelow = requirement.comparison === 'atLeast';
  return (
    <div aria-hidden className="relative my-0.5 h-1.5 overflow-hidden rounded-[2px] bg-wash">
      <div
        className={classNames('absolute inset-y-0 w-1/2', failsBelow ? 'left-0' : 'right-0')}
        style={{
          backgroundImage: 'repeating-linear-gradient(135deg, var(--rule) 0 2px, transparent 2px 5px)',
        }}
      />
      <div className={classNames('absolute inset-y-0 left-0', fills[verdict])} style={{ width: `${share * 100}%` }} />
      <div className="absolute inset-y-0 left-1/2 w-0.5 -translate-x-1/2 bg-ink" />
    </div>
  );
}

const dimensionOf = ({ quantity }: Requirement): Dimension => requirementQuantities[quantity].dimension;

/** A difference in the unit that the requirement was written in. */
function marginText({ requirement, margin, relative }: Margin): string {
  if (margin === null) return '';
  const scale = unitScale(dimensionOf(requirement), requirement.unit);
  const own = scale === null ? null : `${formatSigned(margin / scale)} ${requirement.unit}`.trim();
  const share = relative === null ? null : `${formatSigned(relative * 100, 2)} %`;
  return [own ?? formatSigned(margin), share].filter((part) => part !== null).join(' · ');
}

function MarginLine({ margin }: { margin: Margin }) {
  const { requirement, value, verdict } = margin;
  const dimension = dimensionOf(requirement);
  return (
    <li className="flex flex-col gap-0.5 border-b border-rule py-2 last:border-b-0">
      <p className="flex items-baseline justify-between gap-3">
        <span className="font-semibold">{requirement.title}</span>
        <span className="whitespace-nowrap text-graphite">
          {comparisonSign[requirement.comparison]} {formatInUnit(requirement.limit, dimension, requirement.unit)}
        </span>
      </p>
      <MarginBar margin={margin} />
      <p className="flex items-baseline justify-between gap-3">
        {value === null ? (
          <span className="text-graphite italic">not computed</span>
        ) : (
          <span className="font-mono text-sm">{marginText(margin)}</span>
        )}
        <Status tone={tones[verdict]}>{verdictWords[verdict]}</Status>
      </p>
      {value === null ? null : (
        <p className="sr-only">
          Estimated: <Quantity value={value} dimension={dimension} unit={requirement.unit} />
        </p>
      )}
    </li>
  );
}

interface MarginsProps {
  requirements: readonly Requirement[];
  estimate: Estimate | null;
  previous: boolean;
}

/** The requirements of the brief with how far the estimate is from each, then those that only the bench can show. */
export function RequirementMargins({ requirements, estimate, previous }: MarginsProps) {
  const margins = estimateMargins([...requirements], estimate);
  const benchOnly = requirements.filter(({ shownBy }) => shownBy === 'bench');
  if (requirements.length === 0) return <p className="text-graphite">The brief has no requirements yet.</p>;
  return (
    <div className={classNames('transition-opacity', previous && 'opacity-60')}>
      <ul>
        {margins.map((margin) => (
          <MarginLine key={margin.requirement.id} margin={margin} />
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
