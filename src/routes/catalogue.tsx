import { useSuspenseQuery } from '@tanstack/react-query';
import { CatalogueTables } from '../features/catalogue/catalogue-tables';
import { catalogueQuery } from '../features/catalogue/queries';
import { queryClient } from '../lib/query-client';
import { PageBody, PageHeader } from '../ui/page-header';

export const loader = () => queryClient.query({ ...catalogueQuery, staleTime: 'static' });

export function Component() {
  const { entries } = useSuspenseQuery(catalogueQuery).data;
  return (
    <>
      <PageHeader title="Catalogue" meta="What a design document can name. Every figure has its source." />
      <PageBody>
        <CatalogueTables entries={entries} />
      </PageBody>
    </>
  );
}
