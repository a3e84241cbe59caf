import { Writable } from 'node:stream';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createLog } from '#server/log';
import { startTestServer, testPassword } from '../support/server';
import type { TestServer } from '../support/server';

let written = '';
let server: TestServer;
beforeAll(async () => {
  const destination = new Writable({
    write(text, _encoding, done) {
      written += String(text);
      done();
    },
  });
  server = await startTestServer({ log: createLog({ logLevel: 'trace' }, destination) });
});
afterAll(() => server.close());

test('the log tells what was asked and how it went, and nothing that signs anybody in', async () => {
  const designer = await server.as('designer');
  await designer.get('/api/people').set('authorization', 'Bearer not-for-the-log');
  await designer.signIn(designer.email ?? '', 'a wrong password');
  expect(written).toContain('"url":"/api/people"');
  expect(written).toContain('"statusCode":403');
  expect(written).toContain('Sign-in refused');
  for (const secret of [testPassword, 'a wrong password', 'not-for-the-log', 'tremolode-session', 'csrf', '$argon2']) {
    expect(written).not.toContain(secret);
  }
});

test('secrets are taken out even where somebody logs a whole request', () => {
  written = '';
  server.deps.log.info({
    req: { headers: { cookie: 'tremolode-session=1', authorization: 'Bearer 2' } },
    body: { password: 'three', newPassword: 'four' },
  });
  expect(written).toContain('kept out of the log');
  expect(written).not.toMatch(/tremolode-session=1|Bearer 2|three|four/);
});
