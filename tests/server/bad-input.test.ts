import { gzipSync } from 'node:zlib';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { ErrorAnswer } from '#contracts/error';
import type { Issue } from '#contracts/error';
import { firstFault } from '#server/http/json-place';
import { startTestServer } from '../support/server';
import type { TestAgent, TestServer } from '../support/server';

let server: TestServer;
let administrator: TestAgent;
beforeAll(async () => {
  server = await startTestServer();
  administrator = await server.as('administrator');
});
afterAll(() => server.close());

const person = {
  name: 'Jon Ek',
  email: 'jon@fennmark.example',
  roles: ['bench'],
  initialPassword: 'long enough to be one',
};

async function issuesOf(send: PromiseLike<{ status: number; body: unknown }>): Promise<Issue[]> {
  const { status, body } = await send;
  const { error } = ErrorAnswer.parse(body);
  expect([status, error.code]).toEqual([422, 'invalid']);
  expect(error.requestId).toMatch(/^[\w-]{8,64}$/);
  return error.issues ?? [];
}
const sendText = (text: string, type = 'application/json') =>
  administrator.post('/api/people').set('content-type', type).send(text);

describe('JSON that cannot be read', () => {
  test.each([
    ['{"name": "Jon",\n  "email" oops}', 'line 2, column 11, position 26'],
    ['{"name": "Jon", }', 'line 1, column 17, position 16'],
    ['{"name": "Jon"', 'line 1, column 15, position 14'],
    ['{\n\n', 'line 3, column 1, position 3'],
    ['"just text"', 'line 1, column 1, position 0'],
    ['not JSON', 'line 1, column 1, position 0'],
    ['{"a": [1, 2.], "b": 1}', 'line 1, column 12, position 11'],
    ['{"a": "tab\tinside"}', 'line 1, column 7, position 6'],
    ['{"a": 1} {}', 'line 1, column 10, position 9'],
    ['{"a": [1}', 'line 1, column 9, position 8'],
    ['{"a" 1}', 'line 1, column 6, position 5'],
  ])('%j names the place', async (text, place) => {
    const [issue] = await issuesOf(sendText(text));
    expect(issue?.message).toContain(place);
  });

  test('the place is that of the parser wherever the parser names one', () => {
    let named = 0;
    fc.assert(
      fc.property(fc.json(), fc.nat(), fc.constantFrom('', '}', ']', ',', ':', '"', '1', 'x'), (json, at, mark) => {
        const place = at % (json.length + 1);
        const text = `{"a": ${json}}`.slice(0, place + 6) + mark + json.slice(place);
        let position: string | undefined;
        try {
          JSON.parse(text);
        } catch (error) {
          position = /in JSON at position (\d+)/.exec(String(error))?.[1];
          // Inside a string or number the parser points into it, and this to where it stops being one.
          if (/control character|string|escape|number|exponent/i.test(String(error))) position = undefined;
        }
        fc.pre(position !== undefined);
        named += 1;
        expect([text, firstFault(text)]).toEqual([text, Number(position)]);
      }),
      { numRuns: 300, seed: 7 },
    );
    expect(named).toBeGreaterThan(100);
  });

  test('deep nesting neither exhausts the stack nor the time', () => {
    const started = performance.now();
    expect(firstFault('['.repeat(1_000_000))).toBe(1_000_000);
    expect(performance.now() - started).toBeLessThan(10_000);
  });

  test('an empty body, or one that is not JSON, is told what to send', async () => {
    for (const request of [administrator.post('/api/people'), sendText('name=Jon', 'text/plain')]) {
      expect(await issuesOf(request)).toEqual([
        { path: '', message: 'Send a body with Content-Type: application/json.' },
      ]);
    }
  });

  test('another character set is named', async () => {
    const [issue] = await issuesOf(sendText('{}', 'application/json; charset=latin1'));
    expect(issue?.message).toContain('UTF-8');
  });
});

describe('more than 1 MB', () => {
  test('is refused with the limit named', async () => {
    const issues = await issuesOf(administrator.post('/api/people', { ...person, name: 'x'.repeat(1_048_576) }));
    expect(issues).toEqual([{ path: '', message: 'At most 1 MB.', limit: '1 MB' }]);
  });

  test('is counted after unpacking', async () => {
    const packed = gzipSync(JSON.stringify({ ...person, name: 'x'.repeat(2_000_000) }));
    expect(packed.length).toBeLessThan(10_000);
    const request = sendText('')
      .set('content-encoding', 'gzip')
      .serialize(() => packed as unknown as string);
    expect(await issuesOf(request.send(packed))).toEqual([{ path: '', message: 'At most 1 MB.', limit: '1 MB' }]);
  });
});

describe('values', () => {
  test('absent, wrong, unknown and out of range ones are named one by one, with value and limit', async () => {
    const issues = await issuesOf(
      administrator.post('/api/people', {
        email: 'no address',
        roles: ['bench', 'king'],
        initialPassword: 'short',
        admin: true,
        __proto__x: 1,
      }),
    );
    expect(issues).toEqual([
      { path: 'name', message: 'This is missing.' },
      { path: 'email', value: 'no address', message: 'This is not an e-mail address.' },
      {
        path: 'roles.1',
        value: 'king',
        message: 'This must be one of designer, reviewer, bench, releaseAuthority, administrator, observer.',
        limit: 'designer, reviewer, bench, releaseAuthority, administrator, observer',
      },
      { path: 'initialPassword', message: 'At least 12 characters.', limit: 12 },
      { path: 'admin', value: true, message: 'This key is not known here.' },
      { path: '__proto__x', value: 1, message: 'This key is not known here.' },
    ]);
    expect(await server.db('people').where({ email: 'no address' })).toEqual([]);
  });

  test('of another type are told what they must be', async () => {
    const issues = await issuesOf(
      administrator.post('/api/people', { ...person, name: 7, roles: 'bench', email: null }),
    );
    expect(issues).toEqual([
      { path: 'name', value: 7, message: 'This must be text.' },
      { path: 'email', value: null, message: 'This is not an e-mail address.' },
      { path: 'roles', value: 'bench', message: 'This must be a list.' },
    ]);
  });

  test('a list instead of an object is told', async () => {
    expect(await issuesOf(administrator.post('/api/people', []))).toEqual([
      { path: '', message: 'This must be an object.' },
    ]);
  });

  test('long ones are not sent back whole', async () => {
    const [issue] = await issuesOf(administrator.post('/api/people', { ...person, name: 'y'.repeat(5000) }));
    expect(issue).toEqual({
      path: 'name',
      value: `${'y'.repeat(200)}…`,
      message: 'At most 200 characters.',
      limit: 200,
    });
  });

  test('in the address and after the question mark are checked alike', async () => {
    expect(await issuesOf(administrator.get('/api/mail/7'))).toEqual([
      { path: 'messageId', value: '7', message: 'This is not an identifier.' },
    ]);
    expect(await issuesOf(administrator.get('/api/audit?limit=0&before=x&after=1'))).toEqual([
      { path: 'before', value: 'x', message: 'This must be a number.' },
      { path: 'limit', value: '0', message: 'At least 1.', limit: 1 },
      { path: 'after', value: '1', message: 'This key is not known here.' },
    ]);
    expect(await issuesOf(administrator.get('/api/audit?limit=1&limit=2'))).toHaveLength(1);
    await issuesOf(administrator.get('/api/mail/%ff'));
  });
});

describe('errors of the server itself', () => {
  test('say nothing of its inside, and carry the id under which they are logged', async () => {
    await server.db.schema.renameTable('mail_messages', 'mail_away');
    const { status, body, headers, text } = await administrator
      .get('/api/mail')
      .set('x-request-id', 'from-the-proxy-1');
    await server.db.schema.renameTable('mail_away', 'mail_messages');
    expect(status).toBe(500);
    expect(body.error).toMatchObject({ code: 'bug', requestId: 'from-the-proxy-1' });
    expect(headers['x-request-id']).toBe('from-the-proxy-1');
    expect(text).not.toMatch(/mail_messages|sqlite|select/i);
  });

  test('an id that could break a log line is replaced', async () => {
    const { headers } = await administrator.get('/api/health').set('x-request-id', 'a b"c');
    expect(headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
  });
});

test('an unknown address of the interface is 404 in JSON', async () => {
  for (const request of [
    administrator.get('/api/nothing'),
    administrator.post('/api/nothing', {}),
    administrator.get('/api'),
  ]) {
    const { status, body } = await request;
    expect([status, ErrorAnswer.parse(body).error.code]).toEqual([404, 'notFound']);
  }
});
