import { z } from 'zod';

export const errorCodes = [
  'invalid',
  'unauthenticated',
  'forbidden',
  'csrf',
  'notFound',
  'conflict',
  'tooMany',
  'unavailable',
  'bug',
] as const;
export const ErrorCode = z.enum(errorCodes);
export type ErrorCode = z.infer<typeof ErrorCode>;

/** One thing wrong with what was sent: where, what it was, why, and the limit where there is one. */
export const Issue = z.strictObject({
  path: z.string(),
  value: z.unknown().optional(),
  message: z.string(),
  limit: z.union([z.string(), z.number()]).optional(),
});
export type Issue = z.infer<typeof Issue>;

/** What changed since the page was loaded, told with a 409. */
export const Change = z.strictObject({
  version: z.number().int(),
  by: z.string().nullable(),
  at: z.string(),
  what: z.string(),
});
export type Change = z.infer<typeof Change>;

export const ErrorAnswer = z.strictObject({
  error: z.strictObject({
    code: ErrorCode,
    message: z.string(),
    issues: z.array(Issue).optional(),
    changed: z.array(Change).optional(),
    requestId: z.string().optional(),
  }),
});
export type ErrorAnswer = z.infer<typeof ErrorAnswer>;
