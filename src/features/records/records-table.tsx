import type { RecordSummary } from '#contracts/records';
import { stateWords } from '#workflows/revision';
import { formatDate } from '../../lib/format';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { EmptyState } from '../../ui/empty-state';
import { Status } from '../../ui/status';
import { recordTone } from './record-tone';

const columns: readonly TableColumn<RecordSummary>[] = [
  {
    id: 'number',
    title: 'Release',
    value: ({ releaseNumber }) => releaseNumber,
    cell: ({ releaseNumber }) => <span className="font-mono whitespace-nowrap">{releaseNumber}</span>,
  },
  {
    id: 'state',
    title: 'State',
    value: ({ state }) => stateWords[state],
    cell: ({ state }) => <Status tone={recordTone(state)}>{stateWords[state]}</Status>,
  },
  {
    id: 'revision',
    title: 'Revision',
    value: ({ designNumber, letter }) => `${designNumber} ${letter}`,
    cell: ({ designNumber, letter }) => (
      <span className="font-mono whitespace-nowrap">
        {designNumber} {letter}
      </span>
    ),
  },
  { id: 'design', title: 'Design', value: ({ designTitle }) => designTitle },
  {
    id: 'power',
    title: 'Estimated power',
    unit: 'mW',
    value: ({ loadPower }) => (loadPower === null ? null : Number((loadPower * 1e3).toPrecision(12))),
  },
  {
    id: 'released',
    title: 'Released',
    value: ({ releasedAt }) => releasedAt,
    cell: ({ releasedAt }) => (
      <time dateTime={releasedAt} className="whitespace-nowrap">
        {formatDate(releasedAt)}
      </time>
    ),
  },
  { id: 'by', title: 'By', value: ({ releasedBy }) => releasedBy.name },
];

export function RecordsTable({ records }: { records: readonly RecordSummary[] }) {
  return (
    <DataTable
      label="Records"
      rows={records}
      columns={columns}
      rowKey={({ id }) => id}
      rowLink={({ id }) => `/records/${id}`}
      filterLabel="Find a release"
      initialSort={{ column: 'released', descending: true }}
      empty={
        <EmptyState title="Nothing has been released yet.">
          A release leaves a record: its number, the sealed dossier, who agreed to what, and on which evidence.
        </EmptyState>
      }
    />
  );
}
