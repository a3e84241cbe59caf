import { useQuery } from '@tanstack/react-query';
import { RotateCw } from 'lucide-react';
import type { FullMessage } from '#contracts/mail';
import { formatDateTime } from '../../lib/format';
import { messageOf } from '../../lib/request-error';
import { ActionButton } from '../../ui/action-button';
import { Button } from '../../ui/button';
import { Caution } from '../../ui/caution';
import { Dialog } from '../../ui/dialog';
import { ErrorState } from '../../ui/error-state';
import { KeyFigures } from '../../ui/key-figures';
import { Pending } from '../../ui/pending';
import { Status } from '../../ui/status';
import { Tabs } from '../../ui/tabs';
import { tell } from '../../ui/toast';
import { mailStateWords, mailTones } from './mail-table';
import { messageQuery, useResendMail } from './queries';

interface MessageDialogProps {
  messageId: string;
  onClose: () => void;
}

/** One message as its reader gets it: as text, and as HTML in a frame that may run nothing. */
export function MessageDialog({ messageId, onClose }: MessageDialogProps) {
  const query = useQuery(messageQuery(messageId));
  const resend = useResendMail(messageId);
  const message = query.data;
  return (
    <Dialog
      title={message?.subject ?? 'Message'}
      isOpen
      onClose={onClose}
      width="medium"
      footer={
        message ? (
          <>
            <ActionButton
              icon={RotateCw}
              pending={resend.isPending}
              reason="tooltip"
              whyNot={message.state === 'failed' ? null : 'Only a message that failed can be sent again.'}
              onPress={() =>
                resend.mutate(undefined, {
                  onSuccess: () => tell.done('Message waits to be sent again'),
                  onError: (error) => tell.failed('Not sent again', { detail: messageOf(error) }),
                })
              }
            >
              Send it again
            </ActionButton>
            <Button variant="primary" onPress={onClose}>
              Close
            </Button>
          </>
        ) : null
      }
    >
      {query.isError ? <ErrorState error={query.error} onRetry={() => void query.refetch()} /> : null}
      {query.isPending ? <Pending label="Loading the message" /> : null}
      {message ? <MessageParts message={message} /> : null}
    </Dialog>
  );
}

function MessageParts({ message }: { message: FullMessage }) {
  const { to, state, createdAt, sentAt, attempts, lastError, messageId, text, html, subject } = message;
  return (
    <div className="flex flex-col gap-4">
      <KeyFigures
        figures={[
          { label: 'To', value: <span className="wrap-anywhere">{to}</span> },
          { label: 'State', value: <Status tone={mailTones[state]}>{mailStateWords[state]}</Status> },
          { label: 'Written', value: formatDateTime(createdAt) },
          { label: 'Sent', value: sentAt === null ? 'not sent' : formatDateTime(sentAt) },
          { label: 'Attempts', value: attempts },
          { label: 'Message-ID', value: <code className="text-sm wrap-anywhere">{messageId}</code> },
        ]}
      />
      {lastError === null ? null : (
        <Caution severity="stop" title="Last attempt failed.">
          {lastError}
        </Caution>
      )}
      <Tabs
        label="Parts of the message"
        tabs={[
          {
            id: 'text',
            label: 'Text',
            content: <pre className="text-sm wrap-anywhere whitespace-pre-wrap">{text}</pre>,
          },
          {
            id: 'html',
            label: 'HTML',
            content: (
              <iframe
                title={`HTML of “${subject}”`}
                sandbox=""
                referrerPolicy="no-referrer"
                srcDoc={html}
                className="h-96 w-full rounded border border-rule bg-white"
              />
            ),
          },
        ]}
      />
    </div>
  );
}
