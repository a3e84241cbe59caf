import { doubleCsrf } from 'csrf-csrf';
import type { Request } from 'express';
import type { Config } from '../config';

/**
 * Signed double-submit token. It is bound to the session once somebody is signed in; visitors have no session to bind to,
 * and for them the httpOnly SameSite cookie that must match the header is what protects signing in.
 */
export function csrfProtection({ sessionSecret, tls }: Config) {
  const { generateCsrfToken, validateRequest } = doubleCsrf({
    getSecret: () => sessionSecret,
    getSessionIdentifier: (request) => (request.user === undefined ? 'visitor' : request.sessionID),
    cookieName: tls ? '__Host-tremolode-csrf' : 'tremolode-csrf',
    cookieOptions: { sameSite: 'lax', httpOnly: true, secure: tls, path: '/' },
  });
  return {
    /** The token for this session; `fresh` after the session changed. */
    issue(request: Request, { fresh = false } = {}): string {
      if (request.res === undefined) throw new Error('A request without a response cannot be given a token.');
      return generateCsrfToken(request, request.res, { overwrite: fresh });
    },
    accepts: validateRequest,
  };
}
