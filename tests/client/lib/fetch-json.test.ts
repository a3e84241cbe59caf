import { beforeEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { callRoute, fetchJson, forgetCsrfToken, onSignedOut, pathOf } from '../../../src/lib/fetch-json';
import { isCancelled, RequestError } from '../../../src/lib/request-error';
import { sessionRoutes } from '#contracts/session';

const Answer = z.strictObject({ turns: z.number() });
const json = (status: number, body: unknown, headers: Record<string, string> = {}) =>
  new Response(body === undefined ? null : JSON.stringify(body), {
    status,
    headers: { 'content-type': 'application/json', ...headers },
  });
const session = (csrfToken: string) => json(200, { me: null, csrfToken });
const failure = (code: string, more: object = {}) => ({ error: { code, message: `Refused: ${code}.`, ...more } });

/** Answers requests in turn and keeps what was asked. */
function answering(...answers: (Response | Error | DOMException)[]) {
  const asked: { path: string; init: RequestInit }[] = [];
  vi.stubGlobal('fetch', (path: string, init: RequestInit) => {
    asked.push({ path, init });
    const answer = answers.shift();
    if (answer === undefined) throw new Error(`Not expected: ${path}`);
    return answer instanceof Response ? Promise.resolve(answer) : Promise.reject(answer);
  });
  return asked;
}

const caught = async (work: Promise<unknown>): Promise<RequestError> => {
  const error: unknown = await work.then(
    () => null,
    (reason: unknown) => reason,
  );
  if (!(error instanceof RequestError)) throw new Error(`Expected a RequestError, got ${String(error)}`);
  return error;
};

describe('fetchJson', () => {
  beforeEach(() => forgetCsrfToken());

  it('reads an answer by its contract and sends the cookie to the own origin only', async () => {
    const asked = answering(json(200, { turns: 1000 }));
    await expect(fetchJson(Answer, '/coils/1')).resolves.toEqual({ turns: 1000 });
    expect(asked[0]?.path).toBe('/api/coils/1');
    expect(asked[0]?.init.credentials).toBe('same-origin');
  });

  it('asks for the token before the first change and keeps it for the next', async () => {
    const asked = answering(session('one'), json(200, { turns: 1 }), json(200, { turns: 2 }));
    await fetchJson(Answer, '/coils', { method: 'post', body: { turns: 1 } });
    await fetchJson(Answer, '/coils', { method: 'post', body: { turns: 2 } });
    expect(asked.map(({ path }) => path)).toEqual(['/api/session', '/api/coils', '/api/coils']);
    expect(asked.slice(1).map(({ init }) => new Headers(init.headers).get('x-csrf-token'))).toEqual(['one', 'one']);
  });

  it('renews a token that the server no longer takes, and sends the same body again', async () => {
    const asked = answering(session('old'), json(403, failure('csrf')), session('new'), json(200, { turns: 3 }));
    await expect(fetchJson(Answer, '/coils', { method: 'put', body: { turns: 3 } })).resolves.toEqual({ turns: 3 });
    expect(asked[3]?.init.body).toBe('{"turns":3}');
    expect(new Headers(asked[3]?.init.headers).get('x-csrf-token')).toBe('new');
  });

  it('takes over the token that comes with signing in', async () => {
    const asked = answering(session('before'), session('after'), json(200, { turns: 1 }));
    await callRoute(sessionRoutes.signIn, { body: { email: 'a@b.example', password: 'x' } });
    await fetchJson(Answer, '/coils', { method: 'post', body: {} });
    expect(new Headers(asked[2]?.init.headers).get('x-csrf-token')).toBe('after');
  });

  it('hands on code, message, issues, changes and request id', async () => {
    const issues = [{ path: 'turns', value: -1, message: 'At least 1.', limit: 1 }];
    answering(json(422, failure('invalid', { issues, requestId: 'r-1' })));
    const error = await caught(fetchJson(Answer, '/coils/1'));
    expect(error).toMatchObject({
      status: 422,
      code: 'invalid',
      message: 'Refused: invalid.',
      issues,
      requestId: 'r-1',
    });
    const changed = [{ version: 3, by: 'Ane Solheim', at: '2026-03-14T09:00:00Z', what: 'Approved' }];
    answering(json(409, failure('conflict', { changed })));
    expect((await caught(fetchJson(Answer, '/coils/1'))).changed).toEqual(changed);
  });

  it('tells how long to wait where the server does', async () => {
    answering(json(429, failure('tooMany'), { 'retry-after': '90' }));
    expect((await caught(fetchJson(Answer, '/coils/1'))).retryAfterSeconds).toBe(90);
  });

  it('says that nothing was sent and everything typed is kept when there is no connection', async () => {
    answering(session('t'), new TypeError('Failed to fetch'));
    const error = await caught(fetchJson(Answer, '/coils', { method: 'post', body: {} }));
    expect(error).toMatchObject({ status: 0, code: 'offline' });
    expect(error.message).toContain('What you typed is kept');
  });

  it('lets a request that was given up end as cancelled', async () => {
    const stop = new AbortController();
    answering(new DOMException('Given up', 'AbortError'));
    stop.abort();
    const error: unknown = await fetchJson(Answer, '/coils/1', { signal: stop.signal }).catch(
      (reason: unknown) => reason,
    );
    expect(isCancelled(error)).toBe(true);
  });

  it('refuses an answer that breaks the contract, naming the place', async () => {
    answering(json(200, { turns: 'many' }));
    const error = await caught(fetchJson(Answer, '/coils/1'));
    expect(error.code).toBe('unreadable');
    expect(error.message).toContain('turns');
  });

  it('takes a proxy’s page for an unavailable server', async () => {
    answering(new Response('<html>Bad gateway</html>', { status: 502 }));
    expect((await caught(fetchJson(Answer, '/coils/1'))).code).toBe('unavailable');
  });

  it('calls those who wait for the end of the session, except for a failed sign-in', async () => {
    const ended = vi.fn();
    const stop = onSignedOut(ended);
    answering(json(401, failure('unauthenticated')), session('t'), json(401, failure('unauthenticated')));
    await caught(fetchJson(Answer, '/coils/1'));
    expect(ended).toHaveBeenCalledTimes(1);
    await caught(callRoute(sessionRoutes.signIn, { body: { email: 'a@b.example', password: 'x' } }));
    expect(ended).toHaveBeenCalledTimes(1);
    stop();
  });

  it('never acts for somebody else who signed in in another tab', async () => {
    const person = (id: string) => ({ id, name: 'N', email: 'n@b.example', roles: [], mayEnter: [] });
    const mine = person('0b8f8f0e-55a5-4d0c-9d3e-0d3f0a6f1c11');
    const theirs = person('1c9f8f0e-55a5-4d0c-9d3e-0d3f0a6f1c22');
    const ended = vi.fn();
    const stop = onSignedOut(ended);
    const asked = answering(
      json(200, { me: mine, csrfToken: 'mine' }),
      json(403, failure('csrf')),
      json(200, { me: theirs, csrfToken: 'theirs' }),
    );
    await callRoute(sessionRoutes.readSession);
    const error = await caught(fetchJson(Answer, '/coils', { method: 'post', body: {} }));
    expect(error).toMatchObject({ code: 'unauthenticated' });
    expect(error.message).toContain('nothing was sent');
    expect(ended).toHaveBeenCalledTimes(1);
    expect(asked).toHaveLength(3);
    stop();
  });

  it('answers undefined to a 204', async () => {
    answering(session('t'), new Response(null, { status: 204 }));
    const body = { currentPassword: 'old', newPassword: 'long enough indeed' };
    await expect(callRoute(sessionRoutes.changePassword, { body })).resolves.toBeUndefined();
  });

  it('fills parameters and query into the path, escaped', () => {
    const route = { method: 'get', path: '/designs/:designId/:letter', summary: '', allowed: 'signedIn' } as const;
    expect(pathOf(route, { params: { designId: 'a/b', letter: 'B' }, query: { find: 'x y', page: undefined } })).toBe(
      '/designs/a%2Fb/B?find=x+y',
    );
  });
});
