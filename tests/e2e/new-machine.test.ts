import { spawnSync } from 'node:child_process';
import { statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import { afterEach, describe, expect, test } from 'vitest';
import { verifyAudit } from '#server/audit';
import { openDatabase } from '#server/db';
import { programEnvironment } from '../support/environment';
import { startProduction } from '../support/production';
import type { Production } from '../support/production';

let closing: (() => Promise<void>)[] = [];
afterEach(async () => {
  for (const close of closing.reverse()) await close();
  closing = [];
});
async function start(...given: Parameters<typeof startProduction>): Promise<Production> {
  const production = await startProduction(...given);
  closing.push(() => production.close());
  return production;
}

/** What a browser does about cookies and the token. */
function client(url: string) {
  const cookies = new Map<string, string>();
  let token = '';
  const call = async (method: string, path: string, body?: object): Promise<{ status: number; body: never }> => {
    const response = await fetch(`${url}${path}`, {
      method,
      headers: {
        cookie: [...cookies].map(([name, value]) => `${name}=${value}`).join('; '),
        'x-csrf-token': token,
        ...(body && { 'content-type': 'application/json' }),
      },
      body: body && JSON.stringify(body),
    });
    for (const line of response.headers.getSetCookie()) {
      const [, name = '', value = ''] = /^([^=]+)=([^;]*)/.exec(line) ?? [];
      cookies.set(name, value);
    }
    const answer = (response.status === 204 ? null : await response.json()) as { csrfToken?: string };
    if (answer?.csrfToken !== undefined) token = answer.csrfToken;
    return { status: response.status, body: answer as never };
  };
  return {
    call,
    async signIn(email: string, password: string): Promise<number> {
      await call('GET', '/api/session');
      return (await call('POST', '/api/session', { email, password })).status;
    },
  };
}

const printed = (output: string) => ({
  email: /address {3}(\S+)/.exec(output)?.[1] ?? '',
  password: /password {2}(\S+)/.exec(output)?.[1] ?? '',
});

describe('npm start', () => {
  test('for real work adds an administrator with a password shown once, and only into an empty database', async () => {
    const production = await start({}, { demo: false });
    const { email, password } = printed(production.output());
    expect(password.length).toBeGreaterThanOrEqual(20);
    const administrator = client(production.url);
    expect(await administrator.signIn(email, password)).toBe(200);
    const { body } = await administrator.call('GET', '/api/people');
    expect((body as { people: unknown[] }).people).toHaveLength(1);
    const before = production.output().length;
    await production.kill();
    await production.restart();
    expect(production.output().slice(before)).not.toContain('password');
    expect((await administrator.call('GET', '/api/session')).body).toMatchObject({ me: { email } });
    expect(statSync(join(production.dataDir, 'session-secret')).mode & 0o777).toBe(0o600);
  });

  test('takes the first administrator from the environment', async () => {
    const production = await start(
      { ADMIN_EMAIL: 'ada@fennmark.example', ADMIN_PASSWORD: 'given by the environment' },
      { demo: false },
    );
    expect(production.output()).not.toContain('given by the environment');
    expect(await client(production.url).signIn('ada@fennmark.example', 'given by the environment')).toBe(200);
  });

  test.each([
    [{ PORT: 'eighty' }, 'PORT: A port is a number.'],
    [{ ADMIN_PASSWORD: 'short' }, 'ADMIN_PASSWORD: At least 12 characters.'],
  ])('with %j says what is wrong and ends', (environment, message) => {
    const { status, stderr } = spawnSync(process.execPath, ['scripts/start.mjs', '--no-demo'], {
      encoding: 'utf8',
      timeout: 60_000,
      env: programEnvironment({ DATA_DIR: join(tmpdir(), 'tremolode-never-served'), ...environment }),
    });
    expect([status, stderr]).toEqual([1, expect.stringContaining(message)]);
  });

  test('on a port that is taken says so', async () => {
    const production = await start({}, { demo: false });
    const { status, stderr } = spawnSync(process.execPath, ['scripts/start.mjs', '--no-demo'], {
      encoding: 'utf8',
      timeout: 60_000,
      env: programEnvironment({ DATA_DIR: production.dataDir, PORT: new URL(production.url).port }),
    });
    expect([status, stderr]).toEqual([1, 'The port is in use already. PORT chooses another.\n']);
  });
});

describe('kill -9', () => {
  test('in the middle of many steps leaves each done whole or not at all', async () => {
    const production = await start({}, { demo: false });
    const { email, password } = printed(production.output());
    const administrator = client(production.url);
    await administrator.signIn(email, password);
    let accepted = 0;
    for (let round = 0; round < 3; round += 1) {
      const add = async (index: number): Promise<void> => {
        const { status } = await administrator.call('POST', '/api/people', {
          name: `Person ${round}.${index}`,
          email: `p${round}.${index}@fennmark.example`,
          roles: ['designer', 'bench'],
          initialPassword: 'long enough to be one',
        });
        if (status === 201) accepted += 1;
      };
      // Those cut off by the kill are refused by the broken connection.
      const running = Promise.allSettled(Array.from({ length: 12 }, (_person, index) => add(index)));
      await new Promise((resolve) => setTimeout(resolve, 60 + 90 * round));
      await production.kill();
      await running;
      await production.restart();
    }
    const db = openDatabase(join(production.dataDir, 'tremolode.sqlite'));
    closing.push(() => db.destroy());
    const people = await db('people').whereNot({ email }).pluck('id');
    expect(people.length).toBeGreaterThanOrEqual(accepted);
    expect(await db('person_roles').whereIn('person_id', people)).toHaveLength(2 * people.length);
    expect((await db('audit_entries').where({ action: 'created' }).pluck('subject_id')).sort()).toEqual(
      expect.arrayContaining([...people].sort()),
    );
    expect(await db('audit_entries').where({ action: 'created' })).toHaveLength(people.length + 1);
    expect(await verifyAudit(db)).toMatchObject({ intact: true });
    expect(await db.raw('PRAGMA integrity_check')).toEqual([{ integrity_check: 'ok' }]);
    expect(await db.raw('PRAGMA foreign_key_check')).toEqual([]);
  });

  test('while a message is being handed over sends it once more under the same Message-ID, and others once', async () => {
    const received: string[] = [];
    let holdBack = true;
    let holding = () => undefined as void;
    const reached = new Promise<void>((resolve) => (holding = resolve));
    const smtp = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS'],
      onData(stream, _session, done) {
        let text = '';
        stream.on('data', (chunk: Buffer) => (text += chunk.toString()));
        stream.on('end', () => {
          if (holdBack) return holding();
          received.push(/^Message-ID: (.+)$/im.exec(text)?.[1]?.trim() ?? text);
          done();
        });
      },
    });
    smtp.on('error', () => undefined);
    await new Promise<void>((resolve) => smtp.listen(0, '127.0.0.1', resolve));
    closing.push(() => new Promise((resolve) => smtp.close(() => resolve())));
    const { port } = smtp.server.address() as AddressInfo;

    const production = await start({ SMTP_URL: `smtp://127.0.0.1:${port}` }, { demo: false });
    const file = join(production.dataDir, 'tremolode.sqlite');
    const db = openDatabase(file);
    closing.push(() => db.destroy());
    const { id } = (await db('people').first('id')) as { id: string };
    const at = new Date().toISOString();
    for (const event of ['one', 'two', 'three']) {
      await db('mail_messages').insert({
        id: event,
        event_id: event,
        recipient_id: id,
        thread_id: 't',
        recipient_name: 'Administrator',
        recipient_address: 'administrator@fennmark.example',
        subject: event,
        content: '{"paragraphs":["One paragraph."]}',
        created_at: at,
        due_at: at,
      });
    }
    await reached;
    await production.kill();
    holdBack = false;
    await production.restart();
    const deadline = Date.now() + 40_000;
    while ((await db('mail_messages').where({ state: 'sent' })).length < 3) {
      if (Date.now() > deadline) throw new Error(JSON.stringify(await db('mail_messages').select('*')));
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    expect([...received].sort()).toEqual(['one', 'three', 'two'].map((event) => `<${event}.${id}@localhost.example>`));
  });
});
