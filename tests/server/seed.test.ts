import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Desk } from '#contracts/desk';
import { ReleaseRecord } from '#contracts/records';
import { Revision } from '#contracts/revisions';
import { Run } from '#contracts/runs';
import { verifyAudit } from '#server/audit';
import { seedDemo } from '#server/cli/seed';
import { estimatesHere } from '#server/jobs/estimate-here';
import { revisionStates, roles } from '#workflows/revision';
import { startTestServer } from '../support/server';
import type { TestServer } from '../support/server';

let server: TestServer;
let signIns: Awaited<ReturnType<typeof seedDemo>>['signIns'];
let cpuSeconds: number;
beforeAll(async () => {
  server = await startTestServer({ estimator: estimatesHere() });
  const before = process.cpuUsage();
  ({ signIns } = await seedDemo(server.deps));
  const { user, system } = process.cpuUsage(before);
  cpuSeconds = (user + system) / 1e6;
}, 120_000);
afterAll(() => server.close());

/** What the story left, without ids, which differ each time. */
const outline = async ({ db }: TestServer) =>
  db('revisions')
    .join('designs', 'designs.id', 'revisions.design_id')
    .orderBy('revisions.rowid')
    .select('number', 'letter', 'state', 'version', 'load_power', 'document_digest');

describe('the demonstration data', () => {
  it('takes less than twenty seconds of work', () => {
    expect(cpuSeconds).toBeLessThan(20);
  });

  it('has people of every role, all of them invented, who can sign in', async () => {
    expect(new Set(signIns.flatMap((person) => person.roles))).toEqual(new Set(roles));
    for (const { email, password } of signIns) {
      expect(email).toMatch(/@fennmark\.example$/);
      expect((await (await server.visitor()).signIn(email, password)).status).toBe(200);
    }
  });

  it('says of every brief that it is invented', async () => {
    const documents = await server.db('briefs').pluck<string[]>('document');
    expect(documents).toHaveLength(5);
    for (const document of documents) expect(document).toMatch(/Invented for demonstration/);
  });

  it('shows a revision in every state but for moments', async () => {
    const states = new Set((await outline(server)).map(({ state }) => state as string));
    expect(states).toEqual(new Set(revisionStates));
  });

  it('answers every page in the form of its contract', async () => {
    const agent = await server.visitor();
    await agent.signIn('idris.vane@fennmark.example', signIns[0]?.password);
    for (const id of await server.db('revisions').pluck<string[]>('id')) {
      expect(Revision.safeParse((await agent.get(`/api/revisions/${id}`)).body).error).toBeUndefined();
    }
    for (const id of await server.db('runs').pluck<string[]>('id')) {
      expect(Run.safeParse((await agent.get(`/api/runs/${id}`)).body).error).toBeUndefined();
    }
    for (const id of await server.db('records').pluck<string[]>('id')) {
      expect(ReleaseRecord.parse((await agent.get(`/api/records/${id}`)).body).intact).toBe(true);
    }
    expect(Desk.parse((await agent.get('/api/desk')).body).waitsForMe).not.toEqual([]);
  });

  it('has an instrument out of calibration, used with a reason, and a reading struck through', async () => {
    const readings = await server.db('readings').whereNotNull('out_of_calibration_reason');
    expect(readings).toHaveLength(1);
    expect(await server.db('reading_strikes')).toHaveLength(1);
  });

  it('leaves an intact audit trail in the order of its days, all of it in the past', async () => {
    expect(await verifyAudit(server.db)).toMatchObject({ intact: true });
    const times = await server
      .db('audit_entries')
      .whereNot({ action: 'signedIn' })
      .orderBy('sequence')
      .pluck<string[]>('at');
    expect(times).toEqual([...times].sort());
    expect((times.at(-1) ?? '') < new Date().toISOString()).toBe(true);
  });

  it('is the same story each time', async () => {
    const again = await startTestServer({ estimator: estimatesHere() });
    await seedDemo(again.deps);
    expect(await outline(again)).toEqual(await outline(server));
    await again.close();
  }, 120_000);
});
