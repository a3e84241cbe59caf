import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { designRoutes } from '#contracts/designs';
import type { Design, DesignCreate } from '#contracts/designs';
import { callRoute } from '../../lib/fetch-json';

export const designsQuery = queryOptions({
  queryKey: ['designs'],
  queryFn: ({ signal }) => callRoute(designRoutes.listDesigns, { signal }),
});

export const designQuery = (designId: string) =>
  queryOptions({
    queryKey: ['designs', designId],
    queryFn: ({ signal }) => callRoute(designRoutes.readDesign, { params: { designId }, signal }),
  });

/** Starts a design with revision A as a draft. */
export function useCreateDesign() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: DesignCreate) => callRoute(designRoutes.createDesign, { body }),
    onSuccess: (design: Design) => {
      client.setQueryData(designQuery(design.id).queryKey, design);
      void client.invalidateQueries({ queryKey: ['designs'], exact: true });
      void client.invalidateQueries({ queryKey: ['briefs'] });
      void client.invalidateQueries({ queryKey: ['desk'] });
    },
  });
}

/** Where a revision is worked on or read. */
export const revisionPath = (designId: string, letter: string): string => `/designs/${designId}/${letter}`;
