import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { peopleRoutes } from '#contracts/people';
import type { PersonChange, PersonCreate } from '#contracts/people';
import { callRoute } from '../../lib/fetch-json';

export const peopleQuery = queryOptions({
  queryKey: ['people'],
  queryFn: ({ signal }) => callRoute(peopleRoutes.listPeople, { signal }),
});

export function useCreatePerson() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: PersonCreate) => callRoute(peopleRoutes.createPerson, { body }),
    onSuccess: () => client.invalidateQueries({ queryKey: peopleQuery.queryKey }),
  });
}

export function useChangePerson(personId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: PersonChange) => callRoute(peopleRoutes.changePerson, { params: { personId }, body }),
    // The own roles may be among what changed.
    onSuccess: () => client.invalidateQueries(),
  });
}
