import type { Knex } from 'knex';
import type { Change } from '#contracts/error';
import type { AuditRow } from '../../audit';

interface LastChange extends Pick<AuditRow, 'at' | 'action'> {
  name: string | null;
}

/** What the trail last tells of a thing, in the form that goes with a 409. */
export async function lastChangeOf(db: Knex, subject: string, subjectId: string, version: number): Promise<Change[]> {
  const last = await db('audit_entries')
    .leftJoin('people', 'people.id', 'audit_entries.actor_id')
    .where({ subject, subject_id: subjectId })
    .whereIn('action', ['created', 'changed'])
    .orderBy('sequence', 'desc')
    .first<LastChange | undefined>('at', 'action', 'people.name');
  return last === undefined ? [] : [{ version, by: last.name, at: last.at, what: last.action }];
}
