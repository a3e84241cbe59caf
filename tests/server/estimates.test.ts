import { createServer, request as httpRequest } from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ErrorAnswer } from '#contracts/error';
import { Estimate } from '#contracts/estimates';
import { DomainError } from '#server/errors';
import { estimatesHere } from '#server/jobs/estimate-here';
import { estimatesInThreads } from '#server/jobs/estimate-pool';
import { rememberEstimates } from '#server/jobs/remembered-estimates';
import { pumpBrief, referenceDesign, startTeam } from '../support/way';
import type { Team } from '../support/way';

const { vibration } = pumpBrief();
const ask = (changes: Record<string, unknown> = {}) => ({ design: referenceDesign(), vibration, ...changes });

describe('the estimate route', () => {
  let team: Team;
  beforeAll(async () => {
    team = await startTeam();
  });
  afterAll(() => team.close());

  it('answers one estimate in the form of the contract', async () => {
    const { status, body } = await team.reviewer.post('/api/estimates', ask());
    expect(status).toBe(200);
    const estimate = Estimate.parse(body);
    expect(estimate.response.loadPower).toBeCloseTo(1.2978e-3, 4);
    expect(estimate.curve.position?.length).toBeGreaterThan(10);
    const quiet = await team.reviewer.post('/api/estimates', ask({ quietArrays: true, positions: [0, 0.001] }));
    expect(Estimate.parse(quiet.body)).toMatchObject({ waveforms: null });
  });

  const coil = (referenceDesign()['coils'] as object[])[0];
  it.each([
    ['no design', { design: undefined }, 'design'],
    ['a design that is a text', { design: 'magnet' }, 'design'],
    [
      'two coils, the second faulty',
      { design: referenceDesign({ coils: [coil, { ...coil, turns: -1 }] }) },
      'design.coils.1.turns',
    ],
    [
      'a faulty vibration',
      { vibration: { kind: 'tone', frequency: 50, acceleration: 1, as: 'average' } },
      'vibration.as',
    ],
    ['positions without end', { positions: Array.from({ length: 2002 }, () => 0) }, 'positions'],
    ['an unknown key', { colour: 'red' }, 'colour'],
    [
      'a magnet larger than the bore',
      { design: referenceDesign({ coils: [{ ...coil, innerDiameter: '9.9 mm' }] }) },
      'design.magnets.0.outerDiameter',
    ],
  ])('with %s answers 422 and says where', async (_what, changes, path) => {
    const { status, body } = await team.designer.post('/api/estimates', ask(changes));
    expect(status).toBe(422);
    const issue = (body as ErrorAnswer).error.issues?.find((each) => each.path === path);
    expect(issue, JSON.stringify(body)).toBeDefined();
    expect(issue?.message).not.toBe('');
  });

  it('tells value and limit of what is too much', async () => {
    const design = referenceDesign({ coils: [{ ...coil, turns: 1e9 }] });
    const { body } = await team.designer.post('/api/estimates', ask({ design }));
    expect((body as ErrorAnswer).error.issues?.[0]).toMatchObject({ path: 'design.coils.0.turns', value: 1e9 });
    expect((body as ErrorAnswer).error.issues?.[0]?.limit).toBeGreaterThan(1000);
  });

  it('takes the estimate back when the client goes away', async () => {
    let signal: AbortSignal | undefined;
    let started: () => void = () => undefined;
    const begun = new Promise<void>((resolve) => (started = resolve));
    const ended = new Promise<void>((resolve) => {
      void begun.then(() => signal?.addEventListener('abort', () => resolve()));
    });
    const leaving = await startTeam({
      estimator: {
        ...estimatesHere(),
        estimate: (_request, given) =>
          new Promise((_resolve, reject) => {
            signal = given;
            started();
            given?.addEventListener('abort', () => reject(Object.assign(new Error('gone'), { name: 'AbortError' })));
          }),
      },
    });
    const server = createServer(leaving.server.app).listen(0);
    const { port } = server.address() as AddressInfo;
    const signedIn = await leaving.designer.get('/api/session');
    const sent = httpRequest({
      port,
      path: '/api/estimates',
      method: 'POST',
      headers: {
        'content-type': 'application/json',
        cookie: (signedIn.request as unknown as { cookies: string }).cookies,
        'x-csrf-token': (signedIn.body as { csrfToken: string }).csrfToken,
      },
    });
    sent.on('error', () => undefined);
    sent.end(JSON.stringify(ask()));
    await begun;
    sent.destroy();
    await ended;
    expect(signal?.aborted).toBe(true);
    server.closeAllConnections();
    server.close();
    await leaving.close();
  });
});

describe('worker threads', () => {
  const pool = estimatesInThreads();
  afterAll(() => pool.close());

  it('give the same estimate as the calling thread, bit for bit', async () => {
    const here = estimatesHere();
    expect(await pool.estimate(ask())).toEqual(await here.estimate(ask()));
  });

  it('tell what is wrong with a document in the same words', async () => {
    const faulty = ask({ design: referenceDesign({ coils: [] }) });
    const caught = async (estimates: Promise<unknown>) => {
      const error: unknown = await estimates.catch((reason: unknown) => reason);
      expect(error).toBeInstanceOf(DomainError);
      return (error as DomainError).issues;
    };
    expect(await caught(pool.estimate(faulty))).toEqual(await caught(estimatesHere().estimate(faulty)));
  });

  it('leave the queue at once when nobody waits any more, and the next one runs', async () => {
    const titled = (title: string) => ask({ design: referenceDesign({ title }) });
    const gone = new AbortController();
    const many = ['a', 'b', 'c', 'd'].map((title) => pool.estimate(titled(title), gone.signal));
    gone.abort();
    const outcomes = await Promise.allSettled(many);
    expect(outcomes.map(({ status }) => status)).toEqual(['rejected', 'rejected', 'rejected', 'rejected']);
    expect((outcomes[0] as PromiseRejectedResult).reason).toMatchObject({ name: 'AbortError' });
    await expect(pool.estimate(titled('e'), AbortSignal.abort())).rejects.toMatchObject({ name: 'AbortError' });
    expect((await pool.estimate(titled('f'))).response.converged).toBe(true);
  });

  it('leave the server free to answer meanwhile', async () => {
    const spectrum = {
      kind: 'spectrum',
      points: [
        ['5 Hz', 0.002],
        ['200 Hz', 0.002],
      ],
      unit: 'g^2/Hz',
      duration: '4 s',
      seed: 3,
    };
    let ticks = 0;
    const ticking = setInterval(() => (ticks += 1), 5);
    await Promise.all([1, 2, 3].map((seed) => pool.estimate(ask({ vibration: { ...spectrum, seed } }))));
    clearInterval(ticking);
    expect(ticks).toBeGreaterThan(3);
  });
});

describe('remembered estimates', () => {
  it('answers the same request once from the core, whatever the order of its keys', async () => {
    let computed = 0;
    const core = estimatesHere();
    const remembered = rememberEstimates({
      ...core,
      estimate(request) {
        computed += 1;
        return core.estimate(request);
      },
    });
    const first = await remembered.estimate(ask());
    const turned = { vibration, design: Object.fromEntries(Object.entries(referenceDesign()).reverse()) };
    expect(await remembered.estimate(turned)).toEqual(first);
    expect(computed).toBe(1);
    await remembered.estimate(ask({ quietArrays: true }));
    expect(computed).toBe(2);
  });

  it('forgets the least recently asked, and remembers no failure', async () => {
    const asked: unknown[] = [];
    const answer = {} as Estimate;
    const remembered = rememberEstimates({
      engine: 'test',
      close: () => Promise.resolve(),
      estimate({ design }) {
        asked.push(design);
        return design === 'bad' ? Promise.reject(new Error('bad')) : Promise.resolve(answer);
      },
    });
    const of = (design: unknown) => remembered.estimate({ design, vibration: null });
    await of(0);
    for (let design = 1; design <= 63; design += 1) await of(design);
    await of(0);
    await of(64);
    await of(0);
    expect(asked).toHaveLength(65);
    await of(1);
    expect(asked).toHaveLength(66);
    await expect(of('bad')).rejects.toThrow('bad');
    await expect(of('bad')).rejects.toThrow('bad');
    expect(asked.filter((design) => design === 'bad')).toHaveLength(2);
  });
});
