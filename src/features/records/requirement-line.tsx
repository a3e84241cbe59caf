import type { ReactNode } from 'react';
import { comparisonSign, requirementQuantities, verdictWords } from '#contracts/requirement';
import type { Requirement, Verdict } from '#contracts/requirement';
import { Quantity } from '../../ui/quantity';
import { Status } from '../../ui/status';
import type { Tone } from '../../ui/status';

const tones: Record<Verdict, Tone> = { meets: 'good', marginal: 'attention', fails: 'bad', notComputed: 'neutral' };

interface RequirementLineProps {
  requirement: Requirement;
  /** The figure held against the limit: estimated or measured. */
  shown: { words: string; value: number | null; absent: string; after?: ReactNode };
  margin: number | null;
  verdict: Verdict;
}

/** One requirement of a release with its figure, margin and verdict; columns on paper, two lines on a phone. */
export function RequirementLine({ requirement, shown, margin, verdict }: RequirementLineProps) {
  const { dimension } = requirementQuantities[requirement.quantity];
  const unit = requirement.unit === '' ? {} : { unit: requirement.unit };
  const words = verdict === 'notComputed' ? shown.absent : verdictWords[verdict];
  return (
    <li className="grid grid-cols-2 items-baseline gap-x-4 border-b border-rule py-1.5 sm:grid-cols-[minmax(0,3fr)_minmax(0,2fr)_minmax(0,4fr)_minmax(0,3fr)_6rem] print:grid-cols-[3fr_2fr_4fr_3fr_6rem]">
      <span className="font-medium wrap-anywhere max-sm:col-span-2">{requirement.title}</span>
      <span>
        {comparisonSign[requirement.comparison]} <Quantity value={requirement.limit} dimension={dimension} {...unit} />
      </span>
      <span>
        <span className="text-graphite">{shown.words}</span>{' '}
        <Quantity value={shown.value} dimension={dimension} {...unit} absent={shown.absent} />
        {shown.after}
      </span>
      <span>
        {margin === null ? null : (
          <>
            <span className="text-graphite">margin</span>{' '}
            <Quantity value={margin} dimension={dimension} {...unit} signed />
          </>
        )}
      </span>
      <Status tone={tones[verdict]}>{words}</Status>
    </li>
  );
}
