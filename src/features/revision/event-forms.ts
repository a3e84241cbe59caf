import { SendEvent } from '#contracts/revisions';
import { signatureMeaning, signedEvents } from '#workflows/revision';
import type { RevisionEventType, RunResult, SignedEvent } from '#workflows/revision';
import type { Issue } from '#contracts/error';

/** Everything any step asks for; each step uses some of it. */
export interface EventFields {
  note: string;
  text: string;
  blocking: boolean;
  target: string;
  answer: string;
  reason: string;
  specimen: string;
  result: RunResult | '';
  statement: string;
  shortfall: string;
  password: string;
}
export type EventFieldName = keyof EventFields;

export const emptyFields: EventFields = {
  note: '',
  text: '',
  blocking: false,
  target: '',
  answer: '',
  reason: '',
  specimen: '',
  result: '',
  statement: '',
  shortfall: '',
  password: '',
};

interface EventForm {
  /** What happens then, told before it is done. */
  says: string;
  fields: readonly EventFieldName[];
  labels?: Partial<Record<EventFieldName, string>>;
  hints?: Partial<Record<EventFieldName, string>>;
  /** Words on the button where the event's own are too long or too vague there. */
  verb?: string;
  danger?: boolean;
}

export const eventForms: Record<RevisionEventType, EventForm> = {
  submit: {
    says: 'The document, its estimate and the brief’s version are frozen as they stand, and the reviewers are told. What has to change later becomes a new revision.',
    fields: ['note'],
    labels: { note: 'A word to the reviewers' },
    hints: { note: 'What changed, and where to look first. May stay empty.' },
  },
  remark: {
    says: 'A remark is read by everyone on this revision. One that is marked as blocking must be closed before approval.',
    fields: ['target', 'text', 'blocking'],
    labels: { target: 'About', text: 'Remark', blocking: 'Blocking: approval waits until this is closed' },
  },
  closeRemark: {
    says: 'Closing keeps the remark and your answer in the history.',
    fields: ['answer'],
    labels: { answer: 'Answer' },
    hints: { answer: 'What was done, or why nothing needs to be done.' },
  },
  approve: {
    says: 'With the last approval needed, the revision is cleared for the bench.',
    fields: ['note', 'password'],
    labels: { note: 'Note to the approval' },
    hints: { note: 'May stay empty.' },
    verb: 'Sign the approval',
  },
  requestChanges: {
    says: 'This revision goes back to its authors. The changes are made in a new revision.',
    fields: ['reason'],
    labels: { reason: 'What has to change, and why' },
  },
  rework: {
    says: 'A new revision is drafted from this one and becomes the one that is worked on; this one stays readable as it is.',
    fields: ['reason'],
    labels: { reason: 'What the new revision is for' },
  },
  startRun: {
    says: 'A run is opened with one line for each requirement that the bench has to show.',
    fields: ['specimen'],
    labels: { specimen: 'Specimen' },
    hints: { specimen: 'Serial number or mark of the device under test.' },
  },
  stopRun: {
    says: 'The run ends without a result. Its readings stay readable, and the revision waits for another run.',
    fields: ['reason'],
    labels: { reason: 'Why the run is stopped' },
    verb: 'Stop the run',
    danger: true,
  },
  signResult: {
    says: 'After this the run cannot be altered. Conforming goes on to release review; nonconforming asks for rework, another test or a concession.',
    fields: ['result', 'statement', 'password'],
    labels: { result: 'Result', statement: 'Statement' },
    hints: { statement: 'How it was measured, and what the reader should know.' },
  },
  retest: {
    says: 'The revision waits for another run. The nonconforming run stays in the record.',
    fields: ['reason'],
    labels: { reason: 'Why another test is justified' },
  },
  grantConcession: {
    says: 'A concession is signed permission to go on with a named shortfall. It stands in the record of the release.',
    fields: ['shortfall', 'reason', 'password'],
    labels: { shortfall: 'Shortfall', reason: 'Why it can be accepted' },
    hints: { shortfall: 'Which requirement is missed, and by how much.' },
    verb: 'Sign the concession',
  },
  returnToBench: {
    says: 'The revision waits for another run before release is considered again.',
    fields: ['reason'],
    labels: { reason: 'What the bench has to show' },
  },
  release: {
    says: 'A release number is given and the record is sealed: document, estimate, remarks, runs and signatures, under one digest.',
    fields: ['statement', 'password'],
    labels: { statement: 'Statement' },
    hints: { statement: 'What the release is for, and within which limits. May stay empty.' },
  },
  supersede: {
    says: 'The record stays valid for what was built to it and names its successor.',
    fields: ['reason'],
    labels: { reason: 'Why it is superseded' },
  },
  recall: {
    says: 'The record is marked as recalled for everyone who opens it, and those concerned are told. This cannot be taken back.',
    fields: ['reason', 'password'],
    labels: { reason: 'Why it is recalled, and what to do with devices in use' },
    verb: 'Sign the recall',
    danger: true,
  },
  abandon: {
    says: 'The revision ends here and stays readable. This cannot be taken back.',
    fields: ['reason'],
    labels: { reason: 'Why it is abandoned' },
    danger: true,
  },
};

export const isSigned = (event: RevisionEventType): event is SignedEvent =>
  (signedEvents as readonly RevisionEventType[]).includes(event);

/** The words that are signed; null for steps that are no signature. */
export const meaningOf = (event: RevisionEventType): string | null =>
  isSigned(event) ? signatureMeaning[event] : null;

interface Held {
  version: number;
  digest: string;
  remarkId?: string | undefined;
}

/** The step as it is sent, checked by its contract; or what is missing, at the names of the fields. */
export function readEvent(
  type: RevisionEventType,
  fields: EventFields,
  held: Held,
): { ok: true; event: SendEvent } | { ok: false; issues: Issue[] } {
  const picked: Record<string, unknown> = {};
  for (const name of eventForms[type].fields) picked[name] = fields[name];
  if (type === 'remark') picked.target = fields.target === '' ? null : fields.target;
  if (type === 'closeRemark') picked.remarkId = held.remarkId;
  if (isSigned(type)) picked.signedDigest = held.digest;
  if (picked.note === '') delete picked.note;
  const parsed = SendEvent.safeParse({ type, version: held.version, ...picked });
  if (parsed.success) return { ok: true, event: parsed.data };
  return {
    ok: false,
    issues: parsed.error.issues.map(({ path, message }) => ({
      path: path.join('.'),
      message: path[0] === 'result' ? 'Choose what the readings show.' : message,
    })),
  };
}
