import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ErrorAnswer } from '#contracts/error';
import type { Revision } from '#contracts/revisions';
import { unavailable } from '#server/errors';
import { estimatesHere } from '#server/jobs/estimate-here';
import {
  bringTo,
  createBrief,
  createDraft,
  pumpBrief,
  read,
  referenceDesign,
  send,
  sendRaw,
  startTeam,
} from '../support/way';
import type { Team } from '../support/way';

let team: Team;
beforeAll(async () => {
  team = await startTeam();
});
afterAll(() => team.close());

const errorOf = (response: { body: unknown }) => (response.body as ErrorAnswer).error;
const save = (revision: Revision, document: Record<string, unknown>, agent = team.designer) =>
  agent.put(`/api/revisions/${revision.id}/document`, { version: revision.version, document });
const [coil] = referenceDesign()['coils'] as Record<string, unknown>[];
const [magnet] = referenceDesign()['magnets'] as Record<string, unknown>[];

describe('a draft', () => {
  it('is kept as typed, faults and all', async () => {
    const draft = await createDraft(team.designer);
    const typed = { ...referenceDesign(), coils: [{ ...coil, turns: 'about 1000' }], scratch: { half: 'a thou' } };
    const saved = await save(draft, typed);
    expect(saved.status).toBe(200);
    const page = saved.body as Revision;
    expect(page.document).toEqual(typed);
    expect(page.documentIssues.map(({ path }) => path)).toEqual(expect.arrayContaining(['coils.0.turns', 'scratch']));
    expect(page.availableEvents).not.toContain('submit');
    expect(page.whyNot.submit).toMatch(/has 2 faults/);
  });

  it('saved unchanged leaves no trace', async () => {
    const draft = await createDraft(team.designer);
    const again = (await save(draft, draft.document as Record<string, unknown>)).body as Revision;
    expect(again.version).toBe(draft.version);
    expect(again.activity).toEqual(draft.activity);
  });

  it('told once in the history, however often the same person saves', async () => {
    const draft = await createDraft(team.designer);
    let page = draft;
    for (const title of ['a', 'b', 'c']) page = (await save(page, referenceDesign({ title }))).body as Revision;
    expect(page.version).toBe(4);
    expect(page.activity.filter(({ sentence }) => / saved the draft\.$/.test(sentence))).toHaveLength(1);
    expect(await team.server.db('audit_entries').where({ subject_id: draft.id, action: 'savedDraft' })).toHaveLength(3);
  });

  it.each([
    ['an array', []],
    ['a text', 'design'],
    ['null', null],
  ])('is an object: %s is refused', async (_what, document) => {
    const draft = await createDraft(team.designer);
    const refused = await team.designer.put(`/api/revisions/${draft.id}/document`, { version: 1, document });
    expect(refused.status).toBe(422);
    expect(errorOf(refused).issues?.[0]?.path).toBe('document');
  });

  it('longer than 256 kB is refused with the limit', async () => {
    const draft = await createDraft(team.designer);
    const refused = await save(draft, { notes: 'x'.repeat(300_000) });
    expect(refused.status).toBe(422);
    expect(errorOf(refused).issues).toEqual([
      { path: 'document', message: 'The document is longer than 256 kB.', limit: 262_144 },
    ]);
  });

  it('with a number that JSON cannot carry is refused, not altered', async () => {
    const draft = await createDraft(team.designer);
    const refused = await team.designer
      .put(`/api/revisions/${draft.id}/document`)
      .set('content-type', 'application/json')
      .send('{"version":1,"document":{"mass":1e999}}');
    expect(refused.status).toBe(422);
    expect(errorOf(refused).issues?.[0]?.path).toBe('document');
    expect((await read(team.designer, draft.id)).version).toBe(1);
  });

  it('is only changed while it is a draft', async () => {
    const submitted = await bringTo(team, 'inReview');
    const refused = await save(submitted, referenceDesign({ title: 'Late' }));
    expect(refused.status).toBe(409);
    expect(submitted.whyNotEdit).toMatch(/Only a draft/);
  });

  it('stays readable and savable while estimates cannot be had', async () => {
    const broken = await startTeam({
      estimator: { ...estimatesHere(), estimate: () => Promise.reject(unavailable('No thread is free.')) },
    });
    const draft = await createDraft(broken.designer);
    expect(draft.whyNot.submit).toMatch(/could not be computed\. No thread is free/);
    const saved = await save(draft, referenceDesign({ title: 'Kept' }), broken.designer);
    expect(saved.status).toBe(200);
    expect((await sendRaw(broken.designer, saved.body as Revision, 'submit')).status).toBe(422);
    await broken.close();
  });
});

describe('submission', () => {
  const faults: [string, Record<string, unknown>, { path: string; message: RegExp; limit?: number }][] = [
    [
      'a coil inside the magnet’s path',
      { coils: [{ ...coil, innerDiameter: '9 mm' }] },
      { path: 'document.magnets.0.outerDiameter', message: /does not fit the bore/, limit: 0.009 },
    ],
    [
      'a negative mass',
      { movingMass: { total: '-25 g' } },
      { path: 'document.movingMass.total', message: /too small/ },
    ],
    [
      'too many turns',
      { coils: [{ ...coil, turns: 1e9 }] },
      { path: 'document.coils.0.turns', message: /too large|at most/ },
    ],
    ['a wrong unit', { movingMass: { total: '25 mm' } }, { path: 'document.movingMass.total', message: /mass/ }],
    ['an unknown key', { colour: 'red' }, { path: 'document.colour', message: /not known/ }],
    [
      'an unknown material',
      { magnets: [{ ...magnet, material: 'NdFeB N99' }] },
      { path: 'document.magnets.0.material', message: /N99|catalogue/ },
    ],
    ['an absent coil', { coils: [] }, { path: 'document.coils', message: /at least 1/, limit: 1 }],
    [
      'a zero load',
      { circuit: { kind: 'resistor', resistance: 0 } },
      { path: 'document.circuit.resistance', message: /./ },
    ],
  ];
  it.each(faults)('of %s is refused, named by path', async (_what, change, { path, message, limit }) => {
    const draft = await createDraft(team.designer, { document: referenceDesign(change) });
    expect(draft.availableEvents).not.toContain('submit');
    const refused = await sendRaw(team.designer, draft, 'submit');
    expect(refused.status).toBe(422);
    expect(errorOf(refused).message).toBe(draft.whyNot.submit);
    const issue = errorOf(refused).issues?.find((each) => each.path === path);
    expect(issue, JSON.stringify(errorOf(refused).issues)).toBeDefined();
    expect(issue?.message).toMatch(message);
    if (limit !== undefined) expect(issue?.limit).toBe(limit);
    expect((await read(team.designer, draft.id)).state).toBe('draft');
  });

  it('needs a brief that has something to show on the bench', async () => {
    const requirements = (pumpBrief()['requirements'] as { shownBy: string }[]).filter(
      ({ shownBy }) => shownBy === 'estimate',
    );
    const brief = await createBrief(team.designer, { requirements });
    const draft = await createDraft(team.designer, { brief });
    expect(draft.whyNot.submit).toMatch(/no requirement that the bench is to show/);
    const document = pumpBrief();
    const changed = await team.designer.put(`/api/briefs/${brief.id}`, { version: 1, document });
    expect(changed.status).toBe(200);
    expect((await read(team.designer, draft.id)).availableEvents).toContain('submit');
  });

  it('keeps the brief’s version: later changes of the brief do not reach it', async () => {
    const brief = await createBrief(team.designer);
    const draft = await createDraft(team.designer, { brief });
    const submitted = await send(team.designer, draft, 'submit');
    expect(submitted.brief.version).toBe(1);
    await team.designer.put(`/api/briefs/${brief.id}`, { version: 1, document: pumpBrief({ title: 'Changed later' }) });
    const page = await read(team.reviewer, draft.id);
    expect(page.brief).toEqual(submitted.brief);
    expect(page.digest).toBe(submitted.digest);
    const other = await createDraft(team.designer, { brief });
    expect(other.brief).toMatchObject({ version: 2, document: { title: 'Changed later' } });
  });

  it('stores the canonical document, its digest and the engine’s version', async () => {
    const typed = await send(team.designer, await createDraft(team.designer), 'submit');
    const inOtherUnits = referenceDesign({ movingMass: { total: '0.025 kg' } });
    const same = await send(team.designer, await createDraft(team.designer, { document: inOtherUnits }), 'submit');
    expect(same.documentDigest).toBe(typed.documentDigest);
    expect(same.estimate).toEqual(typed.estimate);
    expect(typed.estimate?.engine).toMatch(/^\d+\.\d+\.\d+$/);
    expect(same.digest).not.toBe(typed.digest);
  });

  it('is refused where the estimate is not to be trusted', async () => {
    const sound = estimatesHere();
    const doubtful = await startTeam({
      estimator: {
        ...sound,
        async estimate(request) {
          const estimate = await sound.estimate(request);
          const { resistance } = (request.design as { circuit: { resistance: number } }).circuit;
          if (resistance === 1) return { ...estimate, power: { ...estimate.power, residual: 0.012 } };
          if (resistance === 2) return { ...estimate, response: { ...estimate.response, converged: false } };
          return estimate;
        },
      },
    });
    const load = (resistance: number) => referenceDesign({ circuit: { kind: 'resistor', resistance } });
    const unbalanced = await createDraft(doubtful.designer, { document: load(1) });
    expect(unbalanced.whyNot.submit).toMatch(/energy balance of the estimate is off by 1\.20 %/);
    expect((await sendRaw(doubtful.designer, unbalanced, 'submit')).status).toBe(422);
    const unsettled = await createDraft(doubtful.designer, { document: load(2) });
    expect(unsettled.whyNot.submit).toMatch(/did not converge/);
    expect((await sendRaw(doubtful.designer, unsettled, 'submit')).status).toBe(422);
    const good = await createDraft(doubtful.designer, { document: load(800) });
    expect((await sendRaw(doubtful.designer, good, 'submit')).status).toBe(200);
    await doubtful.close();
  });

  it('notices a brief that changes while the estimate is computed', async () => {
    const sound = estimatesHere();
    let during: (() => Promise<unknown>) | null = null;
    const slow = await startTeam({
      estimator: {
        ...sound,
        async estimate(request) {
          const act = during;
          during = null;
          await act?.();
          return sound.estimate(request);
        },
      },
    });
    const brief = await createBrief(slow.designer);
    const draft = await createDraft(slow.designer, { brief });
    during = () =>
      slow.designer.put(`/api/briefs/${brief.id}`, {
        version: 1,
        document: pumpBrief({ vibration: { kind: 'tone', frequency: '49 Hz', acceleration: '1 m/s^2', as: 'peak' } }),
      });
    const refused = await sendRaw(slow.designer, draft, 'submit');
    expect(refused.status).toBe(409);
    expect((await read(slow.designer, draft.id)).state).toBe('draft');
    await slow.close();
  });
});
