import { randomUUID } from 'node:crypto';
import { signatureMeaning } from '#workflows/revision';
import type { SignedEvent } from '#workflows/revision';
import type { Deps } from '../../app';
import { conflict, invalid, tooMany } from '../../errors';
import type { OpenStep } from '../../way/step';
import { confirmPassword } from '../auth/reads';
import { digestOf, evidenceOf } from './evidence';

export const wrongPasswords = { most: 5, withinMinutes: 15 };

/** Asks for the password again before a signature; after five wrong ones a person has to wait. */
export function passwordCheck({
  db,
  now,
}: Pick<Deps, 'db' | 'now'>): (personId: string, password: string) => Promise<void> {
  const wrong = new Map<string, number[]>();
  return async (personId, password) => {
    const time = now().getTime();
    const recent = (wrong.get(personId) ?? []).filter((at) => time - at < wrongPasswords.withinMinutes * 60_000);
    if (recent.length >= wrongPasswords.most) {
      const wait = Math.ceil(((recent[0] ?? time) + wrongPasswords.withinMinutes * 60_000 - time) / 1000);
      throw tooMany(
        `Too many wrong passwords. Try again in ${Math.ceil(wait / 60)} ${wait <= 60 ? 'minute' : 'minutes'}.`,
        wait,
      );
    }
    // Counted before it is checked, so that many attempts at once do not slip through together.
    wrong.set(personId, [...recent, time]);
    if (!(await confirmPassword(db, personId, password))) {
      throw invalid([{ path: 'password', message: 'This is not your password.' }], 'This is not your password.');
    }
    wrong.delete(personId);
  };
}

/** Writes the signature, in the transaction of the step that it is for. Refuses when something other than was shown stands. */
export async function sign(
  { trx, at, actor, actorName, revision }: OpenStep,
  event: SignedEvent,
  signedDigest: string,
  statement: string,
): Promise<void> {
  const digest = digestOf(await evidenceOf(trx, revision));
  if (digest !== signedDigest) {
    throw conflict('What you were shown is not what stands now. Nothing was signed; look at it again.');
  }
  await trx('signatures').insert({
    id: randomUUID(),
    revision_id: revision.id,
    by_id: actor.id,
    by_name: actorName,
    at,
    event,
    meaning: signatureMeaning[event],
    statement,
    digest,
  });
}
