import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  await db.raw(`
    CREATE TABLE records (
      id TEXT PRIMARY KEY,
      release_number TEXT NOT NULL UNIQUE,
      revision_id TEXT NOT NULL UNIQUE REFERENCES revisions (id) ON DELETE RESTRICT,
      dossier TEXT NOT NULL CHECK (json_valid(dossier)),
      digest TEXT NOT NULL UNIQUE CHECK (length(digest) = 64),
      released_at TEXT NOT NULL,
      released_by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT
    ) STRICT`);
  await db.raw(`
    CREATE TRIGGER records_never_updated BEFORE UPDATE ON records
    BEGIN SELECT RAISE(ABORT, 'a record is never changed'); END`);
  await db.raw(`
    CREATE TRIGGER records_never_deleted BEFORE DELETE ON records
    BEGIN SELECT RAISE(ABORT, 'a record is never removed'); END`);
}

export async function down(db: Knex): Promise<void> {
  await db.raw('DROP TABLE records');
}
