import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Brief } from '#contracts/briefs';
import type { BriefSummary } from '#contracts/briefs';
import { CatalogueEntry } from '#contracts/catalogue';
import { Design } from '#contracts/designs';
import type { DesignSummary } from '#contracts/designs';
import type { ErrorAnswer } from '#contracts/error';
import { dimensions } from '#physics/quantity';
import { letterAfter } from '#server/numbers';
import { bringTo, createBrief, createDraft, pumpBrief, read, referenceDesign, send, startTeam } from '../support/way';
import type { Team } from '../support/way';

let team: Team;
beforeAll(async () => {
  team = await startTeam();
});
afterAll(() => team.close());

const errorOf = (response: { body: unknown }) => (response.body as ErrorAnswer).error;

describe('a brief', () => {
  it('gets a number of its own and is listed', async () => {
    const first = await createBrief(team.designer);
    const second = await createBrief(team.designer, { title: 'Second' });
    const [one, two] = [first, second].map(({ number }) => Number(/^BR-(\d{3})$/.exec(number)?.[1]));
    expect(two).toBe((one ?? 0) + 1);
    const { body } = await team.reviewer.get('/api/briefs');
    const { briefs, mayCreate } = body as { briefs: BriefSummary[]; mayCreate: boolean };
    expect(mayCreate).toBe(false);
    expect(briefs.find(({ id }) => id === second.id)).toMatchObject({
      title: 'Second',
      version: 1,
      designs: 0,
      vibrationInWords: '50.0 Hz, 1.00 m/s² peak',
    });
  });

  it('is changed version by version, and a stale change is told what happened', async () => {
    const brief = await createBrief(team.designer);
    const path = `/api/briefs/${brief.id}`;
    const changed = await team.designer.put(path, {
      version: 1,
      document: pumpBrief({ title: 'New title', powerNeeded: 2e-3 }),
    });
    expect(Brief.parse(changed.body)).toMatchObject({ version: 2, document: { title: 'New title' } });
    const colleague = await team.server.as('designer');
    const stale = await colleague.put(path, { version: 1, document: pumpBrief({ title: 'Mine' }) });
    expect(stale.status).toBe(409);
    expect(errorOf(stale).changed).toEqual([
      expect.objectContaining({ version: 2, what: 'Changed the title, the power needed.' }),
    ]);
    expect(Brief.parse((await team.reviewer.get(path)).body)).toMatchObject({
      document: { title: 'New title' },
      mayEdit: false,
      whyNotEdit: 'This needs the role designer.',
    });
  });

  const faults: [string, Record<string, unknown>, { path: string; limit?: string | number }][] = [
    ['an unknown key', { colour: 'red' }, { path: 'colour' }],
    ['no title', { title: ' ' }, { path: 'title', limit: 1 }],
    ['a negative power', { powerNeeded: -1 }, { path: 'powerNeeded', limit: 1e-9 }],
    [
      'too large an envelope',
      { envelope: { shape: 'cylinder', diameter: 5, length: 1 } },
      { path: 'envelope.diameter', limit: 2 },
    ],
    ['an unknown shape', { envelope: { shape: 'ball', diameter: 1 } }, { path: 'envelope.shape' }],
    ['temperatures the wrong way round', { temperature: { lowest: 40, highest: 10 } }, { path: 'temperature.highest' }],
    ['no vibration', { vibration: undefined }, { path: 'vibration' }],
    ['a vibration of an unknown kind', { vibration: { kind: 'noise' } }, { path: 'vibration.kind' }],
    [
      'a tone with a wrong unit',
      { vibration: { kind: 'tone', frequency: '50 mm', acceleration: '1 m/s^2', as: 'peak' } },
      { path: 'vibration.frequency' },
    ],
    [
      'a tone without saying peak or rms',
      { vibration: { kind: 'tone', frequency: '50 Hz', acceleration: '1 m/s^2' } },
      { path: 'vibration.as' },
    ],
    [
      'a requirement of an unknown quantity',
      {
        requirements: [
          {
            id: randomUUID(),
            title: 'x',
            quantity: 'beauty',
            comparison: 'atLeast',
            limit: 1,
            unit: '',
            shownBy: 'bench',
          },
        ],
      },
      { path: 'requirements.0.quantity' },
    ],
  ];
  it.each(faults)('with %s is refused at its place', async (_what, change, { path, limit }) => {
    const refused = await team.designer.post('/api/briefs', pumpBrief(change));
    expect(refused.status).toBe(422);
    const issue = errorOf(refused).issues?.find((each) => each.path === path);
    expect(issue, refused.text).toBeDefined();
    if (limit !== undefined) expect(issue?.limit).toBe(limit);
    const brief = await createBrief(team.designer);
    const again = await team.designer.put(`/api/briefs/${brief.id}`, { version: 1, document: pumpBrief(change) });
    expect(errorOf(again).issues?.map((each) => each.path)).toContain(`document.${path}`);
  });

  it('does not take two requirements with one id', async () => {
    const [requirement] = pumpBrief()['requirements'] as object[];
    const refused = await team.designer.post('/api/briefs', pumpBrief({ requirements: [requirement, requirement] }));
    expect(errorOf(refused).issues?.[0]?.path).toBe('requirements.1.id');
  });

  it.each([
    [
      {
        kind: 'tones',
        tones: [
          { frequency: '10 Hz', acceleration: '1 m/s^2', as: 'rms' },
          { frequency: '20 Hz', acceleration: '1.2 m/s^2', as: 'peak' },
        ],
      },
      '2 tones, the largest 10.0 Hz, 1.00 m/s² rms',
    ],
    [
      // Flat: rms² = 0.01 g²/Hz × 100 Hz, so rms = 1 g.
      {
        kind: 'spectrum',
        points: [
          ['10 Hz', 0.01],
          ['110 Hz', 0.01],
        ],
        unit: 'g^2/Hz',
        duration: '10 s',
        seed: 1,
      },
      'Spectrum, 10.0 Hz to 110 Hz, 9.81 m/s² rms',
    ],
    [
      {
        kind: 'recording',
        rate: '1 kHz',
        unit: 'm/s^2',
        acceleration: Array.from({ length: 1001 }, (_, index) => (index % 2 === 0 ? 2 : -2)),
      },
      'Recording, 1.00 s at 1.00 kHz, 2.00 m/s² rms',
    ],
  ])('says its vibration in words', async (vibration, words) => {
    expect((await createBrief(team.designer, { vibration })).vibrationInWords).toBe(words);
  });
});

describe('a new design', () => {
  it('starts from a device tuned to the brief’s tone, matched and sound', async () => {
    const brief = await createBrief(team.designer, {
      vibration: { kind: 'tone', frequency: '37 Hz', acceleration: '0.1 g', as: 'peak' },
    });
    const { body, status } = await team.designer.post('/api/designs', { title: 'Started', briefId: brief.id });
    expect(status).toBe(201);
    const design = Design.parse(body);
    expect(design.number).toMatch(/^FN-\d{3}$/);
    const submitted = await send(team.designer, await read(team.designer, design.revisions[0]?.id ?? ''), 'submit');
    const { mechanics, bounds, response } = submitted.estimate ?? {};
    expect(mechanics?.naturalFrequency).toBeCloseTo(37, 4);
    expect((response?.loadPower ?? 0) / (bounds?.bestLoadPower ?? 1)).toBeGreaterThan(0.98);
  });

  it.each([
    ['a small cylinder', { shape: 'cylinder', diameter: 0.012, length: 0.02 }, 0.02],
    ['a flat box', { shape: 'box', size: [0.05, 0.05, 0.015] }, 0.05],
  ])('fits into %s', async (_what, envelope, massLimit) => {
    const brief = await createBrief(team.designer, { envelope, massLimit });
    const { body } = await team.designer.post('/api/designs', { title: 'Small', briefId: brief.id });
    const draft = await read(team.designer, Design.parse(body).revisions[0]?.id ?? '');
    expect(draft.whyNot.submit).toBeUndefined();
    const submitted = await send(team.designer, draft, 'submit');
    const { coils, movingMass } = submitted.document as {
      coils: { outerDiameter: number }[];
      movingMass: { total: number };
    };
    const [least = 0, next = 0] = envelope.shape === 'box' ? [0.015, 0.05] : [0.012, 0.012];
    expect(coils[0]?.outerDiameter).toBeLessThanOrEqual(Math.min(least, next));
    expect(movingMass.total).toBeLessThanOrEqual(massLimit / 2);
  });

  it('is put under an existing brief only', async () => {
    const briefId = randomUUID();
    const refused = await team.designer.post('/api/designs', { title: 'Orphan', briefId });
    expect(refused.status).toBe(422);
    expect(errorOf(refused).issues).toEqual([{ path: 'briefId', value: briefId, message: 'There is no such brief.' }]);
  });

  it('is listed with its latest revision, the newest design first', async () => {
    const older = await bringTo(team, 'reworked');
    const newer = await createDraft(team.designer);
    const { body } = await team.reviewer.get('/api/designs');
    const { designs } = body as { designs: DesignSummary[] };
    expect(designs[0]).toMatchObject({ id: newer.design.id, latest: { letter: 'A', state: 'draft' } });
    expect(designs[0]?.document).toEqual(referenceDesign());
    expect(designs.find(({ id }) => id === older.design.id)?.latest).toMatchObject({ letter: 'B', state: 'draft' });
  });
});

describe('letters of revisions', () => {
  it.each([
    ['A', 'B'],
    ['Y', 'Z'],
    ['Z', 'AA'],
    ['AZ', 'BA'],
    ['ZZ', 'AAA'],
  ])('%s is followed by %s', (letter, next) => {
    expect(letterAfter(letter)).toBe(next);
  });
});

describe('the catalogue', () => {
  it('tells each entry’s properties with known dimensions, and its source', async () => {
    const { body } = await team.designer.get('/api/catalogue');
    const entries = (body as { entries: unknown[] }).entries.map((entry) => CatalogueEntry.parse(entry));
    expect(new Set(entries.map(({ kind }) => kind))).toEqual(new Set(['magnetMaterial', 'wire', 'diode']));
    expect(entries.find(({ key }) => key === 'NdFeB N42')?.properties[0]).toMatchObject({
      value: 1.3,
      dimension: 'fluxDensity',
    });
    for (const { source, properties } of entries) {
      expect(source).not.toBe('');
      for (const { dimension } of properties) expect(Object.keys(dimensions)).toContain(dimension);
    }
  });
});
