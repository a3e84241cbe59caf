import { useMemo } from 'react';
import type { ReactNode } from 'react';
import type { DesignSummary } from '#contracts/designs';
import { stateWords } from '#workflows/revision';
import type { RevisionState } from '#workflows/revision';
import { formatAgo, formatDateTime } from '../../lib/format';
import { ButtonLink } from '../../ui/button';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { EmptyState } from '../../ui/empty-state';
import { Quantity } from '../../ui/quantity';
import { revisionPath } from './queries';

interface DesignsTableProps {
  designs: readonly DesignSummary[];
  mayCreate: boolean;
  /** The small strip of a document. */
  drawing: (document: unknown) => ReactNode;
  /** A revision's state with its mark. */
  stateMark: (state: RevisionState) => ReactNode;
  toolbar?: ReactNode;
  /** Whether a filter above hides the rest. */
  filtered: boolean;
}

/** All designs by their latest revision. */
export function DesignsTable({ designs, mayCreate, drawing, stateMark, toolbar, filtered }: DesignsTableProps) {
  const columns = useMemo(
    (): TableColumn<DesignSummary>[] => [
      {
        id: 'number',
        title: 'Number',
        value: ({ number }) => number,
        cell: ({ number }) => <span className="font-mono">{number}</span>,
      },
      {
        id: 'drawing',
        title: 'Section',
        value: () => null,
        cell: ({ document }) => drawing(document),
        unsortable: true,
        unexported: true,
      },
      {
        id: 'title',
        title: 'Title',
        value: ({ title }) => title,
        cell: ({ title }) => <span className="font-medium">{title}</span>,
      },
      {
        id: 'revision',
        title: 'Revision',
        value: ({ latest }) => latest.letter,
        cell: ({ latest }) => <span className="font-mono">{latest.letter}</span>,
      },
      {
        id: 'state',
        title: 'State',
        value: ({ latest }) => stateWords[latest.state],
        cell: ({ latest }) => stateMark(latest.state),
      },
      {
        id: 'power',
        title: 'Load power',
        unit: 'mW',
        align: 'end',
        value: ({ latest }) => (latest.loadPower === null ? null : latest.loadPower * 1000),
        cell: ({ latest }) => <Quantity value={latest.loadPower} dimension="power" />,
      },
      {
        id: 'brief',
        title: 'Brief',
        value: ({ brief }) => brief.number,
        cell: ({ brief }) => (
          <span>
            <span className="font-mono">{brief.number}</span> <span className="text-graphite">{brief.title}</span>
          </span>
        ),
      },
      { id: 'by', title: 'Begun by', value: ({ createdBy }) => createdBy.name, hidden: true },
      {
        id: 'updated',
        title: 'Updated',
        value: ({ updatedAt }) => updatedAt,
        cell: ({ updatedAt }) => (
          <time dateTime={updatedAt} title={formatDateTime(updatedAt)} className="whitespace-nowrap text-graphite">
            {formatAgo(updatedAt)}
          </time>
        ),
      },
    ],
    [drawing, stateMark],
  );
  return (
    <DataTable
      label="Designs"
      rows={designs}
      columns={columns}
      rowKey={({ id }) => id}
      rowLink={({ id, latest }) => revisionPath(id, latest.letter)}
      filterLabel="Find a design"
      initialSort={{ column: 'updated', descending: true }}
      toolbar={toolbar}
      empty={
        filtered ? (
          <EmptyState title="No design is in this state.">Choose another state, or all of them.</EmptyState>
        ) : (
          <EmptyState
            title="No designs yet."
            action={
              mayCreate ? (
                <ButtonLink to="/designs/new" variant="primary">
                  Start a design
                </ButtonLink>
              ) : undefined
            }
          >
            A design is one generator for one brief: magnets, coils, suspension, circuit, and what they will deliver.
          </EmptyState>
        )
      }
    />
  );
}
