import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { clientRoutes } from '#contracts/client-routes';
import { startTestServer, testConfig } from '../support/server';
import type { TestServer } from '../support/server';

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());
const get = (path: string) => supertest(server.app).get(path);

describe('pages', () => {
  test.each(clientRoutes.map((route) => route.replace(/:\w+/g, 'x1')))('%s is the page', async (path) => {
    const { status, text, headers } = await get(path);
    expect(status).toBe(200);
    expect(text).toContain('<title>Tremolode</title>');
    expect(headers['cache-control']).toBe('no-cache');
    expect(headers['content-type']).toBe('text/html; charset=utf-8');
  });

  test.each(['/nothing', '/briefs/1/2/3', '/index.php', '/.env', '/designs/x/A/more'])(
    '%s is the page with 404',
    async (path) => {
      const { status, text } = await get(path);
      expect(status).toBe(404);
      expect(text).toContain('<title>Tremolode</title>');
    },
  );

  test('files with a digest in their name are kept for ever', async () => {
    const { status, headers } = await get('/assets/app-1a2b3c.js');
    expect(status).toBe(200);
    expect(headers['cache-control']).toBe('public, max-age=31536000, immutable');
  });

  test.each(['/assets/old-9z9z9z.js', '/assets/', '/assets/index.html', '/assets/..%2findex.html'])(
    'an unknown file %s is 404 and not the page',
    async (path) => {
      const { status, text } = await get(path);
      expect([status, text]).toEqual([404, 'There is nothing here.\n']);
    },
  );

  test.each(['/assets/..%2f..%2fserver.ts', '/..%2fserver.ts', '/%2e%2e/server.ts', '/../server.ts'])(
    'nothing outside the built client is to be had by %s',
    async (path) => {
      const { status, text } = await get(path);
      expect([status, text.includes('startTestServer')]).toEqual([404, false]);
    },
  );

  test('a change to a page address is 404', async () => {
    expect((await supertest(server.app).post('/briefs')).status).toBe(404);
  });

  test('before the client is built it is said how', async () => {
    const bare = await startTestServer({ config: { ...testConfig, clientDir: '/nonexistent' } });
    const { status, text } = await supertest(bare.app).get('/');
    expect([status, text]).toEqual([503, 'The client has not been built: npm run build.\n']);
    await bare.close();
  });
});

describe('every answer', () => {
  test.each(['/', '/api/session', '/nothing', '/assets/nothing'])('%s carries the strict policy', async (path) => {
    const { headers } = await get(path);
    expect(headers['content-security-policy']).toBe(
      "default-src 'self';script-src 'self';style-src 'self' 'unsafe-inline';img-src 'self' data: blob:;font-src 'self';" +
        "connect-src 'self';object-src 'none';frame-ancestors 'none';base-uri 'self';form-action 'self'",
    );
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['x-powered-by']).toBeUndefined();
    expect(headers['x-request-id']).toBeDefined();
  });

  test('of the interface is kept by nobody', async () => {
    expect((await get('/api/session')).headers['cache-control']).toBe('no-store');
  });
});
