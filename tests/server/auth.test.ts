import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import supertest from 'supertest';
import { attempts } from '#server/features/auth/rate-limits';
import { startTestServer, testConfig, testPassword } from '../support/server';
import type { TestServer } from '../support/server';

let server: TestServer;
beforeEach(async () => {
  server = await startTestServer();
});
afterEach(() => server.close());

const email = 'ida@fennmark.example';
const ida = (more = {}) => server.addPerson({ name: 'Ida Brandt', email, roles: ['designer'], ...more });
const sessionCookie = (response: supertest.Response): string | undefined =>
  (response.headers['set-cookie'] as unknown as string[] | undefined)?.find((line) =>
    line.startsWith('tremolode-session='),
  );

describe('signing in', () => {
  test('gives who is signed in with roles and sections, whatever the case of the address', async () => {
    await ida({ roles: ['designer', 'observer'] });
    const visitor = await server.visitor();
    const { status, body } = await visitor.signIn('  IDA@fennmark.example ');
    expect(status).toBe(200);
    expect(body.me).toMatchObject({ name: 'Ida Brandt', email, roles: ['designer', 'observer'] });
    expect(body.me.mayEnter).toEqual(['desk', 'briefs', 'designs', 'bench', 'catalogue', 'records']);
    expect((await visitor.get('/api/session')).body.me.name).toBe('Ida Brandt');
  });

  test('opens to an observer only what observers may read', async () => {
    const observer = await server.as('observer');
    expect((await observer.get('/api/session')).body.me.mayEnter).toEqual(['desk', 'records']);
  });

  test('opens administration to an administrator', async () => {
    const administrator = await server.as('administrator');
    expect((await administrator.get('/api/session')).body.me.mayEnter).toContain('administration');
  });

  test('answers an unknown address, a wrong password and an inactive account alike', async () => {
    await ida();
    await ida({ email: 'gone@fennmark.example', active: false });
    const visitor = await server.visitor();
    const answers = [
      await visitor.signIn(email, 'not the password'),
      await visitor.signIn('nobody@fennmark.example', testPassword),
      await visitor.signIn('gone@fennmark.example', testPassword),
    ];
    for (const { status, body } of answers) {
      expect(status).toBe(401);
      expect({ ...body.error, requestId: undefined }).toEqual({
        code: 'unauthenticated',
        message: 'The address or the password is not right.',
        requestId: undefined,
      });
    }
    expect((await visitor.get('/api/session')).body.me).toBeNull();
  });

  test('takes as long for an unknown address as for a wrong password', async () => {
    await ida();
    const visitor = await server.visitor();
    const times = { known: [] as number[], unknown: [] as number[] };
    const time = async (kind: keyof typeof times, address: string) => {
      const start = performance.now();
      await visitor.post('/api/session', { email: address, password: 'not the password' });
      times[kind].push(performance.now() - start);
    };
    for (let round = 0; round < 6; round += 1) {
      await time('known', email);
      await time('unknown', 'nobody@fennmark.example');
    }
    const ratio = Math.min(...times.unknown) / Math.min(...times.known);
    // Without the stand-in hash an unknown address answers in about a tenth of the time.
    expect(ratio).toBeGreaterThan(0.4);
    expect(ratio).toBeLessThan(2.5);
  });

  test('takes a new session id, and a cookie that scripts and other sites cannot use', async () => {
    await ida();
    const visitor = await server.visitor();
    const first = sessionCookie(await visitor.signIn(email));
    expect(first).toMatch(/; Path=\/; .*HttpOnly; SameSite=Lax$/);
    expect(first).not.toContain('Secure');
    const second = sessionCookie(await visitor.signIn(email));
    expect(second).toBeDefined();
    expect(second?.split(';')[0]).not.toBe(first?.split(';')[0]);
    expect(await server.db('sessions').select('digest')).toHaveLength(1);
  });

  test('keeps passwords as argon2id and sessions as digests', async () => {
    await ida();
    const visitor = await server.visitor();
    const cookie = sessionCookie(await visitor.signIn(email)) ?? '';
    const id = decodeURIComponent(cookie.split(/[=;]/)[1] ?? '')
      .slice(2)
      .split('.')[0];
    const [session] = await server.db('sessions').select('*');
    expect(id).toHaveLength(32);
    expect(JSON.stringify(session)).not.toContain(id);
    const [person] = await server.db('people').select('password_hash');
    expect(person.password_hash).toMatch(/^\$argon2id\$/);
  });

  test('gives visitors no session', async () => {
    const visitor = await server.visitor();
    await visitor.get('/api/session');
    expect(await server.db('sessions').select('digest')).toHaveLength(0);
  });

  test('is refused after too many wrong passwords for one account, and not for others', async () => {
    await ida();
    await ida({ email: 'noor@fennmark.example' });
    const visitor = await server.visitor();
    for (let attempt = 0; attempt < attempts.perAccount; attempt += 1) {
      expect((await visitor.signIn(email, 'not the password')).status).toBe(401);
    }
    const refused = await visitor.signIn(email.toUpperCase(), testPassword);
    expect(refused.status).toBe(429);
    expect(refused.body.error.code).toBe('tooMany');
    expect(Number(refused.headers['retry-after'])).toBeGreaterThan(0);
    expect((await visitor.signIn('noor@fennmark.example')).status).toBe(200);
  });

  test('is refused after too many wrong passwords from one address', async () => {
    await ida();
    const visitor = await server.visitor();
    for (let attempt = 0; attempt < attempts.perAddress; attempt += 1) {
      await visitor.post('/api/session', { email: `guess-${attempt}@fennmark.example`, password: 'x' });
    }
    expect((await visitor.signIn(email)).status).toBe(429);
  });

  test('does not count good sign-ins', async () => {
    await ida();
    const visitor = await server.visitor();
    for (let round = 0; round <= attempts.perAccount; round += 1) {
      expect((await visitor.signIn(email)).status).toBe(200);
    }
  });

  test('is written to the audit trail', async () => {
    const designer = await server.as('designer');
    expect(await server.db('audit_entries').select('action', 'subject', 'actor_id')).toEqual([
      { action: 'signedIn', subject: 'person', actor_id: designer.personId },
    ]);
  });
});

describe('behind a proxy that ends TLS', () => {
  test('cookies are Secure and bound to the host, and browsers are told to stay with https', async () => {
    const secure = await startTestServer({ config: { ...testConfig, tls: true, trustedProxies: 1 } });
    await secure.addPerson({ email });
    const browser = supertest.agent(secure.app).set('x-forwarded-proto', 'https');
    const { body, headers } = await browser.get('/api/session');
    const token = headers['set-cookie']?.[0]?.split(';')[0] ?? '';
    const response = await supertest(secure.app)
      .post('/api/session')
      .set({ 'x-forwarded-proto': 'https', 'x-csrf-token': body.csrfToken, cookie: token })
      .send({ email, password: testPassword });
    expect(response.status).toBe(200);
    const cookies = response.headers['set-cookie'] as unknown as string[];
    expect(cookies).toHaveLength(2);
    for (const cookie of cookies) expect(cookie).toMatch(/^__Host-tremolode-.*; Secure/);
    expect(response.headers['strict-transport-security']).toMatch(/max-age=31536000/);
    await secure.close();
  });
});

describe('the token against forged requests', () => {
  const withoutToken = (agent: Awaited<ReturnType<TestServer['visitor']>>) =>
    agent.delete('/api/session').set('x-csrf-token', '');

  test('is needed for every change, signed in or not', async () => {
    const designer = await server.as('designer');
    const refused = await withoutToken(designer);
    expect(refused.status).toBe(403);
    expect(refused.body.error.code).toBe('csrf');
    expect((await designer.get('/api/session')).body.me).not.toBeNull();
    const visitor = await server.visitor();
    const unsigned = await visitor.post('/api/session', { email, password: 'x' }).set('x-csrf-token', 'made.up');
    expect(unsigned.body.error.code).toBe('csrf');
  });

  test('of a visitor is worth nothing once signed in', async () => {
    await ida();
    const visitor = await server.visitor();
    const { body: before } = await visitor.get('/api/session');
    await visitor.signIn(email);
    const refused = await visitor.delete('/api/session').set('x-csrf-token', before.csrfToken);
    expect(refused.body.error.code).toBe('csrf');
    expect((await visitor.delete('/api/session')).status).toBe(200);
  });

  test('of one session is worth nothing in another', async () => {
    const one = await server.as('designer');
    const other = await server.as('designer');
    const { body } = await one.get('/api/session');
    expect((await other.delete('/api/session').set('x-csrf-token', body.csrfToken)).body.error.code).toBe('csrf');
  });
});

describe('a token planted together with its cookie', () => {
  test('is refused, because it is bound to the session that it was given to', async () => {
    await ida();
    const cookieOf = (response: supertest.Response, name: string) =>
      (response.headers['set-cookie'] as unknown as string[]).find((line) => line.startsWith(name))?.split(';')[0] ??
      '';
    const signIn = async () => {
      const visit = await supertest(server.app).get('/api/session');
      const response = await supertest(server.app)
        .post('/api/session')
        .set({ cookie: cookieOf(visit, 'tremolode-csrf'), 'x-csrf-token': visit.body.csrfToken })
        .send({ email, password: testPassword });
      return {
        session: cookieOf(response, 'tremolode-session'),
        csrf: cookieOf(response, 'tremolode-csrf'),
        token: response.body.csrfToken as string,
      };
    };
    const [own, planted] = [await signIn(), await signIn()];
    const signOut = ({ csrf, token }: { csrf: string; token: string }) =>
      supertest(server.app)
        .delete('/api/session')
        .set({ cookie: `${own.session}; ${csrf}`, 'x-csrf-token': token });
    expect((await signOut(planted)).body.error?.code).toBe('csrf');
    expect((await signOut(own)).status).toBe(200);
  });
});

describe('signing out', () => {
  test('ends this session and gives a token for the next sign-in', async () => {
    const designer = await server.as('designer');
    const { status, body } = await designer.delete('/api/session');
    expect(status).toBe(200);
    expect(body.me).toBeNull();
    expect((await designer.get('/api/desk')).status).toBe(401);
    expect((await designer.signIn(designer.email ?? '')).status).toBe(200);
  });

  test('everywhere ends every session of the person and no others', async () => {
    await ida();
    const here = await server.visitor();
    const there = await server.visitor();
    await here.signIn(email);
    await there.signIn(email);
    const somebodyElse = await server.as('reviewer');
    expect((await here.delete('/api/sessions')).body.me).toBeNull();
    expect((await there.get('/api/session')).body.me).toBeNull();
    expect((await here.get('/api/session')).body.me).toBeNull();
    expect((await somebodyElse.get('/api/session')).body.me).not.toBeNull();
  });
});

describe('changing the own password', () => {
  test('needs the current one, ends the other sessions, keeps this one', async () => {
    await ida();
    const here = await server.visitor();
    const there = await server.visitor();
    await here.signIn(email);
    await there.signIn(email);
    const newPassword = 'a longer and newer one';
    const wrong = await here.put('/api/me/password', { currentPassword: 'not it', newPassword });
    expect(wrong.status).toBe(422);
    expect(wrong.body.error.issues).toEqual([{ path: 'currentPassword', message: 'This is not your password.' }]);
    const changed = await here.put('/api/me/password', { currentPassword: testPassword, newPassword });
    expect(changed.status).toBe(204);
    expect((await here.get('/api/session')).body.me.name).toBe('Ida Brandt');
    expect((await there.get('/api/session')).body.me).toBeNull();
    expect((await there.signIn(email, testPassword)).status).toBe(401);
    expect((await there.signIn(email, newPassword)).status).toBe(200);
  });

  test('names what is wrong with the new one without repeating it', async () => {
    const designer = await server.as('designer');
    const { status, body, text } = await designer.put('/api/me/password', {
      currentPassword: testPassword,
      newPassword: 'too short',
    });
    expect(status).toBe(422);
    expect(body.error.issues).toEqual([{ path: 'newPassword', message: 'At least 12 characters.', limit: 12 }]);
    expect(text).not.toContain('too short');
  });
});

describe('a session', () => {
  test('takes a changed role into account at the next request', async () => {
    const designer = await server.as('designer');
    expect((await designer.get('/api/people')).status).toBe(403);
    await server.db('person_roles').insert({ person_id: designer.personId, role: 'administrator' });
    expect((await designer.get('/api/people')).status).toBe(200);
    await server.db('person_roles').where({ person_id: designer.personId, role: 'administrator' }).delete();
    expect((await designer.get('/api/people')).status).toBe(403);
  });

  test('ends with the account', async () => {
    const designer = await server.as('designer');
    await server.db('people').where({ id: designer.personId }).update({ active: 0 });
    expect((await designer.get('/api/session')).body.me).toBeNull();
    expect((await designer.get('/api/desk')).status).toBe(401);
  });

  test('ends twelve hours after the last request', async () => {
    let time = new Date('2027-01-01T00:00:00Z');
    const timed = await startTestServer({ now: () => time });
    const designer = await timed.as('designer');
    time = new Date('2027-01-01T11:00:00Z');
    expect((await designer.get('/api/session')).body.me).not.toBeNull();
    time = new Date('2027-01-01T22:30:00Z');
    expect((await designer.get('/api/session')).body.me).not.toBeNull();
    time = new Date('2027-01-02T10:30:01Z');
    expect((await designer.get('/api/session')).body.me).toBeNull();
    await timed.close();
  });

  test('that cannot be read is told as an error and the server goes on', async () => {
    const designer = await server.as('designer');
    await server.db.schema.renameTable('sessions', 'sessions_away');
    const failed = await designer.get('/api/session');
    expect(failed.status).toBe(500);
    expect(failed.body.error.code).toBe('bug');
    expect(failed.text).not.toMatch(/sqlite|no such table/i);
    await server.db.schema.renameTable('sessions_away', 'sessions');
    expect((await designer.get('/api/session')).body.me).not.toBeNull();
  });

  test('with content that nobody understands is no session', async () => {
    const designer = await server.as('designer');
    await server.db('sessions').update({ content: '"rubbish"' });
    const { status, body } = await designer.get('/api/session');
    expect([status, body.me]).toEqual([200, null]);
    expect((await designer.signIn(designer.email ?? '')).status).toBe(200);
  });
});
