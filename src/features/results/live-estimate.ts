import type { Issue } from '#contracts/error';
import type { Estimate } from '#contracts/estimates';

/**
 * What is shown of an estimate that follows a document being typed. The last good figures stay; the rest says whether they belong
 * to what stands in the fields now, and if not, why. A request stands for its document here: the text that is sent.
 */
export interface LiveEstimate {
  shown: Estimate | null;
  /** Request that `shown` answers, and the design in it. */
  shownFor: string | null;
  shownDesign: unknown;
  /** Request made last. */
  asked: string | null;
  refused: { request: string; design: unknown; issues: Issue[] } | null;
  failed: { request: string; message: string } | null;
}

export type Freshness =
  /** Nothing computed yet, and nothing known to be wrong. */
  | 'none'
  /** The figures belong to what stands in the fields. */
  | 'current'
  /** A newer state is being computed. */
  | 'computing'
  /** The newest state cannot be computed: a field is wrong. */
  | 'faulty'
  /** No answer came. */
  | 'failed';

export type EstimateEvent =
  | { type: 'asked'; request: string }
  | { type: 'answered'; request: string; design: unknown; estimate: Estimate }
  | { type: 'refused'; request: string; design: unknown; issues: Issue[] }
  | { type: 'failed'; request: string; message: string };

export const nothingYet: LiveEstimate = {
  shown: null,
  shownFor: null,
  shownDesign: null,
  asked: null,
  refused: null,
  failed: null,
};

/** Takes an event. Answers to any request but the last are left alone: what they speak of is no longer on the page. */
export function follow(state: LiveEstimate, event: EstimateEvent): LiveEstimate {
  const { request } = event;
  if (event.type === 'asked') return { ...state, asked: request, failed: null };
  if (request !== state.asked) return state;
  switch (event.type) {
    case 'answered':
      return {
        ...state,
        shown: event.estimate,
        shownFor: request,
        shownDesign: event.design,
        refused: null,
        failed: null,
      };
    case 'refused':
      return { ...state, refused: { request, design: event.design, issues: event.issues }, failed: null };
    case 'failed':
      return { ...state, failed: { request, message: event.message } };
  }
}

/** How the figures shown relate to what stands in the fields, which would be asked about as `wanted`. */
export function freshnessOf(state: LiveEstimate, wanted: string): Freshness {
  if (state.shownFor === wanted) return 'current';
  if (state.refused?.request === wanted) return 'faulty';
  if (state.failed?.request === wanted) return 'failed';
  return state.asked === null ? 'none' : 'computing';
}

/** Path within the design document; null for what lies elsewhere, as in the brief's vibration. */
export function designPath(path: string): string | null {
  if (path === 'vibration' || path.startsWith('vibration.')) return null;
  return path === 'design' ? '' : path.replace(/^design\./, '');
}

const at = (document: unknown, path: string): unknown =>
  path
    .split('.')
    .reduce<unknown>(
      (value, key) =>
        typeof value === 'object' && value !== null ? (value as Record<string, unknown>)[key] : undefined,
      document,
    );

/**
 * What is wrong at a path of the document, as long as the value there is still the one that was refused: after a change the old
 * words say nothing about the new value.
 */
export function issueAt(
  { refused }: Pick<LiveEstimate, 'refused'>,
  document: unknown,
  path: string,
): string | undefined {
  const issue = refused?.issues.find((each) => designPath(each.path) === path);
  if (!issue || !refused) return undefined;
  const [before, now] = [at(refused.design, path), at(document, path)];
  return Object.is(before, now) || (typeof before === 'object' && JSON.stringify(before) === JSON.stringify(now))
    ? issue.message.replace(/\.$/, '')
    : undefined;
}
