import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';
import type BetterSqlite3 from 'better-sqlite3';
import knex from 'knex';
import type { Knex } from 'knex';
import { migrationSource } from '#migrations';

/** One connection: SQLite has one writer, and pragmas belong to a connection. Work inside a transaction uses its `trx`. */
export const knexSettings = (file: string): Knex.Config => ({
  client: 'better-sqlite3',
  connection: { filename: file },
  useNullAsDefault: true,
  acquireConnectionTimeout: 15_000,
  pool: {
    min: 1,
    max: 1,
    afterCreate(connection: BetterSqlite3.Database, done: (error: Error | null) => void) {
      try {
        connection.pragma('journal_mode = WAL');
        connection.pragma('synchronous = FULL');
        connection.pragma('foreign_keys = ON');
        // Else REPLACE would remove a row without asking the triggers that forbid it.
        connection.pragma('recursive_triggers = ON');
        connection.pragma('busy_timeout = 5000');
        done(null);
      } catch (error) {
        done(error instanceof Error ? error : new Error(String(error)));
      }
    },
  },
  migrations: { migrationSource, tableName: 'migrations' },
});

/** Opens (and makes, where absent) the database file; `:memory:` for one that lives with the connection. */
export function openDatabase(file: string): Knex {
  if (file !== ':memory:') mkdirSync(dirname(file), { recursive: true, mode: 0o700 });
  return knex(knexSettings(file));
}

/** Brings the database to the latest form. Returns the names of the migrations that were carried out. */
export async function migrateToLatest(db: Knex): Promise<string[]> {
  const [, names] = (await db.migrate.latest()) as [number, string[]];
  return names;
}
