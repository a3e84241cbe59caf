import type { Knex } from 'knex';
import { z } from 'zod';
import type { Verification } from '#contracts/audit';
import { canonicalJson, sha256 } from './canonical-json';

export interface AuditEvent {
  at: string;
  /** Null where the server itself acted. */
  actorId: string | null;
  /** A verb in the past: “created”, “submitted”. */
  action: string;
  /** Kind of thing it was done to: “revision”. */
  subject: string;
  subjectId: string;
  detail: Record<string, unknown>;
}

export interface AuditRow {
  sequence: number;
  at: string;
  actor_id: string | null;
  action: string;
  subject: string;
  subject_id: string;
  detail: string;
  previous_hash: string;
  hash: string;
}

export const AuditDetail = z.record(z.string(), z.unknown());

/** Hash of an entry: SHA-256 over the previous hash and the row's canonical JSON. */
const hashOf = ({ hash: _hash, previous_hash, ...row }: AuditRow): string => sha256(previous_hash + canonicalJson(row));

/** Appends one entry to the chain, in the transaction of what it tells of. */
export async function appendAudit(trx: Knex.Transaction, event: AuditEvent): Promise<void> {
  const last = await trx<AuditRow>('audit_entries').orderBy('sequence', 'desc').first('sequence', 'hash');
  const row: AuditRow = {
    sequence: (last?.sequence ?? 0) + 1,
    at: event.at,
    actor_id: event.actorId,
    action: event.action,
    subject: event.subject,
    subject_id: event.subjectId,
    detail: canonicalJson(event.detail),
    previous_hash: last?.hash ?? '',
    hash: '',
  };
  await trx('audit_entries').insert({ ...row, hash: hashOf(row) });
}

const batch = 1000;

/**
 * Walks the whole chain and names the first entry that does not fit: altered, removed, or moved. A cut tail shows
 * against the highest sequence ever given; to be sure against someone who can write every table, keep `lastHash` elsewhere.
 */
export async function verifyAudit(db: Knex): Promise<Verification> {
  let sequence = 0;
  let lastHash = '';
  const fault = (what: string): Verification => ({
    intact: false,
    entries: sequence,
    firstFault: { sequence: sequence + 1, what },
    lastHash: lastHash === '' ? null : lastHash,
  });
  for (;;) {
    const rows = await db<AuditRow>('audit_entries').where('sequence', '>', sequence).orderBy('sequence').limit(batch);
    for (const row of rows) {
      if (row.sequence !== sequence + 1) return fault(`Entry ${sequence + 1} is missing.`);
      if (row.previous_hash !== lastHash) return fault('It does not follow from the entry before it.');
      if (row.hash !== hashOf(row)) return fault('Its content does not match its hash.');
      sequence = row.sequence;
      lastHash = row.hash;
    }
    if (rows.length < batch) break;
  }
  const given = await db('sqlite_sequence').where({ name: 'audit_entries' }).first<{ seq: number } | undefined>('seq');
  if (given !== undefined && given.seq > sequence) return fault(`Entry ${sequence + 1} and what followed are missing.`);
  return { intact: true, entries: sequence, firstFault: null, lastHash: lastHash === '' ? null : lastHash };
}
