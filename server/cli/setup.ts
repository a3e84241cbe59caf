import { randomBytes } from 'node:crypto';
import { PersonCreate } from '#contracts/people';
import { roleWords } from '#workflows/revision';
import type { Deps } from '../app';
import { ConfigError, loadConfig } from '../config';
import { migrateToLatest, openDatabase } from '../db';
import { closeDeps, openDeps } from '../deps';
import { createPerson } from '../features/people/service';
import { plainWords } from '../http/issues';
import { seedDemo } from './seed';

/** The first administrator: as ADMIN_EMAIL and ADMIN_PASSWORD say, else with a password that is shown this once. */
async function addFirstAdministrator(deps: Deps, environment: NodeJS.ProcessEnv): Promise<void> {
  const given = environment.ADMIN_PASSWORD;
  const password = given ?? randomBytes(15).toString('base64url');
  const read = PersonCreate.safeParse(
    {
      name: environment.ADMIN_NAME ?? 'Administrator',
      email: environment.ADMIN_EMAIL ?? 'administrator@tremolode.example',
      roles: ['administrator'],
      initialPassword: password,
    },
    { error: plainWords },
  );
  if (!read.success) {
    const variables: Record<string, string> = {
      email: 'ADMIN_EMAIL',
      initialPassword: 'ADMIN_PASSWORD',
      name: 'ADMIN_NAME',
    };
    const faults = read.error.issues.map(({ path, message }) => `  ${variables[String(path[0])] ?? ''}: ${message}`);
    throw new ConfigError(`The first administrator cannot be added.\n${faults.join('\n')}`);
  }
  await createPerson(deps, read.data, null);
  console.log('\nThe first administrator has been added. Sign in, then add people under Administration.');
  console.log(`  address   ${read.data.email}`);
  console.log(
    given === undefined
      ? `  password  ${password}   (shown this once: change it after signing in)\n`
      : '  password  as given in ADMIN_PASSWORD\n',
  );
}

/**
 * Brings the database up to date. Into an empty one it puts the demonstration data and prints who can sign in, or, for a
 * real one, the first administrator.
 */
export async function setUp(environment: NodeJS.ProcessEnv, { demo }: { demo: boolean }): Promise<void> {
  const config = loadConfig(environment);
  const db = openDatabase(config.databaseFile);
  const isEmpty = await migrateToLatest(db)
    .then(() => db('people').first('id'))
    .then((anybody) => anybody === undefined)
    .finally(() => db.destroy());
  if (!isEmpty) return;
  // The worker threads are started for this alone, not for a look at whether there is anything to do.
  const deps = openDeps(config);
  try {
    if (!demo) {
      await addFirstAdministrator(deps, environment);
      return;
    }
    console.log('\nThe database is empty: putting in the demonstration data …');
    const { signIns } = await seedDemo(deps);
    // The messages of the story are there to be read; invented addresses are not written to.
    await deps.db('mail_messages').where({ state: 'waiting' }).update({ state: 'kept' });
    console.log('\nSign in as one of an invented team:');
    for (const { email, password, roles } of signIns) {
      console.log(`  ${email.padEnd(34)} ${password.padEnd(22)} ${roles.map((role) => roleWords[role]).join(', ')}`);
    }
    console.log('');
  } finally {
    await closeDeps(deps);
  }
}
