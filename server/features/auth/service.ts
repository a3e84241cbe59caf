import type { PasswordChange } from '#contracts/session';
import type { Deps } from '../../app';
import { appendAudit } from '../../audit';
import { invalid } from '../../errors';
import { endSessions } from '../../http/session-store';
import { hashPassword } from './passwords';
import { confirmPassword } from './reads';

type Needed = Pick<Deps, 'db' | 'now'>;

export async function noteSignIn({ db, now }: Needed, personId: string): Promise<void> {
  const at = now().toISOString();
  await db.transaction(async (trx) => {
    await trx('people').where({ id: personId }).update({ last_sign_in_at: at });
    await appendAudit(trx, {
      at,
      actorId: personId,
      action: 'signedIn',
      subject: 'person',
      subjectId: personId,
      detail: {},
    });
  });
}

export async function signOutEverywhere({ db, now }: Needed, personId: string): Promise<void> {
  await db.transaction(async (trx) => {
    await endSessions(trx, personId);
    await appendAudit(trx, {
      at: now().toISOString(),
      actorId: personId,
      action: 'signedOutEverywhere',
      subject: 'person',
      subjectId: personId,
      detail: {},
    });
  });
}

/** Changes the own password and ends every other session of the person. */
export async function changePassword(
  { db, now }: Needed,
  { personId, currentPassword, newPassword, keepSession }: PasswordChange & { personId: string; keepSession: string },
): Promise<void> {
  if (!(await confirmPassword(db, personId, currentPassword))) {
    throw invalid([{ path: 'currentPassword', message: 'This is not your password.' }]);
  }
  const password_hash = await hashPassword(newPassword);
  await db.transaction(async (trx) => {
    await trx('people').where({ id: personId }).update({ password_hash });
    await endSessions(trx, personId, keepSession);
    await appendAudit(trx, {
      at: now().toISOString(),
      actorId: personId,
      action: 'changedPassword',
      subject: 'person',
      subjectId: personId,
      detail: {},
    });
  });
}
