import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { briefRoutes } from '#contracts/briefs';
import type { Brief, BriefDocument } from '#contracts/briefs';
import { callRoute } from '../../lib/fetch-json';

export const briefsQuery = queryOptions({
  queryKey: ['briefs'],
  queryFn: ({ signal }) => callRoute(briefRoutes.listBriefs, { signal }),
});

export const briefQuery = (briefId: string) =>
  queryOptions({
    queryKey: ['briefs', briefId],
    queryFn: ({ signal }) => callRoute(briefRoutes.readBrief, { params: { briefId }, signal }),
  });

function useKeepBrief() {
  const client = useQueryClient();
  return (brief: Brief) => {
    client.setQueryData(briefQuery(brief.id).queryKey, brief);
    void client.invalidateQueries({ queryKey: briefsQuery.queryKey, exact: true });
    // Drafts of its designs are held against it.
    void client.invalidateQueries({ queryKey: ['revisions'] });
    void client.invalidateQueries({ queryKey: ['desk'] });
  };
}

export function useCreateBrief() {
  const keep = useKeepBrief();
  return useMutation({
    mutationFn: (document: BriefDocument) => callRoute(briefRoutes.createBrief, { body: document }),
    onSuccess: keep,
  });
}

export function useChangeBrief(briefId: string) {
  const keep = useKeepBrief();
  return useMutation({
    mutationFn: (change: { version: number; document: BriefDocument }) =>
      callRoute(briefRoutes.changeBrief, { params: { briefId }, body: change }),
    onSuccess: keep,
  });
}
