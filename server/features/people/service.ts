import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { Person, PersonChange, PersonCreate } from '#contracts/people';
import type { Deps } from '../../app';
import { appendAudit } from '../../audit';
import { conflict, invalid, notFound } from '../../errors';
import { endSessions } from '../../http/session-store';
import { hashPassword } from '../auth/reads';
import { lastChangeOf } from '../audit/reads';
import { otherAdministrators, ownerOfAddress, readPerson, replaceRoles } from './store';
import type { PersonRow } from './store';

type Needed = Pick<Deps, 'db' | 'now'>;

async function refuseTakenAddress(trx: Knex, email: string, personId: string): Promise<void> {
  const owner = await ownerOfAddress(trx, email);
  if (owner !== undefined && owner.id !== personId) {
    throw invalid([{ path: 'email', value: email, message: 'Somebody has this address already.' }]);
  }
}

async function stored(trx: Knex, id: string): Promise<Person> {
  const person = await readPerson(trx, id);
  if (person === null) throw notFound('This person');
  return person;
}

/** Adds a person. `actorId` is null for the first administrator, whom nobody could add. */
export async function createPerson(
  { db, now }: Needed,
  { name, email, roles, initialPassword }: PersonCreate,
  actorId: string | null,
): Promise<Person> {
  const password_hash = await hashPassword(initialPassword);
  const id = randomUUID();
  const at = now().toISOString();
  return db.transaction(async (trx) => {
    await refuseTakenAddress(trx, email, id);
    await trx<PersonRow>('people').insert({ id, name, email, password_hash, active: 1, version: 1, created_at: at });
    await replaceRoles(trx, id, roles);
    const detail = { name, email, roles: [...roles].sort() };
    await appendAudit(trx, { at, actorId, action: 'created', subject: 'person', subjectId: id, detail });
    return stored(trx, id);
  });
}

const tracked = ['name', 'email', 'roles', 'active'] as const;

/** What differs, as { name: { from, to } }: for the audit trail and for telling others. */
function difference(before: Person, after: Person): Record<string, { from: unknown; to: unknown }> {
  const changed = tracked.filter((key) => JSON.stringify(before[key]) !== JSON.stringify(after[key]));
  return Object.fromEntries(changed.map((key) => [key, { from: before[key], to: after[key] }]));
}

/**
 * Changes a person. Takes effect at the person's next request; one who may no longer sign in is signed out everywhere.
 * The last active administrator stays one.
 */
export async function changePerson(
  { db, now }: Needed,
  id: string,
  { version, name, email, roles, active }: PersonChange,
  actorId: string,
): Promise<Person> {
  const at = now().toISOString();
  return db.transaction(async (trx) => {
    const before = await stored(trx, id);
    if (before.version !== version) {
      throw conflict('This person was changed meanwhile.', await lastChangeOf(trx, 'person', id, before.version));
    }
    await refuseTakenAddress(trx, email, id);
    const administered = before.active && before.roles.includes('administrator');
    const administers = active && roles.includes('administrator');
    if (administered && !administers && (await otherAdministrators(trx, id)) === 0) {
      throw conflict('This is the last administrator who can sign in. Make somebody else administrator first.');
    }
    await trx<PersonRow>('people')
      .where({ id, version })
      .update({ name, email, active: active ? 1 : 0, version: version + 1 });
    await replaceRoles(trx, id, roles);
    if (!active) await endSessions(trx, id);
    const after = await stored(trx, id);
    const detail = difference(before, after);
    await appendAudit(trx, { at, actorId, action: 'changed', subject: 'person', subjectId: id, detail });
    return after;
  });
}
