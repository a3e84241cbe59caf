import { z } from 'zod';
import { PersonName, Time } from './basics';
import { route } from './route';

export const AuditEntry = z.strictObject({
  sequence: z.number().int(),
  at: Time,
  by: PersonName.nullable(),
  action: z.string(),
  subject: z.string(),
  subjectId: z.string(),
  detail: z.record(z.string(), z.unknown()),
  hash: z.string(),
});
export type AuditEntry = z.infer<typeof AuditEntry>;

export const Verification = z.strictObject({
  intact: z.boolean(),
  entries: z.number().int(),
  /** Sequence of the first entry that does not fit the chain, and what is wrong. */
  firstFault: z.strictObject({ sequence: z.number().int(), what: z.string() }).nullable(),
  lastHash: z.string().nullable(),
});
export type Verification = z.infer<typeof Verification>;

export const auditRoutes = {
  listAudit: route({
    method: 'get',
    path: '/audit',
    summary: 'The audit trail, newest first',
    allowed: ['administrator'],
    query: z.strictObject({
      before: z.coerce.number().int().optional(),
      limit: z.coerce.number().int().min(1).max(500).default(100),
    }),
    answer: z.strictObject({ entries: z.array(AuditEntry) }),
  }),
  verifyAudit: route({
    method: 'get',
    path: '/audit/verification',
    summary: 'Check the hash chain',
    allowed: ['administrator'],
    answer: Verification,
  }),
};
