import { queryOptions, useMutation, useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { sessionRoutes } from '#contracts/session';
import type { Me, SessionAnswer } from '#contracts/session';
import { callRoute } from '../../lib/fetch-json';

/** Who is signed in. Kept until signing in or out changes it; the server decides anew at every request anyway. */
export const sessionQuery = queryOptions({
  queryKey: ['session'],
  queryFn: async ({ signal, client, queryKey }) => {
    const answer = await callRoute(sessionRoutes.readSession, { signal });
    const known = client.getQueryData<SessionAnswer>(queryKey);
    // The session ended meanwhile, or another tab changed it: the page stays, and the person is asked to sign in again.
    return known?.me && answer.me?.id !== known.me.id ? known : answer;
  },
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

/** Signs out, then leaves by loading the page anew: nothing of this person stays in its memory. */
export function useSignOut(where: 'here' | 'everywhere') {
  return useMutation({
    mutationFn: () => callRoute(where === 'here' ? sessionRoutes.signOut : sessionRoutes.signOutEverywhere),
    onSuccess: () => window.location.assign('/sign-in'),
  });
}
