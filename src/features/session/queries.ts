import { queryOptions, useMutation, useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { sessionRoutes } from '#contracts/session';
import type { Me, SessionAnswer } from '#contracts/session';
import { callRoute, forgetCsrfToken } from '../../lib/fetch-json';

/** Who is signed in. Kept until signing in or out changes it; the server decides anew at every request anyway. */
export const sessionQuery = queryOptions({
  queryKey: ['session'],
  queryFn: ({ signal }) => callRoute(sessionRoutes.readSession, { signal }),
  staleTime: 5 * 60_000,
});

/** The person signed in, on every page behind the sign-in. */
export function useSession(): { me: Me } {
  const { data } = useSuspenseQuery(sessionQuery);
  if (data.me === null) throw new Error('A page for people signed in was drawn without a session.');
  return { me: data.me };
}

/** Takes over what the server answered about the session. */
export function useSessionChange() {
  const client = useQueryClient();
  return (answer: SessionAnswer) => client.setQueryData(sessionQuery.queryKey, answer);
}

export function useSignOut(where: 'here' | 'everywhere') {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => callRoute(where === 'here' ? sessionRoutes.signOut : sessionRoutes.signOutEverywhere),
    onSuccess: (answer) => {
      // Nothing of this person stays in the page's memory.
      client.clear();
      forgetCsrfToken();
      client.setQueryData(sessionQuery.queryKey, answer);
    },
  });
}
