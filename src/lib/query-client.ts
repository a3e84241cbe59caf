import { MutationCache, QueryClient } from '@tanstack/react-query';
import { isRequestError } from './request-error';

/** Trying again helps only where no answer came or the server was busy. */
const worthRetrying = (failures: number, error: unknown) =>
  failures < 2 && isRequestError(error, 'offline', 'unavailable');

export const queryClient = new QueryClient({
  defaultOptions: {
    queries: {
      networkMode: 'always',
      staleTime: 15_000,
      gcTime: 10 * 60_000,
      retry: worthRetrying,
      refetchOnWindowFocus: true,
    },
    mutations: { retry: false, networkMode: 'always' },
  },
  mutationCache: new MutationCache({
    onError: (error) => {
      // A change that met a newer state: what is shown is out of date, whatever it is.
      if (isRequestError(error, 'conflict')) void queryClient.invalidateQueries();
    },
  }),
});
