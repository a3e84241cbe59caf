import type { Response } from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { ErrorAnswer } from '#contracts/error';
import type { RouteContract } from '#contracts/route';
import { allRoutes } from '#contracts/routes';
import type { Message } from '#contracts/mail';
import { smtpTransport } from '#server/mail/transport';
import { startMailWorker } from '#server/mail/worker';
import { openApi } from '#server/openapi';
import { schemaFaults } from '../support/json-schema';
import { testConfig, testPassword } from '../support/server';
import type { TestAgent } from '../support/server';
import { bringTo, startTeam } from '../support/way';
import type { Team } from '../support/way';

type Json = Record<string, unknown>;
interface Operation {
  operationId: string;
  responses: Record<string, { content?: Record<string, { schema: unknown }> }>;
}
const document = openApi('test') as unknown as Json & { paths: Record<string, Record<string, Operation>> };
const table = Object.entries(allRoutes) as [string, RouteContract][];
const patterns = table.map(([name, contract]) => ({
  name,
  contract,
  pattern: new RegExp(`^/api${contract.path.replace(/:\w+/g, '[^/]+')}$`),
}));
const answered = new Set<string>();

/** Holds a real answer against the contract it came from and against what the OpenAPI document says of it. */
function hold(method: string, path: string, { status, body }: Response): void {
  const address = path.split('?')[0] ?? '';
  const row = patterns.find(({ contract, pattern }) => contract.method === method && pattern.test(address));
  if (row === undefined) throw new Error(`${method} ${path} is not in the table.`);
  const { name, contract } = row;
  const operation = document.paths[`/api${contract.path.replace(/:(\w+)/g, '{$1}')}`]?.[method];
  expect(operation?.operationId).toBe(name);
  const documented = operation?.responses[String(status)];
  expect([name, status, documented !== undefined]).toEqual([name, status, true]);
  if (status < 300) {
    expect(status).toBe(contract.status ?? 200);
    if (contract.answer === undefined) expect(body).toEqual({});
    else expect(contract.answer.safeParse(body).error).toBeUndefined();
    answered.add(name);
  } else {
    expect(ErrorAnswer.safeParse(body).error).toBeUndefined();
  }
  const schema = documented?.content?.['application/json']?.schema;
  if (schema !== undefined) expect([name, schemaFaults(document, schema, body)]).toEqual([name, []]);
}

/** The same agent, with every answer held against contract and document. */
function watched(agent: TestAgent): TestAgent {
  const send: TestAgent['send'] = (method, path, body) =>
    agent.send(method, path, body).expect((response: Response) => hold(method, path, response));
  return {
    ...agent,
    get: (path) => agent.get(path).expect((response: Response) => hold('get', path, response)),
    send,
    post: (path, body) => send('post', path, body),
    put: (path, body) => send('put', path, body),
    delete: (path) => send('delete', path),
  };
}

let team: Team;
beforeAll(async () => {
  const plain = await startTeam();
  team = {
    ...plain,
    designer: watched(plain.designer),
    reviewer: watched(plain.reviewer),
    bench: watched(plain.bench),
    authority: watched(plain.authority),
    observer: watched(plain.observer),
    administrator: watched(plain.administrator),
  };
});
afterAll(() => team.close());

describe('real answers', () => {
  test('on the whole way of a design, and of every other route, are those of contract and document', async () => {
    const { designer, bench, reviewer, administrator, observer, server } = team;
    const released = await bringTo(team, 'released');
    await bringTo(team, 'nonconforming');
    const inReview = await bringTo(team, 'inReview');
    const draft = await bringTo(team, 'draft');

    // Reading, by everybody who may.
    const { body: records } = await observer.get('/api/records');
    await observer.get(`/api/records/${records.records[0].id}`);
    await observer.get(`/api/designs/${released.design.id}`);
    for (const agent of [designer, reviewer, bench, team.authority, administrator, observer])
      await agent.get('/api/desk');
    for (const path of [
      '/api/briefs',
      '/api/designs',
      '/api/instruments',
      '/api/catalogue',
      '/api/health',
      '/api/openapi.json',
    ]) {
      await designer.get(path);
    }
    const { body: briefs } = await designer.get('/api/briefs');
    const { body: brief } = await designer.get(`/api/briefs/${briefs.briefs[0].id}`);
    const { body: runs } = await bench.get('/api/runs');
    await bench.get(`/api/runs/${runs.runs[0].id}`);

    // Changing what has not been changed on the way.
    await designer.put(`/api/briefs/${brief.id}`, {
      version: brief.version,
      document: { ...brief.document, notes: 'n' },
    });
    await designer.put(`/api/revisions/${draft.id}/document`, {
      version: draft.version,
      document: draft.document as Json,
    });
    await designer.post('/api/estimates', { design: draft.document, vibration: brief.document.vibration });
    const cleared = await bringTo(team, 'clearedForBench');
    const { body: onBench } = await bench.post(`/api/revisions/${cleared.id}/events`, {
      type: 'startRun',
      version: cleared.version,
      specimen: 'SN 9',
    });
    const runId = onBench.runs[0].id as string;
    await bench.put(`/api/runs/${runId}/conditions`, { temperature: 21, humidity: 40, fixture: 'Shaker 2' });
    const { body: instruments } = await bench.get('/api/instruments');
    const { number: _number, inCalibration: _in, id: instrumentId, ...instrument } = instruments.instruments[0];
    await bench.put(`/api/instruments/${instrumentId}`, instrument);
    const { body: read } = await bench.post(`/api/runs/${runId}/readings`, {
      requirementId: null,
      quantity: 'Room pressure',
      value: 101_300,
      unit: 'Pa',
      instrumentId,
      outOfCalibrationReason: null,
      note: '',
    });
    await bench.post(`/api/runs/${runId}/readings/${read.readings[0].id}/strike`, { reason: 'Wrong gauge' });

    // Administration.
    const { body: person } = await administrator.post('/api/people', {
      name: 'New',
      email: 'new@fennmark.example',
      roles: ['observer'],
      initialPassword: testPassword,
    });
    const { version, name, email, roles, active } = person;
    await administrator.put(`/api/people/${person.id}`, { version, name, email, roles, active });
    await administrator.put(`/api/people/${person.id}`, { version, name, email, roles, active });
    await administrator.get('/api/people');
    await administrator.get('/api/audit?limit=500');
    await administrator.get('/api/audit/verification');
    const { db, log, now } = server.deps;
    const nowhere = smtpTransport('smtp://127.0.0.1:1', testConfig);
    const worker = startMailWorker({ db, log, now, transport: nowhere });
    await worker.stop();
    await db('mail_messages').where({ state: 'waiting' }).update({ state: 'failed', lease_until: null });
    const { body: mail } = await administrator.get('/api/mail');
    const [message] = mail.messages as Message[];
    await administrator.get(`/api/mail/${message?.id}`);
    await administrator.post(`/api/mail/${message?.id}/resend`);

    // Refusals.
    await designer.get('/api/people');
    await designer.get('/api/briefs/none');
    await designer.get('/api/briefs/00000000-0000-4000-8000-000000000000');
    await reviewer.post(`/api/revisions/${inReview.id}/events`, { type: 'approve', version: 99, password: 'x' });
    await designer.put(`/api/revisions/${inReview.id}/document`, { version: inReview.version, document: {} });

    // The own account, and out.
    await designer.get('/api/session');
    await designer.put('/api/me/password', { currentPassword: testPassword, newPassword: 'a longer and newer one' });
    const visitor = watched(await server.visitor());
    await visitor.get('/api/desk');
    await visitor.post('/api/session', { email: observer.email ?? '', password: testPassword });
    await observer.delete('/api/session');
    await reviewer.delete('/api/sessions');

    expect(table.map(([name]) => name).filter((name) => !answered.has(name))).toEqual([]);
  }, 120_000);
});

describe('the document', () => {
  test('has each route of the table once, with its parameters, and nothing else', () => {
    const operations = Object.entries(document.paths).flatMap(([path, methods]) =>
      Object.entries(methods).map(([method, { operationId }]) => `${operationId}: ${method} ${path}`),
    );
    expect(operations.sort()).toEqual(
      table.map(([name, { method, path }]) => `${name}: ${method} /api${path.replace(/:(\w+)/g, '{$1}')}`).sort(),
    );
  });

  test('says who may call and that changes need the token', () => {
    const text = JSON.stringify(document.paths['/api/people']);
    expect(text).toContain('For the role administrator.');
    expect(text).toContain('"x-csrf-token"');
    expect(JSON.stringify(document.paths['/api/records'])).not.toContain('x-csrf-token');
  });

  test('refers only to schemas that it has', () => {
    const { schemas } = document.components as { schemas: Json };
    const references = [...JSON.stringify(document).matchAll(/"\$ref":"#\/components\/schemas\/(\w+)"/g)];
    expect(references.length).toBeGreaterThan(50);
    for (const [, name] of references) expect(Object.keys(schemas)).toContain(name);
  });

  test('would be found out if it said something else', () => {
    const schema = { $ref: '#/components/schemas/Person' };
    const person = { id: 7, name: 'N' };
    const faults = schemaFaults(document, schema, { ...person, extra: 1 });
    expect(faults).toContain('$.id: 7 is not string');
    expect(faults).toContain('$.email is missing');
    expect(faults).toContain('$.extra is not in the schema');
  });
});
