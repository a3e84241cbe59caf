import { Link } from 'react-router-dom';
import type { Cleared as ClearedSchema, RunListLine } from '#contracts/runs';
import type { z } from 'zod';
import { formatAgo, formatDateTime } from '../../lib/format';
import { ButtonLink } from '../../ui/button';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { EmptyState } from '../../ui/empty-state';
import { Section } from '../../ui/page-header';
import { RunState, runStateWords } from './run-state';

type Cleared = z.infer<typeof ClearedSchema>;

const Moment = ({ at }: { at: string }) => (
  <time dateTime={at} title={formatDateTime(at)} className="whitespace-nowrap">
    {formatAgo(at)}
  </time>
);

const revisionName = ({ designNumber, letter }: { designNumber: string; letter: string }) =>
  `${designNumber} ${letter}`;

const runColumns: readonly TableColumn<RunListLine>[] = [
  {
    id: 'number',
    title: 'Run',
    value: ({ number }) => number,
    cell: ({ number }) => <span className="font-mono whitespace-nowrap">{number}</span>,
  },
  { id: 'state', title: 'State', value: (run) => runStateWords(run), cell: (run) => <RunState run={run} /> },
  {
    id: 'revision',
    title: 'Revision',
    value: ({ revision }) => revisionName(revision),
    cell: ({ revision }) => (
      <Link to={`/designs/${revision.designId}/${revision.letter}`} className="link">
        <span className="font-mono">{revisionName(revision)}</span>
      </Link>
    ),
  },
  { id: 'design', title: 'Design', value: ({ revision }) => revision.designTitle },
  {
    id: 'started',
    title: 'Started',
    value: ({ startedAt }) => startedAt,
    cell: ({ startedAt }) => <Moment at={startedAt} />,
  },
  { id: 'by', title: 'By', value: ({ startedBy }) => startedBy.name },
  {
    id: 'closed',
    title: 'Closed',
    value: ({ closedAt }) => closedAt,
    cell: ({ closedAt }) =>
      closedAt === null ? <span className="text-graphite">still open</span> : <Moment at={closedAt} />,
  },
];

/** What waits for the bench, what is on it, and what was measured. */
export function RunsOverview({ runs, cleared }: { runs: readonly RunListLine[]; cleared: readonly Cleared[] }) {
  const open = runs.filter(({ state }) => state === 'open');
  const closed = runs.filter(({ state }) => state !== 'open');
  return (
    <div className="flex flex-col gap-8">
      <div className="grid gap-x-10 gap-y-8 xl:grid-cols-2">
        <Section title="Cleared and waiting">
          {cleared.length === 0 ? (
            <p className="text-graphite">
              Nothing waits for the bench. A revision comes here once its review is complete.
            </p>
          ) : (
            <ul className="flex flex-col">
              {cleared.map((each) => (
                <li
                  key={each.revisionId}
                  className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-rule py-2"
                >
                  <span className="min-w-0">
                    <span className="font-semibold">
                      <span className="font-mono">{revisionName(each)}</span> {each.designTitle}
                    </span>
                    <span className="block text-sm text-graphite">
                      cleared <Moment at={each.since} />
                    </span>
                  </span>
                  <ButtonLink size="small" to={`/designs/${each.designId}/${each.letter}`}>
                    Open to start a run
                  </ButtonLink>
                </li>
              ))}
            </ul>
          )}
        </Section>
        <Section title="On the bench">
          {open.length === 0 ? (
            <p className="text-graphite">No run is open.</p>
          ) : (
            <ul className="flex flex-col">
              {open.map((run) => (
                <li
                  key={run.id}
                  className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-rule py-2"
                >
                  <span className="min-w-0">
                    <span className="font-semibold">
                      <span className="font-mono">{run.number}</span> for{' '}
                      <span className="font-mono">{revisionName(run.revision)}</span> {run.revision.designTitle}
                    </span>
                    <span className="block text-sm text-graphite">
                      started <Moment at={run.startedAt} /> by {run.startedBy.name}
                    </span>
                  </span>
                  <ButtonLink size="small" to={`/bench/runs/${run.id}`}>
                    Continue the run
                  </ButtonLink>
                </li>
              ))}
            </ul>
          )}
        </Section>
      </div>
      <Section title="Closed runs">
        <DataTable
          label="Closed runs"
          rows={closed}
          columns={runColumns}
          rowKey={({ id }) => id}
          rowLink={({ id }) => `/bench/runs/${id}`}
          filterLabel="Find a run"
          initialSort={{ column: 'started', descending: true }}
          empty={
            <EmptyState title="No run has been closed yet.">
              A run ends with a signed result, or is stopped with a reason; either way its readings stay here.
            </EmptyState>
          }
        />
      </Section>
    </div>
  );
}
