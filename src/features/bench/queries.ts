import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { instrumentRoutes } from '#contracts/instruments';
import type { InstrumentChange, InstrumentCreate } from '#contracts/instruments';
import { runRoutes } from '#contracts/runs';
import type { Conditions, ReadingCreate, Run } from '#contracts/runs';
import { callRoute } from '../../lib/fetch-json';

export const runsQuery = queryOptions({
  queryKey: ['runs'],
  queryFn: ({ signal }) => callRoute(runRoutes.listRuns, { signal }),
});

export const runQuery = (runId: string) =>
  queryOptions({
    queryKey: ['runs', runId],
    queryFn: ({ signal }) => callRoute(runRoutes.readRun, { params: { runId }, signal }),
  });

export const instrumentsQuery = queryOptions({
  queryKey: ['instruments'],
  queryFn: ({ signal }) => callRoute(instrumentRoutes.listInstruments, { signal }),
});

/** A changed run also moves what its revision offers (the result can be signed once every reading is taken). */
function useKeepRun() {
  const client = useQueryClient();
  return (run: Run) => {
    client.setQueryData(runQuery(run.id).queryKey, run);
    void client.invalidateQueries({ queryKey: ['revisions', run.revision.id] });
    void client.invalidateQueries({ queryKey: ['desk'] });
  };
}

export function useAddReading(runId: string) {
  const keep = useKeepRun();
  return useMutation({
    mutationFn: (body: ReadingCreate) => callRoute(runRoutes.addReading, { params: { runId }, body }),
    onSuccess: keep,
  });
}

export function useStrikeReading(runId: string) {
  const keep = useKeepRun();
  return useMutation({
    mutationFn: ({ readingId, reason }: { readingId: string; reason: string }) =>
      callRoute(runRoutes.strikeReading, { params: { runId, readingId }, body: { reason } }),
    onSuccess: keep,
  });
}

export function useRecordConditions(runId: string) {
  const keep = useKeepRun();
  return useMutation({
    mutationFn: (body: Conditions) => callRoute(runRoutes.recordConditions, { params: { runId }, body }),
    onSuccess: keep,
  });
}

export function useSaveInstrument() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (
      save: { instrumentId: string; body: InstrumentChange } | { instrumentId: null; body: InstrumentCreate },
    ) =>
      save.instrumentId === null
        ? callRoute(instrumentRoutes.createInstrument, { body: save.body })
        : callRoute(instrumentRoutes.changeInstrument, {
            params: { instrumentId: save.instrumentId },
            body: save.body,
          }),
    onSuccess: () => client.invalidateQueries({ queryKey: instrumentsQuery.queryKey }),
  });
}
