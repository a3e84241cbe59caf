import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { instrumentsQuery, runQuery } from '../features/bench/queries';
import { RunSheet } from '../features/bench/run-sheet';
import { RunState } from '../features/bench/run-state';
import { RunActions } from '../features/revision/run-actions';
import { queryClient } from '../lib/query-client';
import { PageBody, PageHeader } from '../ui/page-header';

export const loader = ({ params }: LoaderFunctionArgs) =>
  Promise.all([
    queryClient.query({ ...runQuery(params.runId ?? ''), staleTime: 'static' }),
    queryClient.query({ ...instrumentsQuery, staleTime: 'static' }),
  ]);

export function Component() {
  const { runId = '' } = useParams();
  const run = useSuspenseQuery(runQuery(runId)).data;
  const { instruments } = useSuspenseQuery(instrumentsQuery).data;
  const { revision } = run;
  return (
    <>
      <PageHeader
        title={`${revision.designTitle}, ${run.specimen}`}
        documentTitle={`${run.number} ${revision.designTitle}`}
        crumbs={[{ label: 'Bench', to: '/bench' }, { label: run.number }]}
        meta={
          <>
            <RunState run={run} />
            <span>
              Run for{' '}
              <Link to={`/designs/${revision.designId}/${revision.letter}`} className="link font-mono">
                {revision.designNumber} {revision.letter}
              </Link>
            </span>
          </>
        }
        actions={<RunActions run={run} />}
      />
      <PageBody>
        <RunSheet run={run} instruments={instruments} />
      </PageBody>
    </>
  );
}
