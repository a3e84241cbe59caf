import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Knex } from 'knex';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { migrationSource, migrations } from '#migrations';
import { verifyAudit, appendAudit } from '#server/audit';
import { migrateToLatest, openDatabase } from '#server/db';

let db: Knex;
beforeEach(() => {
  db = openDatabase(':memory:');
});
afterEach(() => db.destroy());

const names = Object.keys(migrations);
const ours = (query: Knex.QueryBuilder) =>
  query.whereNot('name', 'like', 'sqlite_%').whereNot('name', 'like', 'migrations%');
/** Everything that the database is made of, as SQL. */
const schema = async (): Promise<string[]> =>
  (await ours(db('sqlite_master')).orderBy(['type', 'name']).select('type', 'name', 'sql')).map(
    ({ type, name, sql }: Record<string, string>) => `${type} ${name}: ${sql}`,
  );
const tables = (): Promise<string[]> => ours(db('sqlite_master').where({ type: 'table' })).pluck('name');
const upOne = () => db.migrate.up();
const downOne = () => db.migrate.down();

describe('every migration', () => {
  test('stands in its order under a name without an extension', () => {
    expect(names).toEqual([...names].sort());
    names.forEach((name, index) => expect(name).toMatch(new RegExp(`^${String(index + 1).padStart(4, '0')}-[a-z-]+$`)));
  });

  test('up, down and up again gives the same database; all down leaves nothing', async () => {
    const after: string[][] = [await schema()];
    for (const _name of names) {
      await upOne();
      after.push(await schema());
    }
    for (let level = names.length; level > 0; level -= 1) {
      expect(await schema()).toEqual(after[level]);
      await downOne();
      expect(await schema()).toEqual(after[level - 1]);
    }
    expect(await schema()).toEqual([]);
    expect(await migrateToLatest(db)).toEqual(names);
    expect(await schema()).toEqual(after[names.length]);
    expect(await migrateToLatest(db)).toEqual([]);
  });

  test('keeps people, sessions, the audit trail and mail, on the way up and down', async () => {
    const early = 3;
    for (let level = 0; level < early; level += 1) await upOne();
    await db('people').insert({
      id: 'p1',
      name: 'Ida Brandt',
      email: 'ida@fennmark.example',
      password_hash: 'x',
      created_at: '2027-03-01T08:00:00.000Z',
    });
    await db('person_roles').insert({ person_id: 'p1', role: 'designer' });
    await db('sessions').insert({
      digest: 's1',
      person_id: 'p1',
      content: '{}',
      expires_at: '2027-03-02T08:00:00.000Z',
    });
    await db('mail_messages').insert({
      id: 'm1',
      event_id: 'e1',
      recipient_id: 'p1',
      thread_id: 't1',
      recipient_name: 'Ida Brandt',
      recipient_address: 'ida@fennmark.example',
      subject: 'S',
      content: '{"paragraphs":[]}',
      created_at: '2027-03-01T08:00:00.000Z',
      due_at: '2027-03-01T08:00:00.000Z',
    });
    await db.transaction((trx) =>
      appendAudit(trx, {
        at: '2027-03-01T08:00:00.000Z',
        actorId: 'p1',
        action: 'created',
        subject: 'person',
        subjectId: 'p1',
        detail: {},
      }),
    );
    const kept = ['people', 'person_roles', 'sessions', 'mail_messages', 'audit_entries'];
    const content = () => Promise.all(kept.map((table) => db(table).select('*')));
    const before = await content();
    await migrateToLatest(db);
    expect(await content()).toEqual(before);
    for (let level = names.length; level > early; level -= 1) await downOne();
    expect(await content()).toEqual(before);
    await migrateToLatest(db);
    expect(await content()).toEqual(before);
    expect(await verifyAudit(db)).toMatchObject({ intact: true, entries: 1 });
  });

  test('that is not known is refused', () => {
    expect(() => migrationSource.getMigration('9999-unknown')).toThrow('There is no migration 9999-unknown.');
  });
});

describe('the latest database', () => {
  beforeEach(async () => {
    await migrateToLatest(db);
  });

  test('has strict tables only', async () => {
    const loose = (await db.raw("SELECT name FROM pragma_table_list WHERE schema = 'main' AND strict = 0")) as {
      name: string;
    }[];
    expect(loose.map(({ name }) => name).filter((name) => !/^(sqlite_|migrations)/.test(name))).toEqual([]);
  });

  test('restricts on every foreign key: nothing is removed behind anybody’s back', async () => {
    for (const table of await tables()) {
      const keys = (await db.raw(`PRAGMA foreign_key_list(${table})`)) as { on_delete: string; on_update: string }[];
      for (const { on_delete, on_update } of keys) {
        expect([table, on_delete]).toEqual([table, 'RESTRICT']);
        expect([table, 'NO ACTION', 'RESTRICT']).toContain(on_update);
      }
    }
    expect(await db.raw('PRAGMA foreign_key_check')).toEqual([]);
  });

  test('keeps plural names in snake case', async () => {
    for (const table of await tables()) expect(table).toMatch(/^[a-z]+(_[a-z]+)*s$|people/);
  });

  test('refuses words that the app does not know', async () => {
    const person = { id: 'p1', name: 'N', email: 'n@fennmark.example', password_hash: 'x', created_at: '2027' };
    await db('people').insert(person);
    await expect(db('person_roles').insert({ person_id: 'p1', role: 'king' })).rejects.toThrow('CHECK');
    await expect(db('person_roles').insert({ person_id: 'p2', role: 'bench' })).rejects.toThrow('FOREIGN KEY');
    await expect(db('people').insert({ ...person, id: 'p2', email: 'N@FENNMARK.EXAMPLE' })).rejects.toThrow('UNIQUE');
    await expect(db('people').update({ active: 2 })).rejects.toThrow('CHECK');
    await expect(db('people').update({ version: 'two' })).rejects.toThrow(/cannot store TEXT/);
  });
});

describe('a database file', () => {
  test('is opened with a write-ahead log, full syncing, foreign keys and patience', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'tremolode-db-'));
    const file = openDatabase(join(folder, 'deeper', 'tremolode.sqlite'));
    const pragma = async (name: string) => Object.values((await file.raw(`PRAGMA ${name}`))[0] as object)[0];
    expect(await pragma('journal_mode')).toBe('wal');
    expect(await pragma('synchronous')).toBe(2);
    expect(await pragma('foreign_keys')).toBe(1);
    expect(await pragma('busy_timeout')).toBe(5000);
    await file.destroy();
    rmSync(folder, { recursive: true });
  });
});
