import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  await db.raw(`
    CREATE TABLE mail_messages (
      id TEXT PRIMARY KEY,
      event_id TEXT NOT NULL CHECK (event_id <> ''),
      recipient_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      thread_id TEXT NOT NULL CHECK (thread_id <> ''),
      recipient_name TEXT NOT NULL,
      recipient_address TEXT NOT NULL,
      subject TEXT NOT NULL CHECK (subject <> ''),
      content TEXT NOT NULL CHECK (json_valid(content)),
      state TEXT NOT NULL DEFAULT 'waiting' CHECK (state IN ('waiting', 'sending', 'sent', 'kept', 'failed')),
      attempts INTEGER NOT NULL DEFAULT 0 CHECK (attempts >= 0),
      last_error TEXT,
      created_at TEXT NOT NULL,
      due_at TEXT NOT NULL,
      lease_until TEXT,
      sent_at TEXT,
      UNIQUE (event_id, recipient_id),
      CHECK ((state = 'sending') = (lease_until IS NOT NULL)),
      CHECK ((state = 'sent') = (sent_at IS NOT NULL))
    ) STRICT`);
  await db.raw('CREATE INDEX mail_messages_due ON mail_messages (state, due_at)');
}

export async function down(db: Knex): Promise<void> {
  await db.raw('DROP TABLE mail_messages');
}
