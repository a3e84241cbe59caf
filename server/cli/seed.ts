import type { Role } from '#workflows/revision';
import type { Deps } from '../app';
import { openStage } from './demo/stage';
import { story, storyDays } from './demo/story';
import { addressOf, demoPassword, people } from './demo/team';
import type { PersonKey } from './demo/team';

export interface DemoSignIn {
  email: string;
  password: string;
  roles: Role[];
}

/**
 * Plays the story of an invented team into an empty database, through the same services that people use: real estimates,
 * steps, signatures, audit entries and messages. The same story each time, ending the day before it is put in.
 */
export async function seedDemo(deps: Deps): Promise<{ signIns: DemoSignIn[] }> {
  // Some two hundred short transactions: waiting for the disk after each would take most of the time.
  await deps.db.raw('PRAGMA synchronous = NORMAL');
  const stage = await openStage(deps, storyDays);
  for (const { day, time, play } of story) {
    stage.at(day, time);
    await play(stage);
  }
  await deps.db.raw('PRAGMA synchronous = FULL');
  const keys = Object.keys(people) as PersonKey[];
  return {
    signIns: keys.map((key) => ({ email: addressOf(key), password: demoPassword, roles: [...people[key].roles] })),
  };
}

// As a command: `npm run seed`. Not awaited here, because the set-up imports this module in turn.
if (process.argv[1]?.endsWith('seed.ts') === true) {
  import('./setup')
    .then(({ setUp }) => setUp(process.env, { demo: true }))
    .catch((error: unknown) => {
      console.error(error);
      process.exitCode = 1;
    });
}
