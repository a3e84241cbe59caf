import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import type { Request } from 'express';
import { sha256 } from '../../canonical-json';
import { tooMany } from '../../errors';

const minutes = 15;
const refused = () => tooMany(`Too many attempts. Try again in ${minutes} minutes.`, minutes * 60);

function limiter(limit: number, keyGenerator: (request: Request) => string): (request: Request) => Promise<void> {
  const middleware = rateLimit({
    windowMs: minutes * 60 * 1000,
    limit,
    keyGenerator,
    // Only refused attempts count: a team behind one address signs in as often as it likes.
    skipSuccessfulRequests: true,
    legacyHeaders: false,
    standardHeaders: false,
    handler: (_request, _response, next) => next(refused()),
  });
  return (request) =>
    new Promise((resolve, reject) => {
      if (request.res === undefined) throw new Error('A rate limit needs the response.');
      void middleware(request, request.res, (error?: unknown) => (error === undefined ? resolve() : reject(error)));
    });
}

export const attempts = { perAddress: 40, perAccount: 10 };

/** Slows guessing down: by the caller's address and by the account tried, whether or not it exists. */
export function signInLimits(): (request: Request, email: string) => Promise<void> {
  const perAddress = limiter(attempts.perAddress, ({ ip }) => `address ${ipKeyGenerator(ip ?? '')}`);
  const accounts = new WeakMap<Request, string>();
  const perAccount = limiter(attempts.perAccount, (request) => `account ${accounts.get(request) ?? ''}`);
  return async (request, email) => {
    accounts.set(request, sha256(email.trim().toLowerCase()));
    await perAddress(request);
    await perAccount(request);
  };
}
