import type { Message } from '#contracts/mail';
import { formatAgo, formatDateTime } from '../../lib/format';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { EmptyState } from '../../ui/empty-state';
import { Status } from '../../ui/status';
import type { Tone } from '../../ui/status';

export const mailStateWords: Record<Message['state'], string> = {
  waiting: 'waiting',
  sending: 'being sent',
  sent: 'sent',
  kept: 'kept here',
  failed: 'failed',
};
export const mailTones: Record<Message['state'], Tone> = {
  waiting: 'active',
  sending: 'active',
  sent: 'good',
  kept: 'neutral',
  failed: 'bad',
};

const columns: readonly TableColumn<Message>[] = [
  { id: 'subject', title: 'Subject', value: ({ subject }) => subject },
  { id: 'to', title: 'To', value: ({ to }) => to },
  {
    id: 'state',
    title: 'State',
    value: ({ state }) => mailStateWords[state],
    cell: ({ state }) => (
      <Status tone={mailTones[state]} className="whitespace-nowrap">
        {mailStateWords[state]}
      </Status>
    ),
  },
  { id: 'attempts', title: 'Attempts', value: ({ attempts }) => attempts },
  {
    id: 'written',
    title: 'Written',
    value: ({ createdAt }) => createdAt,
    cell: ({ createdAt }) => (
      <time dateTime={createdAt} title={formatDateTime(createdAt)} className="whitespace-nowrap">
        {formatAgo(createdAt)}
      </time>
    ),
  },
  { id: 'error', title: 'Last error', value: ({ lastError }) => lastError, hidden: true },
];

export function MailTable({ messages }: { messages: readonly Message[] }) {
  return (
    <DataTable
      label="Mail"
      rows={messages}
      columns={columns}
      rowKey={({ id }) => id}
      rowLink={({ id }) => `/administration/mail?message=${id}`}
      filterLabel="Find a message"
      initialSort={{ column: 'written', descending: true }}
      empty={
        <EmptyState title="No messages yet.">
          Each step of a revision writes one to everybody it concerns; they are listed here, sent or not.
        </EmptyState>
      }
    />
  );
}
