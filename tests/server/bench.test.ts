import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ErrorAnswer } from '#contracts/error';
import type { Instrument } from '#contracts/instruments';
import type { Revision } from '#contracts/revisions';
import { Run } from '#contracts/runs';
import {
  addInstrument,
  bringTo,
  powerRequirement,
  read,
  readRun,
  reading,
  resistanceRequirement,
  send,
  sendRaw,
  startTeam,
  takeReadings,
} from '../support/way';
import type { Team } from '../support/way';

let team: Team;
let instrument: string;
beforeAll(async () => {
  team = await startTeam();
  instrument = await addInstrument(team.bench);
});
afterAll(() => team.close());

const errorOf = (response: { body: unknown }) => (response.body as ErrorAnswer).error;
const pathOf = (runId: string) => `/api/runs/${runId}/readings`;

async function openRun(): Promise<{ revision: Revision; run: Run }> {
  const revision = await bringTo(team, 'onBench');
  return { revision, run: await readRun(team.bench, revision.runs[0]?.id ?? '') };
}
const enter = async (run: Run, changes: Record<string, unknown> = {}): Promise<Run> => {
  const answer = await team.bench.post(pathOf(run.id), reading(instrument, changes));
  expect(answer.status, answer.text).toBe(201);
  return Run.parse(answer.body);
};

describe('a run', () => {
  it('has a line for each requirement of the submitted brief that the bench shows', async () => {
    const { run } = await openRun();
    expect(run.lines).toEqual([
      expect.objectContaining({ measured: null, readings: 0, margin: null, verdict: 'notComputed' }),
      expect.objectContaining({ measured: null, readings: 0, margin: null, verdict: 'notComputed' }),
    ]);
    expect(run).toMatchObject({ state: 'open', mayRecord: true, result: null, conditions: null });
  });

  it('judges the mean of the readings that stand', async () => {
    const { run } = await openRun();
    await enter(run, { value: 1.2e-3 });
    const two = await enter(run, { value: 1.4e-3 });
    expect(two.lines[0]?.readings).toBe(2);
    expect(two.lines[0]?.measured).toBeCloseTo(1.3e-3, 12);
    expect(two.lines[0]?.margin).toBeCloseTo(0.3e-3, 12);
    expect(two.lines[0]?.verdict).toBe('meets');
    const marginal = await enter(run, { value: 0.5e-3 });
    expect(marginal.lines[0]?.verdict).toBe('marginal');
    expect((await enter(run, { value: 0.1e-3 })).lines[0]?.verdict).toBe('fails');
  });

  it('takes each reading once it is entered; a strike leaves it visible, with who and why', async () => {
    const { run } = await openRun();
    const wrong = await enter(run, { value: 18.9e-3 });
    const [entered] = wrong.readings;
    const strikePath = `${pathOf(run.id)}/${entered?.id ?? ''}/strike`;
    expect((await team.bench.post(strikePath, { reason: ' ' })).status).toBe(422);
    const struck = await team.bench.post(strikePath, { reason: 'Wrong range.' });
    expect(struck.status).toBe(200);
    expect(Run.parse(struck.body).readings[0]).toMatchObject({
      value: 18.9e-3,
      struck: { reason: 'Wrong range.', by: { id: team.bench.personId } },
    });
    expect((struck.body as Run).lines[0]).toMatchObject({ measured: null, readings: 0 });
    expect((await team.bench.post(strikePath, { reason: 'Again.' })).status).toBe(409);
    expect((await team.bench.post(`${pathOf(run.id)}/${randomUUID()}/strike`, { reason: 'x' })).status).toBe(404);
  });

  it('moves the revision’s version with each reading, so that nobody signs past one', async () => {
    const { revision, run } = await openRun();
    await takeReadings(team.bench, revision);
    const page = await read(team.bench, revision.id);
    await enter(run, { value: 0.2e-3 });
    const stale = await sendRaw(team.bench, page, 'signResult');
    expect(stale.status).toBe(409);
    expect(errorOf(stale).changed?.[0]?.what).toMatch(/^Entered a reading of “Power into the load” in RUN-\d{4}\.$/);
  });

  it('is conforming only where every line meets', async () => {
    const { revision } = await openRun();
    await takeReadings(team.bench, revision, 0.9e-3);
    const page = await read(team.bench, revision.id);
    const refused = await sendRaw(team.bench, page, 'signResult', { result: 'conforming' });
    expect(refused.status).toBe(422);
    expect(errorOf(refused).issues?.[0]).toMatchObject({
      path: 'result',
      message: expect.stringMatching(/cannot be conforming/),
    });
    expect((await send(team.bench, revision, 'signResult', { result: 'nonconforming' })).state).toBe('nonconforming');
  });

  it('is not signed while a line has no reading', async () => {
    const { revision, run } = await openRun();
    await enter(run);
    const page = await read(team.bench, revision.id);
    expect(page.whyNot.signResult).toBe('Still without a reading: Coil resistance.');
    expect((await sendRaw(team.bench, page, 'signResult', { result: 'nonconforming' })).status).toBe(422);
  });

  it('once signed is closed for good', async () => {
    const { revision, run } = await openRun();
    await takeReadings(team.bench, revision);
    await send(team.bench, revision, 'signResult');
    const closed = await readRun(team.bench, run.id);
    expect(closed).toMatchObject({ state: 'signed', mayRecord: false, statement: 'As read.' });
    expect(closed.whyNotRecord).toMatch(/nothing in it changes/);
    expect((await team.bench.post(pathOf(run.id), reading(instrument))).status).toBe(409);
    const strike = `${pathOf(run.id)}/${closed.readings[0]?.id ?? ''}/strike`;
    expect((await team.bench.post(strike, { reason: 'Late.' })).status).toBe(409);
    const conditions = { temperature: 20, humidity: 40, fixture: '' };
    expect((await team.bench.put(`/api/runs/${run.id}/conditions`, conditions)).status).toBe(409);
  });

  it('keeps its conditions, and their limits are told', async () => {
    const { run } = await openRun();
    const path = `/api/runs/${run.id}/conditions`;
    const conditions = { temperature: 21.5, humidity: 38, fixture: 'Cube' };
    const stated = await team.bench.put(path, conditions);
    expect(Run.parse(stated.body).conditions).toEqual(conditions);
    expect((stated.body as Run).revision.digest).not.toBe(run.revision.digest);
    const refused = await team.bench.put(path, { ...conditions, humidity: 140 });
    expect(refused.status).toBe(422);
    expect(errorOf(refused).issues).toEqual([{ path: 'humidity', value: 140, message: 'At most 100 %.', limit: 100 }]);
  });

  it('offers its steps on the open run only', async () => {
    const { revision, run } = await openRun();
    await send(team.bench, revision, 'stopRun');
    const again = await send(team.bench, revision, 'startRun');
    const second = again.runs.at(-1)?.id ?? '';
    expect((await readRun(team.bench, second)).availableEvents).toEqual(['stopRun']);
    expect((await readRun(team.bench, run.id)).availableEvents).toEqual([]);
  });

  it('is listed with what waits for one', async () => {
    const cleared = await bringTo(team, 'clearedForBench');
    const { run } = await openRun();
    const { body } = await team.reviewer.get('/api/runs');
    const lists = body as { runs: { id: string; number: string }[]; cleared: { revisionId: string }[] };
    expect(lists.runs[0]?.id).toBe(run.id);
    expect(lists.cleared.map(({ revisionId }) => revisionId)).toContain(cleared.id);
  });
});

describe('a reading that cannot be taken', () => {
  const faults: [string, Record<string, unknown>, { path: string; limit?: string | number }][] = [
    ['of a requirement of another brief', { requirementId: randomUUID() }, { path: 'requirementId' }],
    ['in a unit of another quantity', { unit: 'mm' }, { path: 'unit' }],
    ['that is no number', { value: '1.2' }, { path: 'value' }],
    ['that is out of all bounds', { value: 1e300 }, { path: 'value', limit: 1e15 }],
    ['with an unknown instrument', { instrumentId: randomUUID() }, { path: 'instrumentId' }],
    ['without a quantity', { quantity: ' ' }, { path: 'quantity', limit: 1 }],
    ['with an unknown key', { colour: 'red' }, { path: 'colour' }],
    ['with a value absent', { value: undefined }, { path: 'value' }],
  ];
  it.each(faults)('%s is refused at its field', async (_what, changes, { path, limit }) => {
    const { run } = await openRun();
    const refused = await team.bench.post(pathOf(run.id), reading(instrument, changes));
    expect(refused.status).toBe(422);
    const issue = errorOf(refused).issues?.find((each) => each.path === path);
    expect(issue, refused.text).toBeDefined();
    if (limit !== undefined) expect(issue?.limit).toBe(limit);
    expect((await readRun(team.bench, run.id)).readings).toEqual([]);
  });

  it('may stand beside the lines, without a requirement', async () => {
    const { run } = await openRun();
    const extra = await enter(run, { requirementId: null, quantity: 'Sound level', unit: 'dB', value: 61 });
    expect(extra.readings[0]).toMatchObject({ requirementId: null, quantity: 'Sound level' });
    expect(extra.lines.every(({ readings }) => readings === 0)).toBe(true);
  });

  it('of an estimate-only requirement belongs to no line', async () => {
    const { run } = await openRun();
    const requirementId = '6f1c2a52-7a0f-4c53-9c0e-0b8f5c1d2a03';
    const refused = await team.bench.post(pathOf(run.id), reading(instrument, { requirementId, unit: 'mm' }));
    expect(refused.status).toBe(422);
    expect([powerRequirement, resistanceRequirement]).not.toContain(requirementId);
  });
});

describe('an instrument out of calibration', () => {
  it('is used only with the reason said, which is kept', async () => {
    const { run } = await openRun();
    const old = await addInstrument(team.bench, { name: 'Oscilloscope', calibrationDue: '2020-02-29' });
    const refused = await team.bench.post(pathOf(run.id), reading(old));
    expect(refused.status).toBe(422);
    expect(errorOf(refused).issues?.[0]).toMatchObject({ path: 'outOfCalibrationReason', limit: '2020-02-29' });
    expect((await team.bench.post(pathOf(run.id), reading(old, { outOfCalibrationReason: '  ' }))).status).toBe(422);
    const taken = await team.bench.post(pathOf(run.id), reading(old, { outOfCalibrationReason: 'Cross-check only.' }));
    expect(taken.status).toBe(201);
    expect((taken.body as Run).readings[0]?.outOfCalibrationReason).toBe('Cross-check only.');
  });

  it('is one from the day after the due date on, in UTC', async () => {
    let time = new Date('2027-03-31T23:59:59Z');
    const clocked = await startTeam({ now: () => time });
    const due = await addInstrument(clocked.bench, { calibrationDue: '2027-03-31' });
    const revision = await bringTo(clocked, 'onBench');
    const path = pathOf(revision.runs[0]?.id ?? '');
    expect((await clocked.bench.post(path, reading(due))).status).toBe(201);
    time = new Date('2027-04-01T00:00:00Z');
    expect((await clocked.bench.post(path, reading(due))).status).toBe(422);
    const listed = (await clocked.bench.get('/api/instruments')).body as { instruments: Instrument[] };
    expect(listed.instruments[0]).toMatchObject({ inCalibration: false, calibrationDue: '2027-03-31' });
    await clocked.close();
  });

  it('calibrated again later does not make earlier readings better', async () => {
    const { run } = await openRun();
    const old = await addInstrument(team.bench, { calibrationDue: '2020-02-29' });
    await team.bench.post(pathOf(run.id), reading(old, { outOfCalibrationReason: 'None other free.' }));
    const change = {
      version: 1,
      name: 'Power analyser',
      serial: 'PA-1',
      location: '',
      calibrationDue: '2099-01-01',
      uncertainty: '',
    };
    expect((await team.bench.put(`/api/instruments/${old}`, change)).status).toBe(200);
    expect((await readRun(team.bench, run.id)).readings[0]?.outOfCalibrationReason).toBe('None other free.');
    const row = await team.server.db('readings').where({ run_id: run.id }).first<{ calibration_due: string }>();
    expect(row.calibration_due).toBe('2020-02-29');
    const stale = await team.bench.put(`/api/instruments/${old}`, change);
    expect(stale.status).toBe(409);
    expect(errorOf(stale).changed).toHaveLength(1);
  });

  it.each([
    ['2027-02-30', 'calibrationDue'],
    ['soon', 'calibrationDue'],
  ])('a due date such as %s is refused', async (calibrationDue, path) => {
    const body = { name: 'Meter', serial: '1', location: '', calibrationDue, uncertainty: '' };
    const refused = await team.bench.post('/api/instruments', body);
    expect(refused.status).toBe(422);
    expect(errorOf(refused).issues?.[0]).toMatchObject({ path, value: calibrationDue });
  });
});
