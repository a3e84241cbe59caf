import type { Change, ErrorCode, Issue } from '#contracts/error';

/** Codes of the server, and the two that only a client can tell. */
export type RequestErrorCode = ErrorCode | 'offline' | 'unreadable';

interface RequestErrorDetails {
  issues?: Issue[] | undefined;
  changed?: Change[] | undefined;
  requestId?: string | undefined;
  retryAfterSeconds?: number | undefined;
}

/** A request that was not answered as hoped. `message` is fit for people. */
export class RequestError extends Error {
  override readonly name = 'RequestError';
  readonly issues: Issue[];
  readonly changed: Change[];
  readonly requestId: string | undefined;
  readonly retryAfterSeconds: number | undefined;

  constructor(
    /** HTTP status; 0 where no answer came. */
    readonly status: number,
    readonly code: RequestErrorCode,
    message: string,
    details: RequestErrorDetails = {},
  ) {
    super(message);
    this.issues = details.issues ?? [];
    this.changed = details.changed ?? [];
    this.requestId = details.requestId;
    this.retryAfterSeconds = details.retryAfterSeconds;
  }
}

export const isRequestError = (error: unknown, ...codes: RequestErrorCode[]): error is RequestError =>
  error instanceof RequestError && (codes.length === 0 || codes.includes(error.code));

/** Whether a request was given up on purpose (a newer one took its place): nothing to tell anybody. */
export const isCancelled = (error: unknown): boolean => error instanceof DOMException && error.name === 'AbortError';

/** What to tell people about any error; what was not meant for them stays unsaid. */
export const messageOf = (error: unknown): string =>
  error instanceof RequestError ? error.message : 'Something went wrong in this page.';
