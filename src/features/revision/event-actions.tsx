import { Ellipsis } from 'lucide-react';
import { useState } from 'react';
import type { Revision } from '#contracts/revisions';
import type { RevisionEventType } from '#workflows/revision';
import { ActionButton } from '../../ui/action-button';
import { Button } from '../../ui/button';
import { Menu } from '../../ui/menu';
import { chooseEvents } from './event-choice';
import { EventDialog } from './event-dialog';
import type { BeforeSend, EventSubject } from './event-subject';
import { useRevisionWay } from './use-revision-way';

interface EventActionsProps {
  subject: EventSubject;
  /** Steps that belong to this page; all of the chart's unless given. */
  only?: readonly RevisionEventType[] | undefined;
  /** The page has another primary action: all steps stand in the menu. */
  quiet?: boolean | undefined;
  beforeSend?: BeforeSend | undefined;
  onDone: (revision: Revision, event: RevisionEventType) => void;
}

/** The steps that the chart knows where the subject stands, as the server offers or refuses them. */
export function EventActions({ subject, only, quiet, beforeSend, onDone }: EventActionsProps) {
  const { events } = useRevisionWay(subject.state);
  const [open, setOpen] = useState<RevisionEventType | null>(null);
  const { primary, beside, further } = chooseEvents(
    events.filter(({ type }) => only === undefined || only.includes(type)),
    subject,
    quiet,
  );
  if (primary === null && beside.length === 0 && further.length === 0) return null;
  return (
    <>
      {further.length > 0 ? (
        <Menu
          label="Further steps"
          trigger={
            <Button icon={Ellipsis} variant="quiet">
              More
            </Button>
          }
          groups={[
            {
              id: 'steps',
              items: further.map((each) => ({
                id: each.type,
                label: each.label,
                danger: each.ending,
                whyNot: each.whyNot,
                onAction: () => setOpen(each.type),
              })),
            },
          ]}
        />
      ) : null}
      {beside.map((each) => (
        <ActionButton key={each.type} whyNot={each.whyNot} reason="tooltip" onPress={() => setOpen(each.type)}>
          {each.label}
        </ActionButton>
      ))}
      {primary ? (
        <ActionButton variant="primary" whyNot={primary.whyNot} onPress={() => setOpen(primary.type)}>
          {primary.label}
        </ActionButton>
      ) : null}
      {open ? (
        <EventDialog
          event={open}
          subject={subject}
          beforeSend={beforeSend}
          onClose={() => setOpen(null)}
          onDone={(revision, event) => {
            setOpen(null);
            onDone(revision, event);
          }}
        />
      ) : null}
    </>
  );
}
