import { queryOptions } from '@tanstack/react-query';
import { catalogueRoutes } from '#contracts/catalogue';
import { revisionRoutes } from '#contracts/revisions';
import type { Revision } from '#contracts/revisions';
import { callRoute } from '../../lib/fetch-json';
import type { Draft } from './document-path';

/** The catalogue changes with the program only. */
export const catalogueQuery = queryOptions({
  queryKey: ['catalogue'],
  queryFn: ({ signal }) => callRoute(catalogueRoutes.readCatalogue, { signal }),
  staleTime: Infinity,
});

export const saveDraft = (revisionId: string, version: number, document: Draft): Promise<Revision> =>
  callRoute(revisionRoutes.saveDraft, { params: { revisionId }, body: { version, document } });

export const readRevision = (revisionId: string): Promise<Revision> =>
  callRoute(revisionRoutes.readRevision, { params: { revisionId } });
