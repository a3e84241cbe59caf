import type { ErrorRequestHandler } from 'express';
import { z } from 'zod';
import type { ErrorAnswer, ErrorCode, Issue } from '#contracts/error';
import { DomainError, invalid, unavailable } from '../errors';
import { bodyLimit } from './body-limit';
import { placeInJson } from './json-place';

/** The one map from what went wrong to HTTP. What cannot be read or is too large is `invalid` like any other bad input. */
const statusOf: Record<ErrorCode, number> = {
  invalid: 422,
  unauthenticated: 401,
  forbidden: 403,
  csrf: 403,
  notFound: 404,
  conflict: 409,
  tooMany: 429,
  unavailable: 503,
  bug: 500,
};

/** What the body parser throws, as far as it is used here. */
const BodyError = z.object({ type: z.string(), message: z.string(), body: z.string().optional() });

function unreadableBody(error: unknown): DomainError | null {
  const read = BodyError.safeParse(error);
  if (!read.success) return null;
  const fault = (issue: Issue, message: string) => invalid([issue], message);
  switch (read.data.type) {
    case 'entity.parse.failed':
      return fault({ path: '', message: placeInJson(read.data.body ?? '') }, 'What was sent is not valid JSON.');
    case 'entity.too.large':
      return fault(
        { path: '', message: `At most ${bodyLimit.words}.`, limit: bodyLimit.words },
        'That is too much at once.',
      );
    case 'charset.unsupported':
    case 'encoding.unsupported':
      return fault({ path: '', message: 'Send JSON in UTF-8, plain or compressed with gzip.' }, read.data.message);
    case 'request.aborted':
    case 'request.size.invalid':
      return fault({ path: '', message: 'The request broke off.' }, 'The request did not arrive whole.');
    default:
      return null;
  }
}

/** Thrown by Express itself for a path such as /%ff. */
const isBadPath = (error: unknown): boolean => error instanceof URIError;

const databaseBusy = (error: unknown): boolean =>
  error instanceof Error &&
  'code' in error &&
  typeof error.code === 'string' &&
  /^SQLITE_(BUSY|FULL|IOERR)/.test(error.code);

function known(error: unknown): DomainError | null {
  if (error instanceof DomainError) return error;
  if (isBadPath(error)) return invalid([{ path: '', message: 'The address is not valid.' }]);
  if (databaseBusy(error))
    return unavailable('The store cannot be written just now. Nothing was changed; try again shortly.');
  return unreadableBody(error);
}

/** Every error ends here: a known one is told in full; anything else is a bug, logged, and told without particulars. */
export const errorHandler: ErrorRequestHandler = (error: unknown, request, response, next) => {
  // The caller has gone away and took the work along: nobody is left to be told.
  if (response.destroyed && error instanceof Error && error.name === 'AbortError') return;
  if (response.headersSent) {
    next(error);
    return;
  }
  const requestId = String(request.id);
  const told = known(error);
  if (told === null || told.code === 'unavailable') request.log.error({ err: error }, told?.message ?? 'A bug');
  const answer: ErrorAnswer = {
    error:
      told === null
        ? { code: 'bug', message: 'Something went wrong on our side. Nothing was changed by this step.', requestId }
        : {
            code: told.code,
            message: told.message,
            ...(told.issues && { issues: told.issues }),
            ...(told.changed && { changed: told.changed }),
            requestId,
          },
  };
  if (told?.retryAfter !== undefined) response.set('Retry-After', String(told.retryAfter));
  response.status(statusOf[answer.error.code]).json(answer);
};
