import { Store } from 'express-session';
import type { SessionData } from 'express-session';
import type { Knex } from 'knex';
import { z } from 'zod';
import { sha256 } from '../canonical-json';

/** How long a session lasts without a request. */
export const idleMilliseconds = 12 * 60 * 60 * 1000;
/** Expiry is moved at most this often, so that reading does not write each time. */
const touchEvery = 5 * 60 * 1000;

const Content = z.looseObject({
  cookie: z.looseObject({}),
  passport: z.looseObject({ user: z.string().optional() }).optional(),
});

interface SessionRow {
  digest: string;
  person_id: string | null;
  content: string;
  expires_at: string;
}

/** Sessions in the database. Only a digest of the session id is stored: who reads the table cannot take a session over. */
export class KnexSessionStore extends Store {
  constructor(
    private readonly db: Knex,
    private readonly now: () => Date,
  ) {
    super();
  }

  private readonly sessions = () => this.db<SessionRow>('sessions');
  private readonly expiry = () => new Date(this.now().getTime() + idleMilliseconds).toISOString();

  override get(id: string, done: (error: unknown, session?: SessionData | null) => void): void {
    this.sessions()
      .where({ digest: sha256(id) })
      .where('expires_at', '>', this.now().toISOString())
      .first('content')
      // Content of another time that nobody understands any more is no session: the person signs in anew.
      .then((row) => (row === undefined ? null : (Content.safeParse(JSON.parse(row.content)).data ?? null)))
      .then((content) => content as unknown as SessionData | null)
      .then((session) => done(null, session), done);
  }

  override set(id: string, session: SessionData, done: (error?: unknown) => void = () => undefined): void {
    const content = JSON.stringify(session);
    const person_id = Content.parse(JSON.parse(content)).passport?.user ?? null;
    this.sessions()
      .insert({ digest: sha256(id), person_id, content, expires_at: this.expiry() })
      .onConflict('digest')
      .merge()
      .then(() => done(), done);
  }

  override touch(id: string, _session: SessionData, done: (error?: unknown) => void = () => undefined): void {
    const longAgo = new Date(this.now().getTime() + idleMilliseconds - touchEvery).toISOString();
    this.sessions()
      .where({ digest: sha256(id) })
      .where('expires_at', '<', longAgo)
      .update({ expires_at: this.expiry() })
      .then(() => done(), done);
  }

  override destroy(id: string, done: (error?: unknown) => void = () => undefined): void {
    this.sessions()
      .where({ digest: sha256(id) })
      .delete()
      .then(() => done(), done);
  }
}

/** Ends every session of a person, or every one but that of `exceptId`. */
export async function endSessions(db: Knex, personId: string, exceptId?: string): Promise<void> {
  const ending = db('sessions').where({ person_id: personId });
  if (exceptId !== undefined) ending.whereNot({ digest: sha256(exceptId) });
  await ending.delete();
}

export async function removeExpiredSessions(db: Knex, now: Date): Promise<void> {
  await db('sessions').where('expires_at', '<=', now.toISOString()).delete();
}
