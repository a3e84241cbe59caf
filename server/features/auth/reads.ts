import type { Knex } from 'knex';
import type { Role } from '#workflows/revision';
import { roles } from '#workflows/revision';
import type { SignedIn } from '../../http/session-user';
import { passwordMatches } from './passwords';

export { hashPassword } from './passwords';

interface AccountRow {
  id: string;
  name: string;
  email: string;
  password_hash: string;
  active: number;
}

async function withRoles(db: Knex, { id, name, email }: AccountRow): Promise<SignedIn> {
  const held = await db('person_roles').where({ person_id: id }).pluck<Role[]>('role');
  return { id, name, email, roles: roles.filter((role) => held.includes(role)) };
}

/** Who this is now, with the roles of this moment; null when the person may no longer sign in. */
export async function readSignedIn(db: Knex, personId: string): Promise<SignedIn | null> {
  const account = await db<AccountRow>('people').where({ id: personId, active: 1 }).first();
  return account === undefined ? null : withRoles(db, account);
}

/** The person with this address and password; null for an unknown address, a wrong password, an inactive account alike. */
export async function signInCandidate(db: Knex, email: string, password: string): Promise<SignedIn | null> {
  const account = await db<AccountRow>('people').where({ email: email.trim() }).first();
  const matches = await passwordMatches(account?.password_hash ?? null, password);
  return account !== undefined && matches && account.active === 1 ? withRoles(db, account) : null;
}

/** Whether this is the person's password: asked again for each signature. Costs some 30 ms: ask before the transaction. */
export async function confirmPassword(db: Knex, personId: string, password: string): Promise<boolean> {
  const account = await db<AccountRow>('people').where({ id: personId, active: 1 }).first();
  return passwordMatches(account?.password_hash ?? null, password);
}
