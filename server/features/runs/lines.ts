import type { Estimate } from '#contracts/estimates';
import { estimatedValue, marginOf } from '#contracts/requirement';
import type { Requirement } from '#contracts/requirement';
import type { Reading, RunLine } from '#contracts/runs';
import type { RevisionFacts } from '#workflows/revision';

/** Requirements that a run has to show. */
export const benchRequirements = (requirements: readonly Requirement[]): Requirement[] =>
  requirements.filter(({ shownBy }) => shownBy !== 'estimate');

/** One line for each bench requirement: the mean of the readings that stand, against the limit and beside the estimate. */
export function linesOf(
  requirements: readonly Requirement[],
  estimate: Estimate | null,
  readings: readonly Reading[],
): RunLine[] {
  return benchRequirements(requirements).map((requirement) => {
    const standing = readings.filter(
      ({ requirementId, struck }) => requirementId === requirement.id && struck === null,
    );
    const sum = standing.reduce((total, { value }) => total + value, 0);
    const measured = standing.length === 0 ? null : sum / standing.length;
    const { margin, verdict } = marginOf(requirement, measured);
    const estimated = estimate === null ? null : estimatedValue(requirement.quantity, estimate);
    return { requirement, estimated, measured, readings: standing.length, margin, verdict };
  });
}

/** What the rules have to know of the readings. A line without a reading makes no judgement possible. */
export function benchFacts(lines: readonly RunLine[]): Pick<RevisionFacts, 'missingReadings' | 'readingsMeet'> {
  const missingReadings = lines.filter(({ measured }) => measured === null).map(({ requirement }) => requirement.title);
  const meet = lines.every(({ margin }) => margin !== null && margin >= 0);
  return { missingReadings, readingsMeet: missingReadings.length > 0 ? null : meet };
}
