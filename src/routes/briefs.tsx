import { useSuspenseQuery } from '@tanstack/react-query';
import { BriefsTable } from '../features/briefs/briefs-table';
import { briefsQuery } from '../features/briefs/queries';
import { queryClient } from '../lib/query-client';
import { ButtonLink } from '../ui/button';
import { PageBody, PageHeader } from '../ui/page-header';

export const loader = () => queryClient.query({ ...briefsQuery, staleTime: 'static' });

export function Component() {
  const { briefs, mayCreate } = useSuspenseQuery(briefsQuery).data;
  return (
    <>
      <PageHeader
        title="Briefs"
        meta="What customers ask for: vibration, power, space, requirements."
        actions={
          mayCreate ? (
            <ButtonLink to="/briefs/new" variant="primary">
              Write a brief
            </ButtonLink>
          ) : null
        }
      />
      <PageBody>
        <BriefsTable briefs={briefs} mayCreate={mayCreate} />
      </PageBody>
    </>
  );
}
