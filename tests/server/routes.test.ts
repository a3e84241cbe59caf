import type { Express } from 'express';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { ErrorAnswer } from '#contracts/error';
import type { RouteContract } from '#contracts/route';
import { allRoutes } from '#contracts/routes';
import { roles } from '#workflows/revision';
import type { Role } from '#workflows/revision';
import { startTestServer } from '../support/server';
import type { TestAgent, TestServer } from '../support/server';

const table = Object.entries(allRoutes) as [string, RouteContract][];
const anyId = '00000000-0000-4000-8000-000000000000';
/** An address of the route: what stands for the parameters does not matter, since who asks is looked at first. */
const addressOf = ({ path }: RouteContract) => `/api${path.replace(/:\w+/g, anyId)}`;

let server: TestServer;
const agents = {} as Record<Role, TestAgent>;
beforeAll(async () => {
  server = await startTestServer();
  for (const role of roles) agents[role] = await server.as(role);
});
afterAll(() => server.close());

function call(agent: TestAgent, contract: RouteContract) {
  const address = addressOf(contract);
  return contract.method === 'get' ? agent.get(address) : agent.send(contract.method, address);
}

interface Layer {
  route?: { path: string; methods: Record<string, boolean> };
  handle?: { stack?: Layer[] };
}

/** Every route that Express serves below /api, as “get /path”. */
function servedBelowApi(app: Express): string[] {
  const routesOf = ({ route, handle }: Layer): string[] =>
    route === undefined
      ? (handle?.stack ?? []).flatMap(routesOf)
      : Object.keys(route.methods).map((method) => `${method} ${route.path}`);
  return (app.router as unknown as { stack: Layer[] }).stack
    .flatMap(routesOf)
    .filter((line) => line !== 'get /{*splat}');
}

test('what is served is exactly what stands in the table', () => {
  expect(servedBelowApi(server.app).sort()).toEqual(table.map(([, { method, path }]) => `${method} ${path}`).sort());
});

test('a route that is served beside the table is noticed', () => {
  server.app.get('/api/back-door', (_request, response) => void response.end());
  expect(servedBelowApi(server.app)).toContain('get /api/back-door');
});

describe('without signing in', () => {
  const guarded = table.filter(([, { allowed }]) => allowed !== 'anyone');
  test.each(guarded)('%s is refused with 401', async (_name, contract) => {
    const visitor = await server.visitor();
    const { status, body } = await call(visitor, contract);
    expect([status, ErrorAnswer.parse(body).error.code]).toEqual([401, 'unauthenticated']);
  });

  test('what was sent is not even looked at', async () => {
    const response = await supertest(server.app)
      .post('/api/people')
      .set('content-type', 'application/json')
      .send('{ not JSON');
    expect(response.status).toBe(401);
  });
});

describe('with a role that may not', () => {
  const rows = table.flatMap(([name, contract]) => {
    const { allowed } = contract;
    if (typeof allowed === 'string') return [];
    return roles.filter((role) => !allowed.includes(role)).map((role) => [role, name, contract] as const);
  });
  test.each(rows)('%s: %s is refused with 403', async (role, _name, contract) => {
    const { status, body } = await call(agents[role], contract);
    expect([status, ErrorAnswer.parse(body).error.code]).toEqual([403, 'forbidden']);
  });

  test('a person without any role is refused wherever a role is needed', async () => {
    const nobody = await server.as();
    for (const [name, contract] of table) {
      if (typeof contract.allowed === 'string') continue;
      expect([name, (await call(nobody, contract)).status]).toEqual([name, 403]);
    }
  });
});

describe('with a role that may', () => {
  const rows = table.flatMap(([name, contract]) => {
    const { allowed } = contract;
    const may = typeof allowed === 'string' ? roles : allowed;
    return name === 'signOut' || name === 'signOutEverywhere' ? [] : may.map((role) => [role, name, contract] as const);
  });
  test.each(rows)('%s: %s is let in', async (role, _name, contract) => {
    expect([401, 403]).not.toContain((await call(agents[role], contract)).status);
  });
});

describe('without the token', () => {
  const changing = table.filter(([, { method }]) => method !== 'get');
  test.each(changing)('%s is refused', async (_name, contract) => {
    const role = typeof contract.allowed === 'string' ? 'designer' : (contract.allowed[0] ?? 'designer');
    const { status, body } = await call(agents[role], contract).set('x-csrf-token', '');
    expect([status, ErrorAnswer.parse(body).error.code]).toEqual([403, 'csrf']);
  });
});
