import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import type { Person } from '#contracts/people';
import { startTestServer } from '../support/server';
import type { TestAgent, TestServer } from '../support/server';

let server: TestServer;
let administrator: TestAgent;
beforeEach(async () => {
  server = await startTestServer();
  administrator = await server.as('administrator');
});
afterEach(() => server.close());

const newcomer = {
  name: 'Søren Åkesson-Łuczak',
  email: 'soren@fennmark.example',
  roles: ['designer', 'bench', 'designer'],
  initialPassword: 'long enough to be one',
};
const add = async (more: object = {}): Promise<Person> => {
  const { status, body } = await administrator.post('/api/people', { ...newcomer, ...more });
  expect(status).toBe(201);
  return body as Person;
};
const change = (person: Person, more: object = {}) => {
  const { version, name, email, roles, active } = person;
  return administrator.put(`/api/people/${person.id}`, { version, name, email, roles, active, ...more });
};
const own = async (): Promise<Person> => {
  const { body } = await administrator.get('/api/people');
  const found = (body.people as Person[]).find(({ id }) => id === administrator.personId);
  if (found === undefined) throw new Error('The administrator is not in the list.');
  return found;
};
const trail = () =>
  server
    .db('audit_entries')
    .whereNot({ action: 'signedIn' })
    .orderBy('sequence')
    .select('action', 'subject_id', 'detail');

describe('adding a person', () => {
  test('lets them sign in with the roles given, each once', async () => {
    const person = await add();
    expect(person).toMatchObject({ name: newcomer.name, roles: ['designer', 'bench'], active: true, version: 1 });
    const visitor = await server.visitor();
    const { body } = await visitor.signIn(newcomer.email, newcomer.initialPassword);
    expect(body.me.roles).toEqual(['designer', 'bench']);
    const { body: list } = await administrator.get('/api/people');
    const shown = (list.people as Person[]).find(({ id }) => id === person.id);
    expect(shown?.lastSignInAt).not.toBeNull();
  });

  test('is told in the audit trail, without the password', async () => {
    const person = await add();
    const entries = await trail();
    expect(entries).toHaveLength(1);
    expect(entries[0]).toMatchObject({ action: 'created', subject_id: person.id });
    expect(JSON.stringify(entries)).not.toContain(newcomer.initialPassword);
    expect(JSON.stringify(entries)).not.toContain('argon2');
  });

  test('with an address that somebody has is refused at the field', async () => {
    await add();
    const { status, body } = await administrator.post('/api/people', { ...newcomer, email: 'SOREN@fennmark.example' });
    expect(status).toBe(422);
    expect(body.error.issues).toEqual([
      { path: 'email', value: 'SOREN@fennmark.example', message: 'Somebody has this address already.' },
    ]);
  });
});

describe('changing a person', () => {
  test('takes effect, counts the version, and tells what changed', async () => {
    const person = await add();
    const { status, body } = await change(person, { name: 'Søren Åkesson', roles: ['reviewer'] });
    expect(status).toBe(200);
    expect(body).toMatchObject({ name: 'Søren Åkesson', roles: ['reviewer'], version: 2 });
    const [, changed] = await trail();
    expect(JSON.parse(changed.detail)).toEqual({
      name: { from: newcomer.name, to: 'Søren Åkesson' },
      roles: { from: ['designer', 'bench'], to: ['reviewer'] },
    });
  });

  test('from a page that is out of date is refused and told who changed it', async () => {
    const person = await add();
    await change(person, { name: 'Another name' });
    const { status, body } = await change(person, { name: 'A third name' });
    expect(status).toBe(409);
    expect(body.error.code).toBe('conflict');
    const { name } = await own();
    expect(body.error.changed).toEqual([{ version: 2, by: name, at: expect.any(String), what: 'changed' }]);
    expect((await server.db('people').where({ id: person.id }).first()).name).toBe('Another name');
  });

  test('who is not there is 404', async () => {
    const person = await add();
    const { status } = await change({ ...person, id: '00000000-0000-4000-8000-000000000000' });
    expect(status).toBe(404);
  });

  test('to the address of another is refused', async () => {
    const person = await add();
    const { status, body } = await change(person, { email: administrator.email });
    expect([status, body.error.issues[0].path]).toEqual([422, 'email']);
  });

  test('into one who may not sign in ends their sessions at once', async () => {
    const person = await add();
    const browser = await server.visitor();
    await browser.signIn(newcomer.email, newcomer.initialPassword);
    expect((await change(person, { active: false })).status).toBe(200);
    expect(await server.db('sessions').where({ person_id: person.id })).toEqual([]);
    expect((await browser.get('/api/session')).body.me).toBeNull();
    expect((await browser.signIn(newcomer.email, newcomer.initialPassword)).status).toBe(401);
  });
});

describe('the last administrator who can sign in', () => {
  test.each([
    ['gives the role up', { roles: ['designer'] }],
    ['is switched off', { active: false }],
  ])('stays one when he %s', async (_what, more) => {
    const { status, body } = await change(await own(), more);
    expect(status).toBe(409);
    expect(body.error.message).toContain('last administrator');
    expect(await own()).toMatchObject({ active: true, roles: ['administrator'], version: 1 });
  });

  test('may go once there is another, and one who cannot sign in does not count', async () => {
    await server.addPerson({ roles: ['administrator'], active: false });
    expect((await change(await own(), { active: false })).status).toBe(409);
    await server.addPerson({ roles: ['administrator'] });
    expect((await change(await own(), { active: false })).status).toBe(200);
  });
});

test('nobody can read or set the password of another', async () => {
  const person = await add();
  const { text } = await administrator.get('/api/people');
  expect(text).not.toMatch(/password|argon2/i);
  const { status, body } = await change(person, { initialPassword: 'another long password' });
  expect([status, body.error.issues[0]]).toEqual([
    422,
    { path: 'initialPassword', message: 'This key is not known here.' },
  ]);
});
