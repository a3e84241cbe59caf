import { randomUUID } from 'node:crypto';
import { expect } from 'vitest';
import type { z } from 'zod';
import { Brief } from '#contracts/briefs';
import { Design } from '#contracts/designs';
import { Instrument } from '#contracts/instruments';
import { Revision } from '#contracts/revisions';
import { Run } from '#contracts/runs';
import { estimatesHere } from '#server/jobs/estimate-here';
import type { Role } from '#workflows/revision';
import { startTestServer, testPassword } from './server';
import type { TestAgent, TestServer } from './server';

/** Requirement ids are fixed so that readings can be addressed. */
export const powerRequirement = '6f1c2a52-7a0f-4c53-9c0e-0b8f5c1d2a01';
export const resistanceRequirement = '6f1c2a52-7a0f-4c53-9c0e-0b8f5c1d2a02';

/** A brief that the reference device meets, as the client sends it. */
export const pumpBrief = (changes: Record<string, unknown> = {}): Record<string, unknown> => ({
  title: 'Bearing watch on feed pump 3',
  machine: 'Feed pump, 2950 rpm',
  place: 'Drive-end bearing housing',
  customerContact: '',
  vibration: { kind: 'tone', frequency: '50 Hz', acceleration: '1 m/s^2', as: 'peak' },
  powerNeeded: 1e-3,
  loadNote: '',
  envelope: { shape: 'cylinder', diameter: 0.03, length: 0.06 },
  massLimit: 0.2,
  temperature: { lowest: 0, highest: 60 },
  lifeCycles: null,
  orientation: 'any',
  requirements: [
    {
      id: powerRequirement,
      title: 'Power into the load',
      quantity: 'loadPower',
      comparison: 'atLeast',
      limit: 1e-3,
      unit: 'mW',
      shownBy: 'both',
    },
    {
      id: resistanceRequirement,
      title: 'Coil resistance',
      quantity: 'coilResistance',
      comparison: 'atMost',
      limit: 150,
      unit: 'Ω',
      shownBy: 'bench',
    },
    {
      id: '6f1c2a52-7a0f-4c53-9c0e-0b8f5c1d2a03',
      title: 'Travel',
      quantity: 'displacementPeak',
      comparison: 'atMost',
      limit: 5e-3,
      unit: 'mm',
      shownBy: 'estimate',
    },
  ],
  notes: '',
  ...changes,
});

/** The reference device as an engineer types it. */
export const referenceDesign = (changes: Record<string, unknown> = {}): Record<string, unknown> => ({
  format: 'tremolode-design/1',
  title: 'Pump-side',
  layout: 'through',
  magnets: [{ shape: 'cylinder', outerDiameter: '10 mm', length: '10 mm', at: 0, polarity: 1, material: 'NdFeB N42' }],
  coils: [
    {
      shape: 'round',
      innerDiameter: '12 mm',
      outerDiameter: '18 mm',
      length: '6 mm',
      at: '-5.567299 mm',
      turns: 1000,
      sense: 1,
      wire: { diameter: '0.1 mm', overallDiameter: '0.117 mm' },
    },
  ],
  movingMass: { total: '25 g' },
  suspension: { kind: 'spring', stiffness: '2467.4011 N/m' },
  damping: { quality: 150 },
  circuit: { kind: 'resistor', resistance: '804.16 ohm' },
  ...changes,
});

/** A team on a running server, and the steps of the way in the words of the tests. */
export interface Team {
  server: TestServer;
  designer: TestAgent;
  reviewer: TestAgent;
  bench: TestAgent;
  authority: TestAgent;
  observer: TestAgent;
  administrator: TestAgent;
  close(): Promise<void>;
}

export async function startTeam(overrides: Parameters<typeof startTestServer>[0] = {}): Promise<Team> {
  const server = await startTestServer({ estimator: estimatesHere(), ...overrides });
  const one = (role: Role) => server.as(role);
  return {
    server,
    designer: await one('designer'),
    reviewer: await one('reviewer'),
    bench: await one('bench'),
    authority: await one('releaseAuthority'),
    observer: await one('observer'),
    administrator: await one('administrator'),
    close: () => server.close(),
  };
}

/** The answer of a request that must be accepted, in exactly the form of its contract. */
async function good<Schema extends z.ZodType>(schema: Schema, sent: PromiseLike<unknown>): Promise<z.output<Schema>> {
  const { status, body } = (await sent) as { status: number; body: unknown };
  if (status >= 300) throw new Error(`${status}: ${JSON.stringify(body)}`);
  return schema.parse(body);
}

export const createBrief = (agent: TestAgent, changes?: Record<string, unknown>) =>
  good(Brief, agent.post('/api/briefs', pumpBrief(changes)));

/** A design with the reference device as draft of revision A; returns the revision. */
export async function createDraft(
  agent: TestAgent,
  { brief, document = referenceDesign() }: { brief?: Brief; document?: Record<string, unknown> } = {},
): Promise<Revision> {
  const { id: briefId } = brief ?? (await createBrief(agent));
  const design = await good(Design, agent.post('/api/designs', { title: 'Pump-side node', briefId, document }));
  const [line] = design.revisions;
  expect(line?.letter).toBe('A');
  return read(agent, line?.id ?? '');
}

export const read = (agent: TestAgent, id: string) => good(Revision, agent.get(`/api/revisions/${id}`));
export const readRun = (agent: TestAgent, id: string) => good(Run, agent.get(`/api/runs/${id}`));

/** What each event carries besides type and version, good enough to be accepted. */
export function bodyOf(type: string, { digest, remarks, runs }: Revision): Record<string, unknown> {
  const signed = { password: testPassword, signedDigest: digest };
  const reason = 'Because the test says so.';
  switch (type) {
    case 'submit':
      return {};
    case 'remark':
      return { text: 'Is the coil former in the drawing?', blocking: false, target: 'coils.0.innerDiameter' };
    case 'closeRemark':
      return { remarkId: remarks.find(({ closed }) => closed === null)?.id ?? randomUUID(), answer: 'It is.' };
    case 'approve':
      return signed;
    case 'startRun':
      return { specimen: `SN ${runs.length + 1}` };
    case 'signResult':
      return { ...signed, result: 'conforming', statement: 'As read.' };
    case 'grantConcession':
      return { ...signed, shortfall: '0.2 mW too little', reason };
    case 'release':
      return { ...signed, statement: 'For the pilot batch.' };
    case 'recall':
      return { ...signed, reason };
    default:
      return { reason };
  }
}

/** Sends an event as it stands on the page and returns the raw answer. */
export const sendRaw = (agent: TestAgent, revision: Revision, type: string, changes: Record<string, unknown> = {}) =>
  agent.post(`/api/revisions/${revision.id}/events`, {
    type,
    version: revision.version,
    ...bodyOf(type, revision),
    ...changes,
  });

/** Reads the revision anew, sends the event, and expects it to be accepted. */
export async function send(
  agent: TestAgent,
  { id }: { id: string },
  type: string,
  changes?: Record<string, unknown>,
): Promise<Revision> {
  return good(Revision, sendRaw(agent, await read(agent, id), type, changes));
}

export async function addInstrument(agent: TestAgent, changes: Record<string, unknown> = {}): Promise<string> {
  const body = {
    name: 'Power analyser',
    serial: 'PA-1',
    location: 'Bench 1',
    calibrationDue: '2099-12-31',
    uncertainty: '0.5 % of reading, k = 2',
    ...changes,
  };
  return (await good(Instrument, agent.post('/api/instruments', body))).id;
}

export const reading = (instrumentId: string, changes: Record<string, unknown> = {}): Record<string, unknown> => ({
  requirementId: powerRequirement,
  quantity: 'Power into the load',
  value: 1.28e-3,
  unit: 'mW',
  instrumentId,
  outOfCalibrationReason: null,
  note: '',
  ...changes,
});

/** Enters one good reading for each line of the open run; `power` decides whether the run conforms. */
export async function takeReadings(agent: TestAgent, revision: Revision, power = 1.28e-3): Promise<Run> {
  const run = revision.runs.find(({ state }) => state === 'open');
  if (run === undefined) throw new Error('No run is open.');
  const instrumentId = await addInstrument(agent);
  const path = `/api/runs/${run.id}/readings`;
  await good(Run, agent.post(path, reading(instrumentId, { value: power })));
  return good(
    Run,
    agent.post(
      path,
      reading(instrumentId, {
        requirementId: resistanceRequirement,
        quantity: 'Coil resistance',
        value: 103,
        unit: 'Ω',
      }),
    ),
  );
}

/** Takes the shortest way to a state and returns the revision there, as its designer sees it. */
export async function bringTo(team: Team, state: Revision['state'], start?: Revision): Promise<Revision> {
  const { designer, reviewer, bench, authority } = team;
  const revision = start ?? (await createDraft(designer));
  const done = async (reached: Revision['state']): Promise<boolean> => {
    const now = await read(designer, revision.id);
    expect(now.state).toBe(reached);
    return reached === state;
  };
  const finish = () => read(designer, revision.id);
  if (state === 'abandoned') return send(designer, revision, 'abandon');
  if (await done('draft')) return finish();
  await send(designer, revision, 'submit');
  if (await done('inReview')) return finish();
  if (state === 'changesRequested' || state === 'reworked') {
    await send(reviewer, revision, 'requestChanges');
    if (state === 'reworked') await send(designer, revision, 'rework');
    return finish();
  }
  await send(reviewer, revision, 'approve');
  if (await done('clearedForBench')) return finish();
  const onBench = await send(bench, revision, 'startRun');
  if (await done('onBench')) return finish();
  await takeReadings(bench, onBench, state === 'nonconforming' ? 0.8e-3 : undefined);
  await send(bench, revision, 'signResult', state === 'nonconforming' ? { result: 'nonconforming' } : {});
  if (state === 'nonconforming') return finish();
  if (await done('releaseReview')) return finish();
  await send(authority, revision, 'release');
  if (await done('released')) return finish();
  if (state === 'recalled') {
    await send(authority, revision, 'recall');
    return finish();
  }
  const next = await send(designer, revision, 'rework');
  await bringTo(team, 'released', await latestOf(designer, next));
  await send(authority, revision, 'supersede');
  return finish();
}

/** The latest revision of the design that this one belongs to. */
export async function latestOf(agent: TestAgent, { design }: Revision): Promise<Revision> {
  const { revisions } = await good(Design, agent.get(`/api/designs/${design.id}`));
  return read(agent, revisions.at(-1)?.id ?? '');
}
