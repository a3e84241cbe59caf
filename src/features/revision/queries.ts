import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { revisionRoutes } from '#contracts/revisions';
import type { Revision, SendEvent } from '#contracts/revisions';
import { callRoute } from '../../lib/fetch-json';

export const revisionQuery = (revisionId: string) =>
  queryOptions({
    queryKey: ['revisions', revisionId],
    queryFn: ({ signal }) => callRoute(revisionRoutes.readRevision, { params: { revisionId }, signal }),
  });

/** Takes a step of the way. A step touches lists, desk and records too, so everything shown is asked for again. */
export function useSendEvent(revisionId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (event: SendEvent) => callRoute(revisionRoutes.sendEvent, { params: { revisionId }, body: event }),
    onSuccess: (revision: Revision) => {
      client.setQueryData(revisionQuery(revisionId).queryKey, revision);
      void client.invalidateQueries();
    },
  });
}
