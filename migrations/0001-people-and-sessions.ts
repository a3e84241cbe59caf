import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  await db.raw(`
    CREATE TABLE people (
      id TEXT PRIMARY KEY,
      name TEXT NOT NULL CHECK (length(name) BETWEEN 1 AND 200),
      email TEXT NOT NULL COLLATE NOCASE UNIQUE CHECK (length(email) BETWEEN 3 AND 254),
      password_hash TEXT NOT NULL,
      active INTEGER NOT NULL DEFAULT 1 CHECK (active IN (0, 1)),
      version INTEGER NOT NULL DEFAULT 1 CHECK (version >= 1),
      created_at TEXT NOT NULL,
      last_sign_in_at TEXT
    ) STRICT`);
  await db.raw(`
    CREATE TABLE person_roles (
      person_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      role TEXT NOT NULL
        CHECK (role IN ('designer', 'reviewer', 'bench', 'releaseAuthority', 'administrator', 'observer')),
      PRIMARY KEY (person_id, role)
    ) STRICT`);
  await db.raw('CREATE INDEX person_roles_role ON person_roles (role)');
  await db.raw(`
    CREATE TABLE sessions (
      digest TEXT PRIMARY KEY,
      person_id TEXT REFERENCES people (id) ON DELETE RESTRICT,
      content TEXT NOT NULL CHECK (json_valid(content)),
      expires_at TEXT NOT NULL
    ) STRICT`);
  await db.raw('CREATE INDEX sessions_person ON sessions (person_id)');
  await db.raw('CREATE INDEX sessions_expiry ON sessions (expires_at)');
}

export async function down(db: Knex): Promise<void> {
  await db.raw('DROP TABLE sessions');
  await db.raw('DROP TABLE person_roles');
  await db.raw('DROP TABLE people');
}
