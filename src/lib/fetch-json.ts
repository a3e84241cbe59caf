import { z } from 'zod';
import { ErrorAnswer } from '#contracts/error';
import { SessionAnswer } from '#contracts/session';
import type { RouteContract } from '#contracts/route';
import { RequestError } from './request-error';

interface FetchOptions {
  method?: 'get' | 'post' | 'put' | 'patch' | 'delete';
  body?: unknown;
  signal?: AbortSignal | undefined;
}

/** A route without an answer says 204 and nothing. */
const nothing = z.undefined();

let csrfToken: string | null = null;
/** Whom this page acts for. Another tab may sign in somebody else with the same cookie: this page must not act for them. */
let actingAs: string | null = null;
const signedOutListeners = new Set<() => void>();

/** Calls back when the server no longer knows who asks, so that the page can offer to sign in again in place. */
export function onSignedOut(listener: () => void): () => void {
  signedOutListeners.add(listener);
  return () => signedOutListeners.delete(listener);
}

function endSession(): void {
  csrfToken = null;
  for (const listener of signedOutListeners) listener();
}

/** Forgets token and person, as a fresh page does. */
export function forgetCsrfToken(): void {
  csrfToken = null;
  actingAs = null;
}

/** Every answer that carries a session carries the token that belongs to it. */
function takeSession({ me, csrfToken: token }: SessionAnswer, method: string): void {
  const person = me?.id ?? null;
  if (method === 'get' && actingAs !== null && person !== actingAs) endSession();
  else {
    csrfToken = token;
    actingAs = person;
  }
}

const keptWords = (method: string) =>
  method === 'get'
    ? 'The server did not answer. What you see is what was last loaded.'
    : 'The server did not answer. What you typed is kept on this page: try again once you are connected.';

async function send(path: string, method: string, body: unknown, signal?: AbortSignal): Promise<Response> {
  const headers: Record<string, string> = { accept: 'application/json' };
  if (method !== 'get') headers['x-csrf-token'] = csrfToken ?? (await renewCsrfToken(path));
  const form = body instanceof FormData;
  if (body !== undefined && !form) headers['content-type'] = 'application/json';
  const init: RequestInit = { method: method.toUpperCase(), headers, credentials: 'same-origin' };
  if (body !== undefined) init.body = form ? body : JSON.stringify(body);
  if (signal) init.signal = signal;
  try {
    return await fetch(`/api${path}`, init);
  } catch (error) {
    if (signal?.aborted) throw error;
    throw new RequestError(0, 'offline', keptWords(method));
  }
}

async function renewCsrfToken(path: string): Promise<string> {
  const response = await send('/session', 'get', undefined);
  if (!response.ok) throw await errorFrom(response);
  const answer = read(SessionAnswer, await response.json(), response);
  // Signing in is how a page without a session gets one.
  if (path === '/session' || actingAs === null) return (csrfToken = answer.csrfToken);
  takeSession(answer, 'get');
  if (csrfToken === null)
    throw new RequestError(
      401,
      'unauthenticated',
      'Your session has ended, so nothing was sent. What you typed is kept.',
    );
  return csrfToken;
}

async function errorFrom(response: Response): Promise<RequestError> {
  const text = await response.text();
  let known: ReturnType<typeof ErrorAnswer.safeParse> | null = null;
  try {
    known = ErrorAnswer.safeParse(JSON.parse(text));
  } catch {
    // Not JSON: a proxy or a crash answered in the server's place.
  }
  const retryAfter = Number(response.headers.get('retry-after') ?? Number.NaN);
  const requestId = response.headers.get('x-request-id') ?? undefined;
  const retryAfterSeconds = Number.isFinite(retryAfter) ? retryAfter : undefined;
  if (known?.success) {
    const { code, message, ...details } = known.data.error;
    return new RequestError(response.status, code, message, { requestId, retryAfterSeconds, ...details });
  }
  const unavailable = response.status >= 502 && response.status <= 504;
  return new RequestError(
    response.status,
    unavailable ? 'unavailable' : 'unreadable',
    unavailable
      ? 'The server is not reachable just now. What you typed is kept on this page.'
      : `The server answered in a way this page does not understand (status ${response.status}).`,
    { requestId, retryAfterSeconds },
  );
}

function read<T>(schema: z.ZodType<T>, body: unknown, response: Response): T {
  const parsed = schema.safeParse(body);
  if (parsed.success) return parsed.data;
  const [first] = parsed.error.issues;
  throw new RequestError(
    response.status,
    'unreadable',
    `This page and the server do not agree on an answer (${first?.path.join('.') || 'whole answer'}: ${first?.message ?? 'unknown'}). Reload the page; if that does not help, tell whoever runs the server.`,
    { requestId: response.headers.get('x-request-id') ?? undefined },
  );
}

/**
 * Asks the server and reads the answer by its contract.
 * @param path below /api, with leading slash.
 * @throws RequestError for every answer that is not a success, and with code `offline` where none came; an AbortError
 *   where `signal` gave the request up.
 */
export async function fetchJson<T>(schema: z.ZodType<T>, path: string, options: FetchOptions = {}): Promise<T> {
  const { method = 'get', body, signal } = options;
  let response = await send(path, method, body, signal);
  let error = response.ok ? null : await errorFrom(response);
  if (error?.code === 'csrf') {
    csrfToken = null;
    response = await send(path, method, body, signal);
    error = response.ok ? null : await errorFrom(response);
  }
  if (error) {
    if (error.code === 'unauthenticated' && path !== '/session') endSession();
    throw error;
  }
  if (response.status === 204) return read(schema, undefined, response);
  let answer: unknown;
  try {
    answer = await response.json();
  } catch {
    if (signal?.aborted) throw new DOMException('Given up', 'AbortError');
    throw new RequestError(response.status, 'unreadable', 'The server’s answer arrived incomplete. Try again.');
  }
  const content = read(schema, answer, response);
  if ((schema as unknown) === SessionAnswer) takeSession(content as SessionAnswer, method);
  return content;
}

type Input<S> = S extends z.ZodType ? z.input<S> : never;
type Sent<R extends RouteContract> = (R extends { params: z.ZodType } ? { params: Input<R['params']> } : object) &
  (R extends { query: z.ZodType } ? { query?: Partial<Input<R['query']>> } : object) &
  (R extends { body: z.ZodType } ? { body: Input<R['body']> | FormData } : object) & {
    signal?: AbortSignal | undefined;
  };
type Answer<R extends RouteContract> = R extends { answer: z.ZodType } ? z.output<R['answer']> : undefined;

/** Path below /api of a route with its parameters and query filled in. */
export function pathOf(
  route: RouteContract,
  sent: { params?: Record<string, unknown>; query?: Record<string, unknown> },
): string {
  const path = route.path.replace(/:(\w+)/g, (_, name: string) =>
    encodeURIComponent(String(sent.params?.[name] ?? '')),
  );
  const query = new URLSearchParams();
  for (const [name, value] of Object.entries(sent.query ?? {}))
    if (value !== undefined && value !== null && value !== '') query.set(name, String(value));
  return query.size > 0 ? `${path}?${query}` : path;
}

/** Calls a route by its contract: `callRoute(briefRoutes.readBrief, { params: { briefId }, signal })`. */
export function callRoute<R extends RouteContract>(
  route: R,
  ...[sent]: Record<never, never> extends Sent<R> ? [Sent<R>?] : [Sent<R>]
): Promise<Answer<R>> {
  const filled = (sent ?? {}) as {
    params?: Record<string, unknown>;
    query?: Record<string, unknown>;
    body?: unknown;
    signal?: AbortSignal;
  };
  const schema = (route.answer ?? nothing) as z.ZodType<Answer<R>>;
  return fetchJson(schema, pathOf(route, filled), { method: route.method, body: filled.body, signal: filled.signal });
}
