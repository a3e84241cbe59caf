import type { Knex } from 'knex';
import * as peopleAndSessions from './0001-people-and-sessions';
import * as auditEntries from './0002-audit-entries';
import * as mailMessages from './0003-mail-messages';
import * as briefs from './0004-briefs';
import * as designsAndRevisions from './0005-designs-and-revisions';
import * as remarksAndSignatures from './0006-remarks-and-signatures';
import * as instrumentsAndRuns from './0007-instruments-and-runs';
import * as records from './0008-records';

interface Migration {
  up: (db: Knex) => Promise<void>;
  down: (db: Knex) => Promise<void>;
}

/** All changes of the database in their order. Names have no extension: they are the same from source and from the bundle. */
export const migrations: Record<string, Migration> = {
  '0001-people-and-sessions': peopleAndSessions,
  '0002-audit-entries': auditEntries,
  '0003-mail-messages': mailMessages,
  '0004-briefs': briefs,
  '0005-designs-and-revisions': designsAndRevisions,
  '0006-remarks-and-signatures': remarksAndSignatures,
  '0007-instruments-and-runs': instrumentsAndRuns,
  '0008-records': records,
};

export const migrationSource: Knex.MigrationSource<string> = {
  getMigrations: () => Promise.resolve(Object.keys(migrations)),
  getMigrationName: (name) => name,
  getMigration(name) {
    const migration = migrations[name];
    if (migration === undefined) throw new Error(`There is no migration ${name}.`);
    return Promise.resolve(migration);
  },
};
