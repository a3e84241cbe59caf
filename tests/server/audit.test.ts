import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Knex } from 'knex';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import type { AuditEntry } from '#contracts/audit';
import { appendAudit, verifyAudit } from '#server/audit';
import { migrateToLatest, openDatabase } from '#server/db';
import { programEnvironment } from '../support/environment';
import { startTestServer } from '../support/server';

const append = (db: Knex, subjectId: string, detail: Record<string, unknown> = { note: `about ${subjectId}` }) =>
  db.transaction((trx) =>
    appendAudit(trx, {
      at: '2027-03-01T08:00:00.000Z',
      actorId: null,
      action: 'changed',
      subject: 'thing',
      subjectId,
      detail,
    }),
  );

async function filled(file = ':memory:'): Promise<Knex> {
  const db = openDatabase(file);
  await migrateToLatest(db);
  for (const id of ['one', 'two', 'three', 'four', 'five']) await append(db, id);
  return db;
}

/** What somebody with the database file and time can do. */
async function withoutTriggers(db: Knex): Promise<void> {
  for (const trigger of ['never_updated', 'never_deleted', 'only_appended']) {
    await db.raw(`DROP TRIGGER audit_entries_${trigger}`);
  }
}

describe('the chain', () => {
  let db: Knex;
  beforeEach(async () => {
    db = await filled();
  });
  afterEach(() => db.destroy());
  const faultAfter = async (tamper: () => Promise<unknown>) => {
    await withoutTriggers(db);
    await tamper();
    const { intact, firstFault } = await verifyAudit(db);
    expect(intact).toBe(false);
    return firstFault;
  };

  test('as written is intact', async () => {
    const verification = await verifyAudit(db);
    expect(verification).toMatchObject({ intact: true, entries: 5, firstFault: null });
    expect(verification.lastHash).toMatch(/^[0-9a-f]{64}$/);
  });

  test('of nothing is intact', async () => {
    const empty = openDatabase(':memory:');
    await migrateToLatest(empty);
    expect(await verifyAudit(empty)).toEqual({ intact: true, entries: 0, firstFault: null, lastHash: null });
    await empty.destroy();
  });

  test.each([
    ['at', '2020-01-01T00:00:00.000Z'],
    ['action', 'released'],
    ['subject', 'revision'],
    ['subject_id', 'other'],
    ['detail', '{"note":"about threE"}'],
    ['hash', 'f'.repeat(64)],
  ])('shows an altered %s', async (column, value) => {
    const fault = await faultAfter(() =>
      db('audit_entries')
        .where({ sequence: 3 })
        .update({ [column]: value }),
    );
    expect(fault).toEqual({ sequence: 3, what: 'Its content does not match its hash.' });
  });

  test('shows an altered entry even with its own hash made anew', async () => {
    const fault = await faultAfter(async () => {
      const other = await filled();
      await withoutTriggers(other);
      await other('audit_entries').where('sequence', '>=', 3).delete();
      await append(other, 'forged');
      const forged = await other('audit_entries').where({ sequence: 3 }).first();
      await other.destroy();
      await db('audit_entries').where({ sequence: 3 }).update(forged);
    });
    expect(fault).toEqual({ sequence: 4, what: 'It does not follow from the entry before it.' });
  });

  test('shows a removed entry', async () => {
    const fault = await faultAfter(() => db('audit_entries').where({ sequence: 2 }).delete());
    expect(fault).toEqual({ sequence: 2, what: 'Entry 2 is missing.' });
  });

  test('shows a removed beginning and a removed end', async () => {
    await withoutTriggers(db);
    await db('audit_entries').where({ sequence: 5 }).delete();
    expect((await verifyAudit(db)).firstFault).toEqual({ sequence: 5, what: 'Entry 5 and what followed are missing.' });
    await db('audit_entries').where({ sequence: 1 }).delete();
    expect((await verifyAudit(db)).firstFault).toEqual({ sequence: 1, what: 'Entry 1 is missing.' });
  });

  test('shows two entries that changed places', async () => {
    const fault = await faultAfter(async () => {
      await db('audit_entries').where({ sequence: 2 }).update({ sequence: 99 });
      await db('audit_entries').where({ sequence: 3 }).update({ sequence: 2 });
      await db('audit_entries').where({ sequence: 99 }).update({ sequence: 3 });
    });
    expect(fault?.sequence).toBe(2);
  });

  test('goes on over more entries than are read at a time', async () => {
    for (let entry = 0; entry < 1100; entry += 1) await append(db, `entry ${entry}`);
    expect(await verifyAudit(db)).toMatchObject({ intact: true, entries: 1105 });
  });

  test('with a step that fails keeps nothing of it', async () => {
    await expect(
      db.transaction(async (trx) => {
        await appendAudit(trx, {
          at: '2027-03-01T08:00:00.000Z',
          actorId: null,
          action: 'changed',
          subject: 'thing',
          subjectId: 'six',
          detail: {},
        });
        throw new Error('the step failed');
      }),
    ).rejects.toThrow('the step failed');
    expect(await verifyAudit(db)).toMatchObject({ intact: true, entries: 5 });
    await append(db, 'six');
    expect(await verifyAudit(db)).toMatchObject({ intact: true, entries: 6 });
  });

  test('refuses what JSON cannot say', async () => {
    await expect(append(db, 'six', { value: Number.NaN })).rejects.toThrow('JSON has no NaN.');
  });
});

describe('the database', () => {
  let db: Knex;
  beforeEach(async () => {
    db = await filled();
  });
  afterEach(() => db.destroy());

  test('refuses to change, remove or replace an entry, or to add one out of turn', async () => {
    const row = await db('audit_entries').where({ sequence: 2 }).first();
    await expect(db('audit_entries').update({ action: 'x' })).rejects.toThrow('audit entries are never changed');
    await expect(db('audit_entries').delete()).rejects.toThrow('audit entries are never removed');
    await expect(
      db.raw(
        `INSERT OR REPLACE INTO audit_entries SELECT sequence, at, actor_id, 'x', subject, subject_id, detail, previous_hash, hash
         FROM audit_entries WHERE sequence = 2`,
      ),
    ).rejects.toThrow('audit entries are only appended');
    const { hash: previous_hash } = await db('audit_entries').where({ sequence: 5 }).first();
    const next = { ...row, sequence: 7, previous_hash, hash: 'e'.repeat(64) };
    await expect(db('audit_entries').insert(next)).rejects.toThrow('audit entries are only appended');
    await expect(db('audit_entries').insert({ ...row, sequence: 6, hash: 'e'.repeat(64) })).rejects.toThrow(
      'audit entries are only appended',
    );
    expect(await verifyAudit(db)).toMatchObject({ intact: true, entries: 5 });
  });
});

test('the list comes newest first, in pages, with names', async () => {
  const server = await startTestServer();
  const administrator = await server.as('administrator');
  await append(server.db, 'one');
  await append(server.db, 'two');
  const first = await administrator.get('/api/audit?limit=2');
  const entries = first.body.entries as AuditEntry[];
  expect(entries.map(({ sequence, subjectId, by }) => [sequence, subjectId, by])).toEqual([
    [3, 'two', null],
    [2, 'one', null],
  ]);
  expect(entries[0]?.detail).toEqual({ note: 'about two' });
  const second = await administrator.get(`/api/audit?limit=2&before=${entries[1]?.sequence}`);
  const [signedIn] = second.body.entries as AuditEntry[];
  expect(signedIn).toMatchObject({ sequence: 1, action: 'signedIn', by: { id: administrator.personId } });
  expect((await administrator.get('/api/audit/verification')).body).toMatchObject({ intact: true, entries: 3 });
  await server.close();
});

describe('npm run verify-audit', () => {
  let folder: string;
  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'tremolode-audit-'));
  });
  afterEach(() => rmSync(folder, { recursive: true }));
  const verify = () =>
    spawnSync('npm', ['run', '--silent', 'verify-audit'], {
      encoding: 'utf8',
      env: programEnvironment({ DATA_DIR: folder }),
    });

  test('says that all is well, and names the first fault with exit code 1', async () => {
    const db = await filled(join(folder, 'tremolode.sqlite'));
    const { lastHash } = await verifyAudit(db);
    const good = verify();
    expect([good.stderr, good.status, good.stdout]).toEqual([
      '',
      0,
      `The audit trail is intact: 5 entries, last hash ${lastHash}.\n`,
    ]);
    await withoutTriggers(db);
    await db('audit_entries').where({ sequence: 4 }).update({ detail: '{}' });
    await db.destroy();
    const bad = verify();
    expect(bad.status).toBe(1);
    expect(bad.stderr).toContain('Entry 4: Its content does not match its hash.');
  });
});
