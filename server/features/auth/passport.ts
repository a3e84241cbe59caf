import { Passport } from 'passport';
import { Strategy } from 'passport-local';
import type { Knex } from 'knex';
import { readSignedIn, signInCandidate } from './reads';

/** Passport for one database. It keeps no state: the session holds the person's id and nothing else. */
export function passportFor(db: Knex) {
  const passport = new Passport();
  passport.use(
    new Strategy({ usernameField: 'email', passwordField: 'password' }, (email, password, done) => {
      signInCandidate(db, email, password).then((person) => done(null, person ?? false), done);
    }),
  );
  passport.serializeUser<string>((person, done) => done(null, person.id));
  passport.deserializeUser<string>((id, done) => {
    readSignedIn(db, id).then((person) => done(null, person ?? false), done);
  });
  return passport;
}
