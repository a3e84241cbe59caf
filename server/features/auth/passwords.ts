import { hash, verify } from '@node-rs/argon2';

/** Argon2id (the package's default) with the memory and passes commonly advised; some 30 ms, off the event loop. */
const settings = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const hashPassword = (password: string): Promise<string> => hash(password, settings);

/** Hash of a random text that nobody has, with the same settings as all others; ready before the first sign-in. */
const nobodysHash = hashPassword(crypto.randomUUID());

/** Takes the same time whether or not there is a hash to compare with. */
export async function passwordMatches(passwordHash: string | null, password: string): Promise<boolean> {
  const matches = await verify(passwordHash ?? (await nobodysHash), password);
  return matches && passwordHash !== null;
}
