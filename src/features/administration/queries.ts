import { infiniteQueryOptions, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { auditRoutes } from '#contracts/audit';
import { mailRoutes } from '#contracts/mail';
import { callRoute } from '../../lib/fetch-json';

export const mailQuery = queryOptions({
  queryKey: ['mail'],
  queryFn: ({ signal }) => callRoute(mailRoutes.listMail, { signal }),
});

export const messageQuery = (messageId: string) =>
  queryOptions({
    queryKey: ['mail', messageId],
    queryFn: ({ signal }) => callRoute(mailRoutes.readMail, { params: { messageId }, signal }),
  });

export function useResendMail(messageId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => callRoute(mailRoutes.resendMail, { params: { messageId } }),
    onSuccess: () => client.invalidateQueries({ queryKey: mailQuery.queryKey }),
  });
}

/** Entries asked for at once. */
export const auditPage = 100;

export const auditQuery = infiniteQueryOptions({
  queryKey: ['audit'],
  queryFn: ({ pageParam, signal }) =>
    callRoute(auditRoutes.listAudit, {
      query: pageParam === null ? { limit: auditPage } : { limit: auditPage, before: pageParam },
      signal,
    }),
  initialPageParam: null as number | null,
  getNextPageParam: ({ entries }) => (entries.length < auditPage ? undefined : entries[entries.length - 1]?.sequence),
});

export const verificationQuery = queryOptions({
  queryKey: ['audit', 'verification'],
  queryFn: ({ signal }) => callRoute(auditRoutes.verifyAudit, { signal }),
});
