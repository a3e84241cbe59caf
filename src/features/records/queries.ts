import { queryOptions } from '@tanstack/react-query';
import { recordRoutes } from '#contracts/records';
import { callRoute } from '../../lib/fetch-json';

export const recordsQuery = queryOptions({
  queryKey: ['records'],
  queryFn: ({ signal }) => callRoute(recordRoutes.listRecords, { signal }),
});

export const recordQuery = (recordId: string) =>
  queryOptions({
    queryKey: ['records', recordId],
    queryFn: ({ signal }) => callRoute(recordRoutes.readRecord, { params: { recordId }, signal }),
  });
