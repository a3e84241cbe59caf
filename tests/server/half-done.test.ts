import type { Knex } from 'knex';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Revision } from '#contracts/revisions';
import { verifyAudit } from '#server/audit';
import type { TestAgent } from '../support/server';
import { addInstrument, bringTo, read, reading, sendRaw, startTeam, takeReadings } from '../support/way';
import type { Team } from '../support/way';

let team: Team;
beforeAll(async () => {
  team = await startTeam();
});
afterAll(() => team.close());

/** Everything stored but sessions, which every request touches. */
async function contents(db: Knex): Promise<Record<string, unknown[]>> {
  const tables = (await db('sqlite_master').where({ type: 'table' }).pluck<string[]>('name')).filter(
    (name) => !/^sqlite_|^migrations|^sessions$/.test(name),
  );
  const rows: Record<string, unknown[]> = {};
  for (const table of tables) rows[table] = await db(table).orderBy('rowid');
  return rows;
}

/** From here on, whatever is written to the table is the last thing the process does. */
async function dieAfterWriting(db: Knex, table: string): Promise<() => Promise<void>> {
  for (const write of ['INSERT', 'UPDATE']) {
    await db.raw(
      `CREATE TEMP TRIGGER die_${write} AFTER ${write} ON main.${table} BEGIN SELECT RAISE(ABORT, 'the process dies here'); END`,
    );
  }
  return async () => {
    for (const write of ['INSERT', 'UPDATE']) await db.raw(`DROP TRIGGER temp.die_${write}`);
  };
}

interface Case {
  what: string;
  from: Revision['state'];
  agent: () => TestAgent | Promise<TestAgent>;
  /** Tables that the step writes to, in any order. */
  writes: string[];
  act?: (agent: TestAgent, page: Revision) => Promise<{ status: number }>;
  prepare?: (page: Revision) => Promise<unknown>;
}

const always = ['revisions', 'audit_entries', 'mail_messages'];
const cases: Case[] = [
  { what: 'submit', from: 'draft', agent: () => team.designer, writes: always },
  { what: 'remark', from: 'inReview', agent: () => team.reviewer, writes: [...always, 'remarks'] },
  {
    what: 'closeRemark',
    from: 'inReview',
    agent: () => team.designer,
    prepare: async (page) => sendRaw(team.reviewer, await read(team.reviewer, page.id), 'remark'),
    writes: [...always, 'remarks'],
  },
  { what: 'approve', from: 'inReview', agent: () => team.reviewer, writes: [...always, 'signatures'] },
  { what: 'requestChanges', from: 'inReview', agent: () => team.reviewer, writes: always },
  {
    what: 'rework',
    from: 'changesRequested',
    agent: () => team.designer,
    writes: ['revisions', 'audit_entries', 'revision_authors'],
  },
  { what: 'abandon', from: 'inReview', agent: () => team.authority, writes: always },
  {
    what: 'startRun',
    from: 'clearedForBench',
    agent: () => team.bench,
    writes: [...always, 'runs', 'number_sequences'],
  },
  { what: 'stopRun', from: 'onBench', agent: () => team.bench, writes: [...always, 'runs'] },
  {
    what: 'signResult',
    from: 'onBench',
    agent: () => team.bench,
    prepare: (page) => takeReadings(team.bench, page),
    writes: [...always, 'runs', 'signatures'],
  },
  { what: 'retest', from: 'nonconforming', agent: () => team.bench, writes: always },
  { what: 'grantConcession', from: 'nonconforming', agent: () => team.authority, writes: [...always, 'signatures'] },
  { what: 'returnToBench', from: 'releaseReview', agent: () => team.authority, writes: always },
  {
    what: 'release',
    from: 'releaseReview',
    agent: () => team.authority,
    writes: [...always, 'signatures', 'records', 'number_sequences'],
  },
  { what: 'recall', from: 'released', agent: () => team.authority, writes: [...always, 'signatures'] },
];

async function savesDraft(agent: TestAgent, { id, version }: Revision): Promise<{ status: number }> {
  return agent.put(`/api/revisions/${id}/document`, { version, document: { title: 'Half typed' } });
}

const others: Case[] = [
  {
    what: 'saving a draft',
    from: 'draft',
    agent: () => team.designer,
    act: savesDraft,
    writes: ['revisions', 'audit_entries'],
  },
  {
    what: 'the first save by another designer',
    from: 'draft',
    agent: () => team.server.as('designer'),
    act: savesDraft,
    writes: ['revisions', 'audit_entries', 'revision_authors'],
  },
  {
    what: 'entering a reading',
    from: 'onBench',
    agent: () => team.bench,
    act: async (agent, { runs }) =>
      agent.post(`/api/runs/${runs[0]?.id ?? ''}/readings`, reading(await instrumentId(), { note: 'half done' })),
    writes: ['revisions', 'audit_entries', 'readings'],
  },
];

let instrument: string | null = null;
const instrumentId = async (): Promise<string> => (instrument ??= await addInstrument(team.bench));

describe('when the process dies in the middle of a step, nothing of it is left', () => {
  it.each([...cases, ...others])('$what', async ({ what, from, agent, writes, act, prepare }) => {
    const { db } = team.server;
    await instrumentId();
    const start = await bringTo(team, from);
    await prepare?.(start);
    const who = await agent();
    const page = await read(who, start.id);
    const before = await contents(db);
    for (const table of writes) {
      const revive = await dieAfterWriting(db, table);
      const answer = await (act?.(who, page) ?? sendRaw(who, page, what));
      await revive();
      expect(answer.status, `${what} dies after ${table}`).toBe(500);
      expect(await contents(db), `${what} dies after ${table}`).toEqual(before);
    }
    const answer = await (act?.(who, page) ?? sendRaw(who, page, what));
    expect(answer.status).toBeLessThan(300);
    const after = await contents(db);
    const grown = Object.keys(after).filter((table) => after[table]?.length !== before[table]?.length);
    expect(writes).toEqual(expect.arrayContaining(grown));
    const news = after['audit_entries']?.length ?? 0;
    expect(news - (before['audit_entries']?.length ?? 0)).toBe(what === 'rework' ? 2 : 1);
    expect(await verifyAudit(db)).toMatchObject({ intact: true });
  });
});
