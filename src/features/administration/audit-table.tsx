import { useInfiniteQuery } from '@tanstack/react-query';
import type { AuditEntry } from '#contracts/audit';
import { formatDateTime } from '../../lib/format';
import { messageOf } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { EmptyState } from '../../ui/empty-state';
import { ErrorState } from '../../ui/error-state';
import { Pending } from '../../ui/pending';
import { auditQuery } from './queries';

const words = (value: unknown): string =>
  typeof value === 'string' || typeof value === 'number' || typeof value === 'boolean'
    ? String(value)
    : JSON.stringify(value);
const cut = (text: string, most: number) => (text.length > most ? `${text.slice(0, most)}…` : text);

/** The detail in one line; what it is about stands in its own column. */
const summaryOf = (detail: AuditEntry['detail']): string =>
  cut(
    Object.entries(detail)
      .filter(([key, value]) => key !== 'name' && value !== null && !/Id$|^digest$/.test(key))
      .map(([key, value]) => `${key} ${cut(words(value), 48)}`)
      .join('; ') || Object.keys(detail).join('; '),
    110,
  );

const hasDetail = (detail: AuditEntry['detail']) => Object.keys(detail).length > 0;

/** What an entry is about by name, where the entry itself tells it. */
function nameOf({ detail, by, subjectId }: AuditEntry): string | null {
  if (typeof detail.name === 'string') return detail.name;
  return by?.id === subjectId ? by.name : null;
}

const columns: readonly TableColumn<AuditEntry>[] = [
  { id: 'sequence', title: 'No.', value: ({ sequence }) => sequence },
  {
    id: 'at',
    title: 'When',
    value: ({ at }) => at,
    cell: ({ at }) => (
      <time dateTime={at} className="whitespace-nowrap" title={at}>
        {formatDateTime(at)}
      </time>
    ),
  },
  {
    id: 'by',
    title: 'Who',
    value: ({ by }) => by?.name ?? 'the server',
    cell: ({ by }) => <span className="whitespace-nowrap">{by?.name ?? 'the server'}</span>,
  },
  { id: 'action', title: 'What', value: ({ action }) => action, cell: ({ action }) => <code>{action}</code> },
  {
    id: 'subject',
    title: 'On what',
    value: (entry) => [entry.subject, nameOf(entry) ?? '', entry.subjectId].filter(Boolean).join(' '),
    cell: (entry) => (
      <span title={entry.subjectId} className="@2xl:whitespace-nowrap">
        {entry.subject} {nameOf(entry) ?? <code className="text-sm text-graphite">{entry.subjectId.slice(0, 8)}</code>}
      </span>
    ),
  },
  {
    id: 'detail',
    title: 'Detail',
    value: ({ detail }) => (hasDetail(detail) ? JSON.stringify(detail) : null),
    unsortable: true,
    cell: ({ detail }) =>
      hasDetail(detail) ? (
        <details>
          <summary className="text-graphite">{summaryOf(detail)}</summary>
          <pre className="max-w-[60ch] text-sm wrap-anywhere whitespace-pre-wrap">
            {JSON.stringify(detail, null, 2)}
          </pre>
        </details>
      ) : (
        '–'
      ),
  },
  {
    id: 'hash',
    title: 'Hash',
    value: ({ hash }) => hash,
    cell: ({ hash }) => (
      <code className="text-sm text-graphite" title={hash}>
        {hash.slice(0, 12)}
      </code>
    ),
  },
];

/** The audit trail, newest first; earlier entries are fetched on demand. */
export function AuditTable() {
  const query = useInfiniteQuery(auditQuery);
  if (query.data === undefined)
    return query.isError ? (
      <ErrorState error={query.error} onRetry={() => void query.refetch()} />
    ) : (
      <Pending label="Loading the audit trail" lines={8} />
    );
  const entries = query.data.pages.flatMap((page) => page.entries);
  return (
    <div className="flex flex-col gap-3">
      <DataTable
        label="Audit trail"
        rows={entries}
        columns={columns}
        rowKey={({ sequence }) => String(sequence)}
        filterLabel="Find among the entries shown"
        initialSort={{ column: 'sequence', descending: true }}
        empty={
          <EmptyState title="Nothing is recorded yet.">
            Every change that anybody makes is added here, and never changed.
          </EmptyState>
        }
      />
      {query.hasNextPage ? (
        <div className="flex flex-wrap items-center gap-3">
          <Button pending={query.isFetchingNextPage} onPress={() => void query.fetchNextPage()}>
            Fetch earlier entries
          </Button>
          {query.isFetchNextPageError ? <span role="alert">{messageOf(query.error)}</span> : null}
        </div>
      ) : null}
    </div>
  );
}
