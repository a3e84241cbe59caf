import { useSuspenseQuery } from '@tanstack/react-query';
import { PeopleTable } from '../features/people/people-table';
import { peopleQuery } from '../features/people/queries';
import { useSession } from '../features/session/queries';
import { queryClient } from '../lib/query-client';
import { PageBody } from '../ui/page-header';

export const loader = () => queryClient.query({ ...peopleQuery, staleTime: 'static' });

export function Component() {
  const { people } = useSuspenseQuery(peopleQuery).data;
  const { me } = useSession();
  return (
    <PageBody>
      <PeopleTable people={people} meId={me.id} />
    </PageBody>
  );
}
