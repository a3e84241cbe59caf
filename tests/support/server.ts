import { randomUUID } from 'node:crypto';
import { join } from 'node:path';
import type { Express } from 'express';
import type { Knex } from 'knex';
import supertest from 'supertest';
import type { Test } from 'supertest';
import type { Config } from '#server/config';
import { createApp } from '#server/app';
import type { Deps } from '#server/app';
import { migrateToLatest, openDatabase } from '#server/db';
import { unavailable } from '#server/errors';
import { hashPassword } from '#server/features/auth/reads';
import type { Estimator } from '#server/jobs/estimator';
import { createLog } from '#server/log';
import type { Role } from '#workflows/revision';

export const testPassword = 'correct horse battery';
const hashOfTestPassword = hashPassword(testPassword);

export const testConfig: Config = {
  production: false,
  host: '127.0.0.1',
  port: 0,
  baseUrl: 'http://127.0.0.1:4480',
  dataDir: '/nonexistent',
  databaseFile: ':memory:',
  clientDir: join(import.meta.dirname, 'client'),
  sessionSecret: 'a secret for tests only, long enough',
  tls: false,
  trustedProxies: 0,
  mail: { smtpUrl: null, from: 'Tremolode <tremolode@fennmark.example>' },
  logLevel: 'silent',
  version: '0.0.0-test',
};

const noEstimator: Estimator = {
  engine: 'none',
  estimate: () => Promise.reject(unavailable('This test has no estimator.')),
  close: () => Promise.resolve(),
};

/** A browser's part: keeps cookies, sends the CSRF token with every change. */
export interface TestAgent {
  personId: string | null;
  email: string | null;
  get(path: string): Test;
  /** Any changing method with the token and, where given, a JSON body. */
  send(method: 'post' | 'put' | 'patch' | 'delete', path: string, body?: object): Test;
  post(path: string, body?: object): Test;
  put(path: string, body?: object): Test;
  delete(path: string): Test;
  /** Signs in and takes the new token. */
  signIn(email: string, password?: string): Promise<supertest.Response>;
}

export interface TestServer {
  app: Express;
  db: Knex;
  deps: Deps;
  /** Adds a person straight to the database and returns the id. */
  addPerson(person: { name?: string; email?: string; roles?: Role[]; active?: boolean }): Promise<string>;
  /** A visitor who has fetched a token but not signed in. */
  visitor(): Promise<TestAgent>;
  /** A new person with exactly these roles, signed in through the real sign-in. */
  as(...roles: Role[]): Promise<TestAgent>;
  close(): Promise<void>;
}

async function agentFor(app: Express): Promise<TestAgent> {
  const cookies = supertest.agent(app);
  let token = '';
  const fetchToken = async () => {
    const { body } = await cookies.get('/api/session');
    token = (body as { csrfToken: string }).csrfToken;
  };
  const agent: TestAgent = {
    personId: null,
    email: null,
    get: (path) => cookies.get(path),
    send(method, path, body) {
      const request = cookies[method](path).set('x-csrf-token', token);
      return body === undefined ? request : request.send(body);
    },
    post: (path, body) => agent.send('post', path, body),
    put: (path, body) => agent.send('put', path, body),
    delete: (path) => agent.send('delete', path),
    async signIn(email, password = testPassword) {
      await fetchToken();
      const response = await agent.post('/api/session', { email, password });
      await fetchToken();
      return response;
    },
  };
  await fetchToken();
  return agent;
}

/** The real app on a database in memory. `overrides` replaces parts, e.g. `{ now, estimator }`. */
export async function startTestServer(overrides: Partial<Deps> = {}): Promise<TestServer> {
  const db = openDatabase(':memory:');
  await migrateToLatest(db);
  const deps: Deps = {
    db,
    config: testConfig,
    log: createLog(testConfig),
    estimator: noEstimator,
    now: () => new Date(),
    ...overrides,
  };
  const app = createApp(deps);
  const server: TestServer = {
    app,
    db,
    deps,
    async addPerson({ name, email, roles = [], active = true }) {
      const id = randomUUID();
      await db('people').insert({
        id,
        name: name ?? `Person ${id.slice(0, 4)}`,
        email: email ?? `${id}@fennmark.example`,
        password_hash: await hashOfTestPassword,
        active: active ? 1 : 0,
        created_at: deps.now().toISOString(),
      });
      for (const role of roles) await db('person_roles').insert({ person_id: id, role });
      return id;
    },
    visitor: () => agentFor(app),
    async as(...roles) {
      const personId = await server.addPerson({ roles });
      const email = `${personId}@fennmark.example`;
      const agent = await agentFor(app);
      const response = await agent.signIn(email);
      if (response.status !== 200) throw new Error(`Signing in failed: ${response.text}`);
      return Object.assign(agent, { personId, email });
    },
    async close() {
      await deps.estimator.close();
      await db.destroy();
    },
  };
  return server;
}
