import type { BriefDocument } from '#contracts/briefs';
import type { Issue } from '#contracts/error';
import type { Estimate } from '#contracts/estimates';
import { readDesignDocument } from '#physics/design-document';
import type { DesignDocument } from '#physics/design-document';
import type { Deps } from '../../app';
import { DomainError } from '../../errors';
import { benchRequirements } from '../runs/reads';

/** What stands between a draft and its submission. */
export interface DraftCheck {
  /** Faults of the document, with paths inside it. */
  issues: Issue[];
  /** Reasons in words, empty when the draft can be submitted. */
  obstacles: string[];
  /** What submission would freeze; null where there is a fault. */
  sound: { document: DesignDocument; estimate: Estimate } | null;
}

/** Above this share of the power that goes in, an energy balance is not to be trusted. */
const largestResidual = 0.005;

function faultsInWords(issues: readonly Issue[]): string {
  const [first] = issues;
  const at = first === undefined || first.path === '' ? '' : ` at ${first.path}`;
  return issues.length === 1
    ? `The document has a fault${at}: ${first?.message ?? ''}.`
    : `The document has ${issues.length} faults, the first${at}: ${first?.message ?? ''}.`;
}

function distrust({ response, power }: Estimate): string[] {
  const residual = power.residual === null ? 0 : Math.abs(power.residual);
  return [
    ...(response.converged ? [] : ['The estimate did not converge, so there is nothing to rely on yet.']),
    ...(response.converged && response.loadPower === null ? ['The power into the load was not computed.'] : []),
    ...(residual > largestResidual
      ? [
          `The energy balance of the estimate is off by ${(residual * 100).toFixed(2)} %; above 0.5 % it is not to be trusted.`,
        ]
      : []),
  ];
}

function briefObstacles(brief: BriefDocument): string[] {
  return benchRequirements(brief.requirements).length > 0
    ? []
    : ['The brief has no requirement that the bench is to show; add at least one to it.'];
}

/**
 * Reads a draft as typed and estimates it under the brief's vibration. Never throws: whoever opens a draft must see it, with
 * whatever is wrong.
 */
export async function checkDraft(
  { estimator, log }: Pick<Deps, 'estimator' | 'log'>,
  draft: Record<string, unknown>,
  brief: BriefDocument,
): Promise<DraftCheck> {
  const ofBrief = briefObstacles(brief);
  const faulty = (issues: Issue[]): DraftCheck => ({
    issues,
    obstacles: [faultsInWords(issues), ...ofBrief],
    sound: null,
  });
  const reading = readDesignDocument(draft);
  if (!reading.ok) return faulty(reading.issues.map(({ document: _which, ...issue }) => issue));
  const { document } = reading;
  const { lowest, highest } = brief.temperature;
  try {
    const estimate = await estimator.estimate({
      design: document,
      vibration: brief.vibration,
      temperatureRange: { coldest: lowest, hottest: highest },
    });
    return { issues: [], obstacles: [...distrust(estimate), ...ofBrief], sound: { document, estimate } };
  } catch (error) {
    if (error instanceof DomainError && error.code === 'invalid') {
      const issues = (error.issues ?? [])
        .filter(({ path }) => !path.startsWith('vibration'))
        .map((issue) => ({ ...issue, path: issue.path.replace(/^design\.?/, '') }));
      if (issues.length > 0) return faulty(issues);
      return { issues: [], obstacles: ['The vibration of the brief cannot be read.', ...ofBrief], sound: null };
    }
    if (!(error instanceof DomainError)) log.error({ err: error }, 'A draft could not be estimated');
    const why = error instanceof DomainError ? ` ${error.message}` : '';
    return { issues: [], obstacles: [`The estimate could not be computed.${why}`, ...ofBrief], sound: null };
  }
}
