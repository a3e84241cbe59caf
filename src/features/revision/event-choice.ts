import { eventWords } from '#workflows/revision';
import type { RevisionEventType } from '#workflows/revision';
import type { EventSubject } from './event-subject';
import type { WayEvent } from './use-revision-way';

/** Steps that lead on, in the order of the way: the first possible one is the primary action of the page. */
const forward: readonly RevisionEventType[] = [
  'submit',
  'approve',
  'startRun',
  'signResult',
  'release',
  'rework',
  'retest',
  'grantConcession',
  'supersede',
];
/** Steps that end something: never among the first buttons. */
const ending: ReadonlySet<RevisionEventType> = new Set(['abandon', 'recall', 'stopRun']);

export interface OfferedEvent {
  type: RevisionEventType;
  label: string;
  /** The server's reason; null where the step is possible. */
  whyNot: string | null;
  ending: boolean;
}

export interface EventChoice {
  primary: OfferedEvent | null;
  beside: OfferedEvent[];
  further: OfferedEvent[];
}

/**
 * Orders what the chart knows here by what the server offers: the primary action, at most two beside it, the others
 * further away. A remark is closed where it stands, so that step is not among them.
 */
export function chooseEvents(
  events: readonly WayEvent[],
  { availableEvents, whyNot }: Pick<EventSubject, 'availableEvents' | 'whyNot'>,
  quiet = false,
): EventChoice {
  const offered = events
    .filter(({ type }) => type !== 'closeRemark' && (availableEvents.includes(type) || whyNot[type] !== undefined))
    .map(({ type }): OfferedEvent => ({
      type,
      label: eventWords[type],
      whyNot: availableEvents.includes(type) ? null : (whyNot[type] ?? null),
      ending: ending.has(type),
    }));
  if (quiet) return { primary: null, beside: [], further: offered };
  const onward = forward.map((type) => offered.find((each) => each.type === type)).filter((each) => each !== undefined);
  const primary = onward.find((each) => each.whyNot === null) ?? onward[0] ?? null;
  const others = offered.filter((each) => each !== primary);
  const possibleFirst = [...others].sort((a, b) => Number(a.whyNot !== null) - Number(b.whyNot !== null));
  const beside = possibleFirst.filter((each) => !each.ending).slice(0, 2);
  return { primary, beside, further: others.filter((each) => !beside.includes(each)) };
}
