import { useQuery } from '@tanstack/react-query';
import { sessionRoutes } from '#contracts/session';
import { callRoute } from '../../lib/fetch-json';

/** Name under which this person signs; null while it is not known. */
export function useSignerName(): string | null {
  const session = useQuery({
    queryKey: ['session'],
    queryFn: ({ signal }) => callRoute(sessionRoutes.readSession, { signal }),
    staleTime: Infinity,
  });
  return session.data?.me?.name ?? null;
}
