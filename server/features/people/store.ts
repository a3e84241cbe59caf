import type { Knex } from 'knex';
import type { Person } from '#contracts/people';
import { roles } from '#workflows/revision';
import type { Role } from '#workflows/revision';

export interface PersonRow {
  id: string;
  name: string;
  email: string;
  password_hash: string;
  active: number;
  version: number;
  created_at: string;
  last_sign_in_at: string | null;
}

const present = (row: PersonRow, held: ReadonlySet<Role>): Person => ({
  id: row.id,
  name: row.name,
  email: row.email,
  roles: roles.filter((role) => held.has(role)),
  active: row.active === 1,
  version: row.version,
  createdAt: row.created_at,
  lastSignInAt: row.last_sign_in_at,
});

async function rolesOf(db: Knex): Promise<Map<string, Set<Role>>> {
  const held = new Map<string, Set<Role>>();
  for (const { person_id, role } of await db('person_roles').select<{ person_id: string; role: Role }[]>('*')) {
    held.set(person_id, (held.get(person_id) ?? new Set()).add(role));
  }
  return held;
}

export async function listPeople(db: Knex): Promise<Person[]> {
  const held = await rolesOf(db);
  const rows = await db<PersonRow>('people').orderBy('name');
  return rows.map((row) => present(row, held.get(row.id) ?? new Set()));
}

export async function readPerson(db: Knex, id: string): Promise<Person | null> {
  const row = await db<PersonRow>('people').where({ id }).first();
  if (row === undefined) return null;
  return present(row, new Set(await db('person_roles').where({ person_id: id }).pluck<Role[]>('role')));
}

/** Whoever has this address, whatever its case. */
export const ownerOfAddress = (db: Knex, email: string): Promise<{ id: string } | undefined> =>
  db('people').where({ email }).first<{ id: string } | undefined>('id');

export async function replaceRoles(db: Knex, personId: string, held: readonly Role[]): Promise<void> {
  await db('person_roles').where({ person_id: personId }).delete();
  const rows = [...new Set(held)].map((role) => ({ person_id: personId, role }));
  if (rows.length > 0) await db('person_roles').insert(rows);
}

/** How many besides this person could still administer. */
export async function otherAdministrators(db: Knex, personId: string): Promise<number> {
  const ids = await db('people')
    .join('person_roles', 'person_roles.person_id', 'people.id')
    .where({ active: 1, role: 'administrator' })
    .whereNot('people.id', personId)
    .pluck<string[]>('people.id');
  return ids.length;
}
