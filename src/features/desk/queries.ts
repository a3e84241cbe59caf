import { queryOptions } from '@tanstack/react-query';
import { deskRoutes } from '#contracts/desk';
import { callRoute } from '../../lib/fetch-json';

/** The rail counts what waits by the same key. */
export const deskQuery = queryOptions({
  queryKey: ['desk'],
  queryFn: ({ signal }) => callRoute(deskRoutes.readDesk, { signal }),
});
