import type { Deps } from './app';
import type { Config } from './config';
import { openDatabase } from './db';
import { estimatesInThreads } from './jobs/estimate-pool';
import { createLog } from './log';

/** Everything that serves for real: the database file, the log, the worker threads, the clock. */
export const openDeps = (config: Config): Deps => ({
  db: openDatabase(config.databaseFile),
  config,
  log: createLog(config),
  estimator: estimatesInThreads(),
  now: () => new Date(),
});

export async function closeDeps({ db, estimator }: Deps): Promise<void> {
  await estimator.close();
  await db.destroy();
}
