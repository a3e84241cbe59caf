import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  await db.raw(`
    CREATE TABLE designs (
      id TEXT PRIMARY KEY,
      number TEXT NOT NULL UNIQUE,
      title TEXT NOT NULL CHECK (length(title) BETWEEN 1 AND 200),
      brief_id TEXT NOT NULL REFERENCES briefs (id) ON DELETE RESTRICT,
      created_at TEXT NOT NULL,
      created_by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT
    ) STRICT`);
  await db.raw('CREATE INDEX designs_brief ON designs (brief_id)');
  await db.raw(`
    CREATE TABLE revisions (
      id TEXT PRIMARY KEY,
      design_id TEXT NOT NULL REFERENCES designs (id) ON DELETE RESTRICT,
      brief_id TEXT NOT NULL REFERENCES briefs (id) ON DELETE RESTRICT,
      letter TEXT NOT NULL CHECK (letter GLOB '[A-Z]*'),
      state TEXT NOT NULL CHECK (state IN ('draft', 'inReview', 'changesRequested', 'clearedForBench', 'onBench',
        'nonconforming', 'releaseReview', 'released', 'superseded', 'recalled', 'reworked', 'abandoned')),
      state_since TEXT NOT NULL,
      version INTEGER NOT NULL CHECK (version >= 1),
      facts TEXT NOT NULL CHECK (json_valid(facts)),
      draft TEXT NOT NULL CHECK (json_valid(draft) AND length(draft) <= 1000000),
      document_issues TEXT NOT NULL CHECK (json_valid(document_issues)),
      document TEXT CHECK (json_valid(document)),
      document_digest TEXT CHECK (length(document_digest) = 64),
      estimate TEXT CHECK (json_valid(estimate)),
      load_power REAL,
      brief_version INTEGER,
      submitted_at TEXT,
      submitted_by_id TEXT REFERENCES people (id) ON DELETE RESTRICT,
      continued_from_id TEXT REFERENCES revisions (id) ON DELETE RESTRICT,
      created_at TEXT NOT NULL,
      created_by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      updated_at TEXT NOT NULL,
      UNIQUE (design_id, letter),
      FOREIGN KEY (brief_id, brief_version) REFERENCES brief_versions (brief_id, version) ON DELETE RESTRICT,
      CHECK ((submitted_at IS NULL) = (document IS NULL)),
      CHECK ((submitted_at IS NULL) = (document_digest IS NULL)),
      CHECK ((submitted_at IS NULL) = (estimate IS NULL)),
      CHECK ((submitted_at IS NULL) = (brief_version IS NULL)),
      CHECK ((submitted_at IS NULL) = (submitted_by_id IS NULL)),
      CHECK (CASE state WHEN 'draft' THEN submitted_at IS NULL WHEN 'abandoned' THEN 1 ELSE submitted_at IS NOT NULL END)
    ) STRICT`);
  await db.raw('CREATE INDEX revisions_state ON revisions (state)');
  await db.raw(`
    CREATE TRIGGER revisions_submitted_document_frozen BEFORE UPDATE OF
      draft, document_issues, document, document_digest, estimate, load_power, brief_version, submitted_at, submitted_by_id
    ON revisions WHEN OLD.state <> 'draft'
    BEGIN SELECT RAISE(ABORT, 'what was submitted is never changed'); END`);
  await db.raw(`
    CREATE TRIGGER revisions_never_draft_again BEFORE UPDATE OF state
    ON revisions WHEN OLD.state <> 'draft' AND NEW.state = 'draft'
    BEGIN SELECT RAISE(ABORT, 'a revision becomes a draft once only'); END`);
  await db.raw(`
    CREATE TRIGGER revisions_identity_frozen BEFORE UPDATE OF
      id, design_id, brief_id, letter, continued_from_id, created_at, created_by_id ON revisions
    BEGIN SELECT RAISE(ABORT, 'what a revision is of never changes'); END`);
  await db.raw(`
    CREATE TRIGGER revisions_never_deleted BEFORE DELETE ON revisions
    BEGIN SELECT RAISE(ABORT, 'a revision is never removed'); END`);
  // Everyone who may not decide on the revision, with the time of the first touch; nobody leaves this list.
  await db.raw(`
    CREATE TABLE revision_authors (
      revision_id TEXT NOT NULL REFERENCES revisions (id) ON DELETE RESTRICT,
      person_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      since TEXT NOT NULL,
      PRIMARY KEY (revision_id, person_id)
    ) STRICT`);
  await db.raw(`
    CREATE TRIGGER revision_authors_never_updated BEFORE UPDATE ON revision_authors
    BEGIN SELECT RAISE(ABORT, 'an author stays an author'); END`);
  await db.raw(`
    CREATE TRIGGER revision_authors_never_deleted BEFORE DELETE ON revision_authors
    BEGIN SELECT RAISE(ABORT, 'an author stays an author'); END`);
}

export async function down(db: Knex): Promise<void> {
  await db.raw('DROP TABLE revision_authors');
  // Dropping a table deletes its rows first, and a row must not be the parent of another then.
  await db.raw('DROP TRIGGER revisions_identity_frozen');
  await db.raw('UPDATE revisions SET continued_from_id = NULL');
  await db.raw('DROP TABLE revisions');
  await db.raw('DROP TABLE designs');
}
