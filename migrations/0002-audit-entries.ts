import type { Knex } from 'knex';

/** AUTOINCREMENT keeps the highest sequence ever given in sqlite_sequence, so that a cut tail is noticed too. */
export async function up(db: Knex): Promise<void> {
  await db.raw(`
    CREATE TABLE audit_entries (
      sequence INTEGER PRIMARY KEY AUTOINCREMENT,
      at TEXT NOT NULL,
      actor_id TEXT REFERENCES people (id) ON DELETE RESTRICT,
      action TEXT NOT NULL CHECK (action <> ''),
      subject TEXT NOT NULL CHECK (subject <> ''),
      subject_id TEXT NOT NULL,
      detail TEXT NOT NULL CHECK (json_valid(detail)),
      previous_hash TEXT NOT NULL,
      hash TEXT NOT NULL UNIQUE CHECK (length(hash) = 64)
    ) STRICT`);
  await db.raw('CREATE INDEX audit_entries_subject ON audit_entries (subject, subject_id)');
  await db.raw(`
    CREATE TRIGGER audit_entries_never_updated BEFORE UPDATE ON audit_entries
    BEGIN SELECT RAISE(ABORT, 'audit entries are never changed'); END`);
  await db.raw(`
    CREATE TRIGGER audit_entries_never_deleted BEFORE DELETE ON audit_entries
    BEGIN SELECT RAISE(ABORT, 'audit entries are never removed'); END`);
  // INSERT OR REPLACE removes without asking the delete trigger; only the next sequence on the last hash may come in.
  await db.raw(`
    CREATE TRIGGER audit_entries_only_appended BEFORE INSERT ON audit_entries
    WHEN NEW.sequence <> COALESCE((SELECT max(sequence) FROM audit_entries), 0) + 1
      OR NEW.previous_hash <> COALESCE(
        (SELECT hash FROM audit_entries ORDER BY sequence DESC LIMIT 1), '')
    BEGIN SELECT RAISE(ABORT, 'audit entries are only appended'); END`);
}

export async function down(db: Knex): Promise<void> {
  await db.raw('DROP TABLE audit_entries');
}
