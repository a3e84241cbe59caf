import type { Request } from 'express';
import type { Section, SessionAnswer } from '#contracts/session';
import { Section as sectionNames } from '#contracts/session';
import { allRoutes } from '#contracts/routes';
import type { Deps } from '../../app';
import { unauthenticated } from '../../errors';
import { mayCall } from '../../http/allowed';
import { csrfProtection } from '../../http/csrf';
import type { Handlers, RouteName } from '../../http/handlers';
import type { SignedIn } from '../../http/session-user';
import { passportFor } from './passport';
import { signInLimits } from './rate-limits';
import { changePassword, noteSignIn, signOutEverywhere } from './service';

/** The route that a section of the rail lives on: who may call it may enter. */
const routeOfSection: Record<Section, RouteName> = {
  desk: 'readDesk',
  briefs: 'listBriefs',
  designs: 'listDesigns',
  bench: 'listRuns',
  catalogue: 'readCatalogue',
  records: 'listRecords',
  administration: 'listPeople',
};

const sectionsFor = ({ roles }: SignedIn): Section[] =>
  sectionNames.options.filter((section) => mayCall(allRoutes[routeOfSection[section]].allowed, roles));

type SessionRoutes = 'readSession' | 'signIn' | 'signOut' | 'signOutEverywhere' | 'changePassword';

const outcome = (act: (done: (error?: unknown) => void) => void): Promise<void> =>
  new Promise((resolve, reject) => act((error) => (error === undefined || error === null ? resolve() : reject(error))));

/** Who signs in with what the request carries; null for every kind of refusal alike. */
const authenticate = (passport: ReturnType<typeof passportFor>, request: Request): Promise<SignedIn | null> =>
  new Promise((resolve, reject) => {
    const done = (error: unknown, user?: SignedIn | false | null) => (error ? reject(error) : resolve(user || null));
    (passport.authenticate('local', done) as (...given: unknown[]) => void)(request, request.res, reject);
  });

export function authHandlers(deps: Deps): Pick<Handlers, SessionRoutes> {
  const csrf = csrfProtection(deps.config);
  const passport = passportFor(deps.db);
  const limitAttempts = signInLimits();

  const answer = (request: Request, fresh: boolean): SessionAnswer => {
    const { user } = request;
    const me = user && {
      id: user.id,
      name: user.name,
      email: user.email,
      roles: user.roles,
      mayEnter: sectionsFor(user),
    };
    return { me: me ?? null, csrfToken: csrf.issue(request, { fresh }) };
  };
  const leave = async (request: Request): Promise<SessionAnswer> => {
    await outcome((done) => request.logout(done));
    return answer(request, true);
  };

  return {
    readSession: ({ request }) => Promise.resolve(answer(request, false)),
    async signIn({ body, request }) {
      await limitAttempts(request, body.email);
      const person = await authenticate(passport, request);
      if (person === null) {
        request.log.warn({ address: request.ip }, 'Sign-in refused');
        throw unauthenticated('The address or the password is not right.');
      }
      // Takes a new session id, so that one planted before signing in is worth nothing.
      await outcome((done) => request.login(person, done));
      await noteSignIn(deps, person.id);
      return answer(request, true);
    },
    signOut: ({ request }) => leave(request),
    async signOutEverywhere({ actor, request }) {
      await signOutEverywhere(deps, actor.id);
      return leave(request);
    },
    async changePassword({ actor, body, request }) {
      await changePassword(deps, { personId: actor.id, ...body, keepSession: request.sessionID });
    },
  };
}
