import { queryOptions } from '@tanstack/react-query';
import { catalogueRoutes } from '#contracts/catalogue';
import { callRoute } from '../../lib/fetch-json';

/** The catalogue changes with the program only. */
export const catalogueQuery = queryOptions({
  queryKey: ['catalogue'],
  queryFn: ({ signal }) => callRoute(catalogueRoutes.readCatalogue, { signal }),
  staleTime: Infinity,
});
