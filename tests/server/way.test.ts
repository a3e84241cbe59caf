import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Desk } from '#contracts/desk';
import { ReleaseRecord } from '#contracts/records';
import type { RecordSummary } from '#contracts/records';

import { canonicalJson, sha256 } from '#server/canonical-json';
import { verifyAudit } from '#server/audit';
import { bringTo, createDraft, latestOf, read, readRun, send, startTeam, takeReadings } from '../support/way';
import type { Team } from '../support/way';

let team: Team;
beforeAll(async () => {
  team = await startTeam();
});
afterAll(() => team.close());

const deskOf = async (agent: Team['designer']): Promise<Desk> => (await agent.get('/api/desk')).body as Desk;
const waitsFor = async (agent: Team['designer']) => (await deskOf(agent)).waitsForMe.map(({ what }) => what);

describe('one design, from draft to record, by three people and the bench', () => {
  it('goes the whole way', async () => {
    const { designer, reviewer, bench, authority, server } = team;
    const draft = await createDraft(designer);
    expect(draft).toMatchObject({ state: 'draft', version: 1, documentIssues: [], estimate: null, mayEdit: true });
    expect(draft.availableEvents).toEqual(['submit', 'abandon']);
    expect(await waitsFor(designer)).toEqual([expect.stringMatching(/Finish the draft/)]);

    const submitted = await send(designer, draft, 'submit', { note: 'Coil as agreed.' });
    expect(submitted.state).toBe('inReview');
    expect(submitted.estimate?.response.loadPower).toBeCloseTo(1.2978e-3, 4);
    expect(submitted.documentDigest).toHaveLength(64);
    expect(submitted.document).toMatchObject({ movingMass: { total: 0.025 } });
    expect(submitted.mayEdit).toBe(false);
    expect(submitted.whyNot.approve).toMatch(/role reviewer/);
    expect((await deskOf(designer)).iWaitFor).toHaveLength(1);
    expect(await waitsFor(reviewer)).toEqual([expect.stringMatching(/Review it/)]);

    const remarked = await send(reviewer, draft, 'remark', { blocking: true });
    expect(remarked.remarks).toEqual([expect.objectContaining({ blocking: true, closed: null })]);
    expect(remarked.availableEvents).not.toContain('approve');
    expect(remarked.whyNot.approve).toMatch(/blocking remark is still open/);
    await send(designer, draft, 'closeRemark', { answer: 'Sheet 2.' });
    const cleared = await send(reviewer, draft, 'approve', { note: 'Sound.' });
    expect(cleared.state).toBe('clearedForBench');
    expect(cleared.signatures).toEqual([
      expect.objectContaining({ event: 'approve', statement: 'Sound.', meaning: expect.stringMatching(/reviewed/) }),
    ]);

    const onBench = await send(bench, draft, 'startRun', { specimen: 'SN 001' });
    const [opened] = onBench.runs;
    const run = await readRun(bench, opened?.id ?? '');
    expect(run.lines.map(({ requirement }) => requirement.title)).toEqual(['Power into the load', 'Coil resistance']);
    expect(run.lines[0]?.estimated).toBe(submitted.estimate?.response.loadPower);
    expect(run.whyNot.signResult).toMatch(/Still without a reading/);
    const readings = await takeReadings(bench, onBench);
    expect(readings.lines.map(({ verdict }) => verdict)).toEqual(['meets', 'meets']);
    expect(readings.availableEvents).toContain('signResult');
    expect(await waitsFor(bench)).toEqual([expect.stringMatching(/Sign the result/)]);

    const inReleaseReview = await send(bench, draft, 'signResult');
    expect(inReleaseReview.state).toBe('releaseReview');
    expect(inReleaseReview.runs[0]).toMatchObject({ state: 'signed', result: 'conforming' });
    const released = await send(authority, draft, 'release');
    expect(released.state).toBe('released');
    expect(released.recordId).not.toBeNull();

    const { body } = await team.observer.get(`/api/records/${released.recordId}`);
    const record = ReleaseRecord.parse(body);
    expect(record.releaseNumber).toMatch(/^REL-\d{4}-\d{3}$/);
    expect(record.intact).toBe(true);
    expect(record.digest).toBe(sha256(canonicalJson(record.dossier)));
    expect(record.dossier.signatures.map(({ event }) => event)).toEqual(['approve', 'signResult', 'release']);
    expect(record.dossier.runs[0]?.readings).toHaveLength(2);
    expect(record.dossier.estimate.digest).toBe(submitted.estimate?.digest);
    expect(await verifyAudit(server.db)).toMatchObject({ intact: true });

    const sentences = released.activity.map(({ sentence }) => sentence);
    expect(sentences[0]).toMatch(/created this revision\.$/);
    expect(sentences).toEqual(
      expect.arrayContaining([
        expect.stringMatching(/submitted it for review: Coil as agreed\.$/),
        expect.stringMatching(/put a blocking remark on it: Is the coil former in the drawing\?\.?$/),
        expect.stringMatching(/signed RUN-0001 as conforming/),
        expect.stringMatching(/released it as REL-/),
      ]),
    );
  });

  it('tells those concerned by mail, each once, and never who did it', async () => {
    const { server, designer, reviewer, bench, authority, observer } = team;
    const rows = await server
      .db('mail_messages')
      .orderBy('rowid')
      .select<{ recipient_id: string; subject: string }[]>('*');
    const of = (words: RegExp) =>
      rows.filter(({ subject }) => words.test(subject)).map(({ recipient_id }) => recipient_id);
    expect(of(/submitted for review/)).toEqual([reviewer.personId]);
    expect(of(/has a new remark/)).toEqual([designer.personId]);
    expect(of(/has a remark closed/)).toEqual([reviewer.personId]);
    expect(of(/approved/)).toEqual([designer.personId, bench.personId]);
    expect(of(/on the bench/)).toEqual([designer.personId]);
    expect(of(/bench result/)).toEqual([authority.personId, designer.personId]);
    expect(of(/ released/)).toEqual([designer.personId, reviewer.personId, bench.personId, observer.personId]);
  });
});

describe('mail about an own step', () => {
  it('goes to the other authors and not to who took it', async () => {
    const { designer, server } = team;
    const second = await server.as('designer');
    const draft = await createDraft(designer);
    await second.put(`/api/revisions/${draft.id}/document`, {
      version: draft.version,
      document: { ...(draft.document as object), title: 'By two' },
    });
    await send(designer, draft, 'submit');
    const remarked = await send(designer, draft, 'remark');
    const event_id = `revision ${draft.id} version ${remarked.version}`;
    const told = await server.db('mail_messages').where({ event_id }).pluck<string[]>('recipient_id');
    expect(told).toEqual([second.personId]);
  });
});

describe('the side ways', () => {
  it('changes requested: the next revision is a copy, its authors are carried over', async () => {
    const { designer, reviewer, server } = team;
    const colleague = await server.as('designer', 'reviewer');
    const revision = await createDraft(designer);
    const edited = await colleague.put(`/api/revisions/${revision.id}/document`, {
      version: revision.version,
      document: { ...(revision.document as object), title: 'Edited' },
    });
    expect(edited.status).toBe(200);
    await bringTo(team, 'changesRequested', await read(designer, revision.id));
    const reworked = await send(designer, revision, 'rework', { reason: 'Thinner wire.' });
    expect(reworked).toMatchObject({ state: 'reworked', continuedAs: 'B', availableEvents: [] });
    const next = await latestOf(designer, reworked);
    expect(next).toMatchObject({ letter: 'B', state: 'draft', continuedFrom: 'A', version: 1, estimate: null });
    expect(next.document).toMatchObject({ title: 'Edited', movingMass: { total: '25 g' } });
    expect(next.authors.map(({ id }) => id)).toEqual([designer.personId, colleague.personId]);
    await send(designer, next, 'submit');
    const seen = await read(colleague, next.id);
    expect(seen.availableEvents).not.toContain('approve');
    expect(seen.whyNot.approve).toMatch(/wrote, edited or submitted/);
    expect((await read(reviewer, next.id)).availableEvents).toContain('approve');
  });

  it('nonconforming: tested again, reworked, or with a concession', async () => {
    const { designer, bench, authority, reviewer } = team;
    const retested = await bringTo(team, 'nonconforming');
    expect(retested.runs[0]).toMatchObject({ state: 'signed', result: 'nonconforming' });
    expect((await send(bench, retested, 'retest')).state).toBe('clearedForBench');
    const again = await send(bench, retested, 'startRun');
    await takeReadings(bench, again);
    expect((await send(bench, retested, 'signResult')).state).toBe('releaseReview');

    const reworked = await bringTo(team, 'nonconforming');
    expect((await send(designer, reworked, 'rework')).state).toBe('reworked');

    const conceded = await bringTo(team, 'nonconforming');
    expect((await read(authority, conceded.id)).availableEvents).toContain('grantConcession');
    const granted = await send(authority, conceded, 'grantConcession');
    expect(granted.state).toBe('releaseReview');
    expect(granted.signatures.at(-1)).toMatchObject({
      event: 'grantConcession',
      statement: expect.stringMatching(/Shortfall: 0\.2 mW too little/),
    });
    expect((await send(authority, conceded, 'release')).state).toBe('released');
    expect((await read(reviewer, conceded.id)).recordId).not.toBeNull();
  });

  it('a run stopped without a result, a release returned to the bench, changes requested from the release review', async () => {
    const { bench, authority, designer } = team;
    const revision = await bringTo(team, 'onBench');
    const stopped = await send(bench, revision, 'stopRun', { reason: 'The shaker overheated.' });
    expect(stopped).toMatchObject({ state: 'clearedForBench' });
    expect(stopped.runs[0]).toMatchObject({ state: 'stopped', result: null });
    expect(await readRun(designer, stopped.runs[0]?.id ?? '')).toMatchObject({
      stopReason: 'The shaker overheated.',
      mayRecord: false,
    });

    const reviewed = await bringTo(team, 'releaseReview');
    expect((await send(authority, reviewed, 'returnToBench')).state).toBe('clearedForBench');
    await send(bench, reviewed, 'startRun');
    const second = await bringTo(team, 'releaseReview');
    expect((await send(authority, second, 'requestChanges')).state).toBe('changesRequested');
  });

  it('a later release lets the earlier one be superseded; its recall takes that back', async () => {
    const { designer, authority, observer } = team;
    const first = await bringTo(team, 'released');
    expect((await read(authority, first.id)).whyNot.supersede).toMatch(/No later revision/);
    const inForce = await send(designer, first, 'rework');
    expect(inForce).toMatchObject({ state: 'released', continuedAs: 'B' });
    expect(inForce.whyNot.rework).toMatch(/Revision B was drafted/);
    const second = await bringTo(team, 'released', await latestOf(designer, first));
    expect((await read(authority, first.id)).availableEvents).toContain('supersede');
    await send(authority, second, 'recall');
    expect((await read(authority, first.id)).availableEvents).not.toContain('supersede');

    const recalled = await read(observer, second.id);
    expect(recalled.state).toBe('recalled');
    const { body } = await observer.get(`/api/records/${recalled.recordId}`);
    expect(ReleaseRecord.parse(body).recall).toMatchObject({ reason: 'Because the test says so.' });

    const third = await send(designer, second, 'rework');
    expect(third).toMatchObject({ state: 'recalled', continuedAs: 'C' });
    await bringTo(team, 'released', await latestOf(designer, third));
    const superseded = await send(authority, first, 'supersede');
    expect(superseded.state).toBe('superseded');
    const records = (await observer.get('/api/records')).body as { records: RecordSummary[] };
    const old = records.records.find(({ revisionId }) => revisionId === first.id);
    expect(old?.state).toBe('superseded');
    expect((await observer.get(`/api/records/${old?.id ?? ''}`)).body).toMatchObject({ supersededBy: 'C' });
  });

  it('an abandoned successor frees the release for another', async () => {
    const { designer } = team;
    const first = await bringTo(team, 'released');
    await send(designer, first, 'rework');
    await send(designer, await latestOf(designer, first), 'abandon');
    const free = await read(designer, first.id);
    expect(free).toMatchObject({ continuedAs: null, state: 'released' });
    expect((await send(designer, free, 'rework')).continuedAs).toBe('C');
  });
});
