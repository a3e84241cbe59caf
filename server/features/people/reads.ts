import type { Knex } from 'knex';
import type { PersonName } from '#contracts/basics';
import type { Role } from '#workflows/revision';

export interface Contact extends PersonName {
  email: string;
}

/** Everybody who holds the role and may sign in, by name. */
export const peopleByRole = (db: Knex, role: Role): Promise<Contact[]> =>
  db('people')
    .join('person_roles', 'person_roles.person_id', 'people.id')
    .where({ active: 1, role })
    .orderBy('name')
    .select<Contact[]>('people.id', 'people.name', 'people.email');

/** Names of these people, whether or not they may still sign in, by id. */
export async function personNames(db: Knex, ids: Iterable<string | null>): Promise<Map<string, PersonName>> {
  const wanted = [...new Set(ids)].filter((id) => id !== null);
  const people = await db('people').whereIn('id', wanted).select<PersonName[]>('id', 'name');
  return new Map(people.map((person) => [person.id, person]));
}

/** Name and address as they are now. */
export async function personContact(db: Knex, id: string): Promise<Contact> {
  const person = await db('people').where({ id }).first<Contact | undefined>('id', 'name', 'email');
  if (person === undefined) throw new Error(`There is no person ${id}.`);
  return person;
}
