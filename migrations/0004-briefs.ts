import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  // Last number given of each kind (BR, FN, RUN, IN, REL-2027): taken in the transaction of what it numbers.
  await db.raw(`
    CREATE TABLE number_sequences (
      name TEXT PRIMARY KEY,
      last INTEGER NOT NULL CHECK (last >= 1)
    ) STRICT`);
  await db.raw(`
    CREATE TABLE briefs (
      id TEXT PRIMARY KEY,
      number TEXT NOT NULL UNIQUE,
      version INTEGER NOT NULL CHECK (version >= 1),
      document TEXT NOT NULL CHECK (json_valid(document)),
      created_at TEXT NOT NULL,
      created_by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      updated_at TEXT NOT NULL,
      updated_by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT
    ) STRICT`);
  await db.raw(`
    CREATE TABLE brief_versions (
      brief_id TEXT NOT NULL REFERENCES briefs (id) ON DELETE RESTRICT,
      version INTEGER NOT NULL CHECK (version >= 1),
      document TEXT NOT NULL CHECK (json_valid(document)),
      at TEXT NOT NULL,
      by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      PRIMARY KEY (brief_id, version)
    ) STRICT`);
  await db.raw(`
    CREATE TRIGGER brief_versions_never_updated BEFORE UPDATE ON brief_versions
    BEGIN SELECT RAISE(ABORT, 'a version of a brief is never changed'); END`);
  await db.raw(`
    CREATE TRIGGER brief_versions_never_deleted BEFORE DELETE ON brief_versions
    BEGIN SELECT RAISE(ABORT, 'a version of a brief is never removed'); END`);
}

export async function down(db: Knex): Promise<void> {
  await db.raw('DROP TABLE brief_versions');
  await db.raw('DROP TABLE briefs');
  await db.raw('DROP TABLE number_sequences');
}
