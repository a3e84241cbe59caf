import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  await db.raw(`
    CREATE TABLE remarks (
      id TEXT PRIMARY KEY,
      revision_id TEXT NOT NULL REFERENCES revisions (id) ON DELETE RESTRICT,
      by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      at TEXT NOT NULL,
      text TEXT NOT NULL CHECK (text <> ''),
      blocking INTEGER NOT NULL CHECK (blocking IN (0, 1)),
      target TEXT,
      closed_by_id TEXT REFERENCES people (id) ON DELETE RESTRICT,
      closed_at TEXT,
      answer TEXT,
      CHECK ((closed_at IS NULL) = (closed_by_id IS NULL)),
      CHECK ((closed_at IS NULL) = (answer IS NULL))
    ) STRICT`);
  await db.raw('CREATE INDEX remarks_revision ON remarks (revision_id)');
  await db.raw(`
    CREATE TRIGGER remarks_words_frozen BEFORE UPDATE OF id, revision_id, by_id, at, text, blocking, target ON remarks
    BEGIN SELECT RAISE(ABORT, 'a remark is never changed'); END`);
  await db.raw(`
    CREATE TRIGGER remarks_closed_once BEFORE UPDATE ON remarks WHEN OLD.closed_at IS NOT NULL
    BEGIN SELECT RAISE(ABORT, 'a closed remark is never changed'); END`);
  await db.raw(`
    CREATE TRIGGER remarks_never_deleted BEFORE DELETE ON remarks
    BEGIN SELECT RAISE(ABORT, 'a remark is never removed'); END`);
  // The name is kept as it was when the person signed.
  await db.raw(`
    CREATE TABLE signatures (
      id TEXT PRIMARY KEY,
      revision_id TEXT NOT NULL REFERENCES revisions (id) ON DELETE RESTRICT,
      by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      by_name TEXT NOT NULL CHECK (by_name <> ''),
      at TEXT NOT NULL,
      event TEXT NOT NULL CHECK (event IN ('approve', 'signResult', 'grantConcession', 'release', 'recall')),
      meaning TEXT NOT NULL CHECK (meaning <> ''),
      statement TEXT NOT NULL,
      digest TEXT NOT NULL CHECK (length(digest) = 64)
    ) STRICT`);
  await db.raw('CREATE INDEX signatures_revision ON signatures (revision_id)');
  await db.raw(`
    CREATE TRIGGER signatures_never_updated BEFORE UPDATE ON signatures
    BEGIN SELECT RAISE(ABORT, 'a signature is never changed'); END`);
  await db.raw(`
    CREATE TRIGGER signatures_never_deleted BEFORE DELETE ON signatures
    BEGIN SELECT RAISE(ABORT, 'a signature is never removed'); END`);
}

export async function down(db: Knex): Promise<void> {
  await db.raw('DROP TABLE signatures');
  await db.raw('DROP TABLE remarks');
}
