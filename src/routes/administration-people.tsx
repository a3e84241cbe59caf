import { useSuspenseQuery } from '@tanstack/react-query';
import { PeopleTable } from '../features/people/people-table';
import { peopleQuery } from '../features/people/queries';
import { useSession } from '../features/session/queries';
import { queryClient } from '../lib/query-client';
import { PageBody, Section } from '../ui/page-header';

export const loader = () => queryClient.query({ ...peopleQuery, staleTime: 'static' });

export function Component() {
  const { people } = useSuspenseQuery(peopleQuery).data;
  const { me } = useSession();
  return (
    <PageBody>
      <Section title="People">
        <p className="max-w-prose text-graphite">
          One person may hold several roles. Who wrote or edited a revision never decides on it, whatever the roles.
          Nobody sees a password but its owner.
        </p>
        <PeopleTable people={people} meId={me.id} />
      </Section>
    </PageBody>
  );
}
