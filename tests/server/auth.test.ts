import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { startTestServer, testPassword } from '../support/server';
import type { TestServer } from '../support/server';

let server: TestServer;
beforeEach(async () => {
  server = await startTestServer();
});
afterEach(() => server.close());

describe('signing in', () => {
  test('gives who is signed in, their roles and sections, and a new token', async () => {
    const email = 'ida@fennmark.example';
    await server.addPerson({ name: 'Ida Brandt', email, roles: ['designer', 'observer'] });
    const visitor = await server.visitor();
    const response = await visitor.signIn('  IDA@fennmark.example ');
    expect(response.body).toMatchObject({
      me: { name: 'Ida Brandt', email, roles: ['designer', 'observer'] },
    });
    expect(response.body.me.mayEnter).toEqual(['desk', 'briefs', 'designs', 'bench', 'catalogue', 'records']);
    const again = await visitor.get('/api/session');
    expect(again.body.me.name).toBe('Ida Brandt');
    expect(testPassword).not.toBe('');
  });
});
