import { useSuspenseQuery } from '@tanstack/react-query';
import { recordsQuery } from '../features/records/queries';
import { RecordsTable } from '../features/records/records-table';
import { queryClient } from '../lib/query-client';
import { PageBody, PageHeader } from '../ui/page-header';

export const loader = () => queryClient.query({ ...recordsQuery, staleTime: 'static' });

export function Component() {
  const { records } = useSuspenseQuery(recordsQuery).data;
  return (
    <>
      <PageHeader title="Records" meta="What was released, by whom, on which evidence." />
      <PageBody>
        <RecordsTable records={records} />
      </PageBody>
    </>
  );
}
