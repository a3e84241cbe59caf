import { requirementQuantities } from '#contracts/requirement';
import type { Revision } from '#contracts/revisions';
import { formatCount } from '../../lib/format';
import type { Choice } from '../../ui/select';
import type { EventSubject } from './event-subject';

const words = (name: string) =>
  name
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .toLowerCase()
    .replace(/^./, (first) => first.toUpperCase());

/** A path of the document or the estimate in words: `magnets.0.length` is “Magnets 1, length”. */
export function targetWords(path: string): string {
  const result = Object.values(requirementQuantities).find((each) => each.path.join('.') === path);
  if (result) return result.label;
  const steps = path.split('.').map((step) => (/^\d+$/.test(step) ? String(Number(step) + 1) : words(step)));
  return steps.reduce((sentence, step, index) => {
    if (index === 0) return step;
    return /^\d+$/.test(step) ? `${sentence} ${step}` : `${sentence}, ${step.charAt(0).toLowerCase()}${step.slice(1)}`;
  }, '');
}

function leafPaths(value: unknown, at: string, into: string[]): void {
  if (into.length > 200) return;
  if (Array.isArray(value) && value.every((each) => typeof each !== 'object')) into.push(at);
  else if (value !== null && typeof value === 'object')
    for (const [key, inner] of Object.entries(value)) leafPaths(inner, at === '' ? key : `${at}.${key}`, into);
  else if (at !== 'format') into.push(at);
}

/** What a remark on this revision can be about: each value of its document, each result of its estimate. */
export function targetsOf(revision: Revision): Choice[] {
  const paths: string[] = [];
  leafPaths(revision.document, '', paths);
  const results = Object.values(requirementQuantities).map((each) => each.path.join('.'));
  return [
    ...results.map((path) => ({ value: path, label: targetWords(path), detail: 'result' })),
    ...paths.map((path) => ({ value: path, label: targetWords(path) })),
  ];
}

function facts(revision: Revision): EventSubject['facts'] {
  const { signatures, approvalsNeeded, remarks, runs } = revision;
  const approvals = signatures.filter(({ event }) => event === 'approve').length;
  const openRemarks = remarks.filter(({ closed }) => closed === null).length;
  const signedRuns = runs.filter(({ state }) => state === 'signed');
  const approvalWords = `${approvals} of ${formatCount(approvalsNeeded, 'approval')} so far; ${formatCount(openRemarks, 'open remark')}.`;
  return {
    approve: <p>{approvalWords}</p>,
    release: (
      <ul className="list-disc pl-5">
        <li>{approvalWords}</li>
        {signedRuns.map((run) => (
          <li key={run.id}>
            Run {run.number}: {run.result ?? 'no result'}.
          </li>
        ))}
        {signatures.some(({ event }) => event === 'grantConcession') ? <li>A concession was granted.</li> : null}
      </ul>
    ),
  };
}

export const revisionSubject = (revision: Revision): EventSubject => ({
  revisionId: revision.id,
  name: `${revision.design.number} ${revision.letter}`,
  state: revision.state,
  version: revision.version,
  digest: revision.digest,
  availableEvents: revision.availableEvents,
  whyNot: revision.whyNot,
  targets: targetsOf(revision),
  facts: facts(revision),
});
