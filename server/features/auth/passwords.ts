import { hash, verify } from '@node-rs/argon2';

/** Argon2id (the package's default) with the memory and passes commonly advised; some 30 ms, off the event loop. */
const settings = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const hashPassword = (password: string): Promise<string> => hash(password, settings);

/** Hash of a random text that nobody has; made once, with the same settings as all others. */
let nobodysHash: Promise<string> | null = null;

/** Takes the same time whether or not there is a hash to compare with. */
export async function passwordMatches(passwordHash: string | null, password: string): Promise<boolean> {
  nobodysHash ??= hashPassword(crypto.randomUUID());
  const matches = await verify(passwordHash ?? (await nobodysHash), password);
  return matches && passwordHash !== null;
}
