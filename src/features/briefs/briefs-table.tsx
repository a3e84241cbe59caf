import type { BriefSummary } from '#contracts/briefs';
import { formatAgo, formatDateTime } from '../../lib/format';
import { ButtonLink } from '../../ui/button';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { EmptyState } from '../../ui/empty-state';

const columns: readonly TableColumn<BriefSummary>[] = [
  {
    id: 'number',
    title: 'Number',
    value: ({ number }) => number,
    cell: ({ number }) => <span className="font-mono whitespace-nowrap">{number}</span>,
  },
  { id: 'title', title: 'Title', value: ({ title }) => title },
  { id: 'machine', title: 'Machine', value: ({ machine }) => machine },
  { id: 'vibration', title: 'Vibration', value: ({ vibrationInWords }) => vibrationInWords },
  {
    id: 'power',
    title: 'Power needed',
    unit: 'mW',
    value: ({ powerNeeded }) => Number((powerNeeded * 1e3).toPrecision(12)),
  },
  { id: 'designs', title: 'Designs', value: ({ designs }) => designs },
  {
    id: 'updated',
    title: 'Changed',
    value: ({ updatedAt }) => updatedAt,
    cell: ({ updatedAt }) => (
      <time dateTime={updatedAt} title={formatDateTime(updatedAt)} className="whitespace-nowrap">
        {formatAgo(updatedAt)}
      </time>
    ),
  },
  { id: 'by', title: 'By', value: ({ updatedBy }) => updatedBy.name, hidden: true },
];

export function BriefsTable({ briefs, mayCreate }: { briefs: readonly BriefSummary[]; mayCreate: boolean }) {
  return (
    <DataTable
      label="Briefs"
      rows={briefs}
      columns={columns}
      rowKey={({ id }) => id}
      rowLink={({ id }) => `/briefs/${id}`}
      filterLabel="Find a brief"
      initialSort={{ column: 'updated', descending: true }}
      empty={
        <EmptyState
          title="No briefs yet."
          action={
            mayCreate ? (
              <ButtonLink to="/briefs/new" variant="primary">
                Write the first brief
              </ButtonLink>
            ) : (
              <p>Designers write them; your roles read them here.</p>
            )
          }
        >
          A brief says what is asked for: the vibration to live on, the power needed and by what load, the space, the
          temperatures, and the requirements that a design is held against.
        </EmptyState>
      }
    />
  );
}
