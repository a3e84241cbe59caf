import type { Change, ErrorCode, Issue } from '#contracts/error';

interface Particulars {
  issues?: Issue[];
  changed?: Change[];
  /** Seconds after which a refused caller may try again. */
  retryAfter?: number;
}

/** What a person or a program did that cannot be done, in words for them. Anything else that is thrown is a bug. */
export class DomainError extends Error {
  override readonly name = 'DomainError';
  readonly issues: Issue[] | undefined;
  readonly changed: Change[] | undefined;
  readonly retryAfter: number | undefined;

  constructor(
    readonly code: Exclude<ErrorCode, 'bug'>,
    message: string,
    { issues, changed, retryAfter }: Particulars = {},
  ) {
    super(message);
    this.issues = issues;
    this.changed = changed;
    this.retryAfter = retryAfter;
  }
}

/** 422: what was sent cannot be taken; each issue names path, value, and limit where there is one. */
export const invalid = (issues: Issue[], message = 'Some of what was sent cannot be taken.') =>
  new DomainError('invalid', message, { issues });

/** 401 */
export const unauthenticated = (message = 'Sign in first.') => new DomainError('unauthenticated', message);

/** 403 */
export const forbidden = (message: string) => new DomainError('forbidden', message);

/** 404: `what` as in “This brief”. */
export const notFound = (what: string) => new DomainError('notFound', `${what} does not exist.`);

/** 409: it changed meanwhile, or its state does not admit this. `changed` tells what happened since the version sent. */
export const conflict = (message: string, changed: Change[] = []) => new DomainError('conflict', message, { changed });

/** 429 */
export const tooMany = (message: string, retryAfter: number) => new DomainError('tooMany', message, { retryAfter });

/** 503 */
export const unavailable = (message: string) => new DomainError('unavailable', message);
