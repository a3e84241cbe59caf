import { useQueryClient } from '@tanstack/react-query';
import { useId, useState } from 'react';
import { useForm } from 'react-hook-form';
import type { Remark, Revision } from '#contracts/revisions';
import type { Change } from '#contracts/error';
import { eventWords, stateWords } from '#workflows/revision';
import type { RevisionEventType } from '#workflows/revision';
import { isRequestError, RequestError } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { Dialog } from '../../ui/dialog';
import { applyIssues, Form, FormError } from '../../ui/form';
import { EventFieldset } from './event-fieldset';
import { emptyFields, eventForms, isSigned, meaningOf, readEvent } from './event-forms';
import type { EventFields } from './event-forms';
import type { BeforeSend, EventSubject } from './event-subject';
import { useSendEvent } from './queries';
import { SignatureBlock } from './signature-block';
import { StaleNotice } from './stale-notice';
import { useRevisionWay } from './use-revision-way';

export interface EventDialogProps {
  event: RevisionEventType;
  subject: EventSubject;
  onClose: () => void;
  onDone: (revision: Revision, event: RevisionEventType) => void;
  beforeSend?: BeforeSend | undefined;
  /** The remark that is closed. */
  remark?: Remark | undefined;
  /** What a new remark is about, where it was opened from a value. */
  target?: string | undefined;
}

/** The dialog of one step: says what follows, asks for what the step needs, and keeps what is typed whatever happens. */
export function EventDialog({ event, subject, onClose, onDone, beforeSend, remark, target }: EventDialogProps) {
  const { says, verb, danger } = eventForms[event];
  const formId = useId();
  const client = useQueryClient();
  const send = useSendEvent(subject.revisionId);
  const [pending, setPending] = useState(false);
  const [changed, setChanged] = useState<Change[] | null>(null);
  // What the person saw is what is sent: a page refreshed behind the dialog does not slip under a signature. Only after
  // being told of a change, and asking for the current state, the dialog goes by that.
  const [opened, setOpened] = useState<EventSubject | null>(subject);
  const held = opened ?? subject;
  const form = useForm<EventFields>({
    defaultValues: { ...emptyFields, target: target ?? '', result: subject.readingsSay ?? '' },
  });
  const leadsTo = useRevisionWay(subject.state).events.find(({ type }) => type === event)?.leadsTo ?? [];
  const whyNot = subject.availableEvents.includes(event)
    ? null
    : (subject.whyNot[event] ?? `Not possible while the revision is “${stateWords[subject.state]}”.`);

  const takeOver = async () => {
    await client.invalidateQueries();
    setOpened(null);
    setChanged(null);
    form.clearErrors();
  };

  const submit = form.handleSubmit(async (fields) => {
    setPending(true);
    try {
      const { version, digest } = held;
      const read = readEvent(event, fields, { version, digest, remarkId: remark?.id });
      if (!read.ok) {
        applyIssues(form, new RequestError(422, 'invalid', 'Not complete.', { issues: read.issues }));
        return;
      }
      const before = await beforeSend?.();
      const revision = await send.mutateAsync(before ? { ...read.event, version: before.version } : read.event);
      onDone(revision, event);
    } catch (error) {
      if (isRequestError(error, 'conflict')) setChanged(error.changed);
      applyIssues(form, error);
    } finally {
      setPending(false);
    }
  });

  const meaning = meaningOf(event);
  return (
    <Dialog
      title={event === 'closeRemark' ? eventWords.closeRemark : `${eventWords[event]}: ${subject.name}`}
      isOpen
      onClose={onClose}
      role="alertdialog"
      width={isSigned(event) ? 'medium' : 'narrow'}
      footer={
        <>
          {whyNot && changed === null ? <p className="mr-auto max-w-prose text-graphite">{whyNot}</p> : null}
          <Button onPress={onClose}>Cancel</Button>
          <Button
            variant={danger ? 'danger' : 'primary'}
            type="submit"
            form={formId}
            pending={pending}
            disabled={whyNot !== null || changed !== null}
          >
            {verb ?? eventWords[event]}
          </Button>
        </>
      }
    >
      <Form id={formId} onSubmit={() => void submit()} label={eventWords[event]}>
        <div className="flex flex-col gap-2">
          <p>{says}</p>
          {leadsTo.length > 0 ? (
            <p className="text-graphite">
              Leads to: {leadsTo.map((state) => stateWords[state].toLowerCase()).join(' or ')}.
            </p>
          ) : null}
          {subject.facts?.[event]}
        </div>
        {remark ? (
          <blockquote className="border-l-[3px] border-rule bg-wash px-3.5 py-2.5 wrap-anywhere whitespace-pre-line">
            {remark.text}
            <footer className="text-sm text-graphite">{remark.by.name}</footer>
          </blockquote>
        ) : null}
        {changed === null ? (
          <FormError message={form.formState.errors.root?.message} />
        ) : (
          <StaleNotice
            changed={changed}
            message={form.formState.errors.root?.message}
            whyNot={whyNot}
            onTakeOver={() => void takeOver()}
          />
        )}
        <EventFieldset event={event} control={form.control} targets={subject.targets ?? []} />
        {meaning ? (
          <SignatureBlock meaning={meaning} digest={held.digest} name={subject.name} control={form.control} />
        ) : null}
      </Form>
    </Dialog>
  );
}
