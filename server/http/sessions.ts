import session from 'express-session';
import type { RequestHandler } from 'express';
import type { Knex } from 'knex';
import type { Config } from '../config';
import { passportFor } from '../features/auth/passport';
import { KnexSessionStore, idleMilliseconds } from './session-store';

interface Needed {
  db: Knex;
  config: Config;
  now: () => Date;
}

/** Cookie → session → person, read anew from the database for each request, so that a changed role counts at once. */
export function sessions({ db, config, now }: Needed): RequestHandler[] {
  return [
    session({
      store: new KnexSessionStore(db, now),
      name: config.tls ? '__Host-tremolode-session' : 'tremolode-session',
      secret: config.sessionSecret,
      resave: false,
      saveUninitialized: false,
      rolling: true,
      cookie: { httpOnly: true, sameSite: 'lax', secure: config.tls, path: '/', maxAge: idleMilliseconds },
    }),
    passportFor(db).session() as RequestHandler,
  ];
}
