import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ErrorAnswer } from '#contracts/error';
import type { Revision } from '#contracts/revisions';
import type { TestAgent } from '../support/server';
import { bringTo, createDraft, latestOf, read, referenceDesign, send, sendRaw, startTeam } from '../support/way';
import type { Team } from '../support/way';

let team: Team;
beforeAll(async () => {
  team = await startTeam();
});
afterAll(() => team.close());

const messageOf = (response: { body: unknown }): string => (response.body as ErrorAnswer).error.message;
const save = (agent: TestAgent, { id, version }: Revision, title: string) =>
  agent.put(`/api/revisions/${id}/document`, { version, document: referenceDesign({ title }) });

describe('who wrote a revision does not decide on it, whatever other roles they hold', () => {
  it('the author with the reviewer role does not approve', async () => {
    const author = await team.server.as('designer', 'reviewer');
    const revision = await send(author, await createDraft(author), 'submit');
    expect(revision.whyNot.approve).toMatch(/somebody else has to decide/);
    const refused = await sendRaw(author, revision, 'approve');
    expect(refused.status).toBe(403);
    expect(messageOf(refused)).toBe(revision.whyNot.approve);
    expect((await sendRaw(author, revision, 'requestChanges')).status).toBe(403);
    expect((await read(author, revision.id)).version).toBe(revision.version);
  });

  it('somebody who saved the draft once does not approve', async () => {
    const helper = await team.server.as('designer', 'reviewer');
    const draft = await createDraft(team.designer);
    expect((await save(helper, draft, 'Helped')).status).toBe(200);
    await send(team.designer, draft, 'submit');
    const seen = await read(helper, draft.id);
    expect(seen.authors.map(({ id }) => id)).toEqual([team.designer.personId, helper.personId]);
    expect((await sendRaw(helper, seen, 'approve')).status).toBe(403);
  });

  it('somebody who only submitted it does not approve', async () => {
    const submitter = await team.server.as('designer', 'reviewer');
    const draft = await createDraft(team.designer);
    const submitted = await send(submitter, draft, 'submit');
    expect(submitted.authors.map(({ id }) => id)).toContain(submitter.personId);
    expect((await sendRaw(submitter, submitted, 'approve')).status).toBe(403);
  });

  it('an editor of revision A does not approve revision B', async () => {
    const editor = await team.server.as('designer', 'reviewer');
    const draft = await createDraft(team.designer);
    await save(editor, draft, 'Edited');
    const changed = await bringTo(team, 'changesRequested', await read(team.designer, draft.id));
    const next = await latestOf(team.designer, await send(team.designer, changed, 'rework'));
    await send(team.designer, next, 'submit');
    expect((await sendRaw(editor, await read(editor, next.id), 'approve')).status).toBe(403);
  });

  it('an author who is release authority neither releases nor grants a concession, but may recall', async () => {
    const author = await team.server.as('designer', 'releaseAuthority');
    const review = await bringTo(team, 'releaseReview', await createDraft(author));
    for (const event of ['release', 'returnToBench', 'requestChanges']) {
      expect((await sendRaw(author, await read(author, review.id), event)).status, event).toBe(403);
    }
    const released = await send(team.authority, review, 'release');
    expect((await send(author, released, 'recall')).state).toBe('recalled');

    const failed = await bringTo(team, 'nonconforming', await createDraft(author));
    expect((await sendRaw(author, await read(author, failed.id), 'grantConcession')).status).toBe(403);
  });

  it('holds per revision, not per person: the same people decide on each other’s work', async () => {
    const one = await team.server.as('designer', 'reviewer');
    const two = await team.server.as('designer', 'reviewer');
    const ofOne = await send(one, await createDraft(one), 'submit');
    const ofTwo = await send(two, await createDraft(two), 'submit');
    expect((await send(two, ofOne, 'approve')).state).toBe('clearedForBench');
    expect((await send(one, ofTwo, 'approve')).state).toBe('clearedForBench');
  });

  it('a role taken away counts at the next step', async () => {
    const reviewer = await team.server.as('reviewer');
    const revision = await send(team.designer, await createDraft(team.designer), 'submit');
    const seen = await read(reviewer, revision.id);
    await team.server.db('person_roles').where({ person_id: reviewer.personId }).delete();
    await team.server.db('person_roles').insert({ person_id: reviewer.personId, role: 'designer' });
    expect((await sendRaw(reviewer, seen, 'approve')).status).toBe(403);
  });
});

describe('what a person may know of', () => {
  it('an observer sees what was released and nothing else, not even that it exists', async () => {
    const { observer } = team;
    for (const state of [
      'draft',
      'inReview',
      'clearedForBench',
      'onBench',
      'releaseReview',
      'reworked',
      'abandoned',
    ] as const) {
      const hidden = await bringTo(team, state);
      expect((await observer.get(`/api/revisions/${hidden.id}`)).status, state).toBe(404);
      expect((await observer.get(`/api/designs/${hidden.design.id}`)).status, state).toBe(404);
      const unknown = await observer.get(`/api/revisions/${randomUUID()}`);
      const { requestId: _one, ...told } = ((await observer.get(`/api/revisions/${hidden.id}`)).body as ErrorAnswer)
        .error;
      const { requestId: _other, ...tellsNothing } = (unknown.body as ErrorAnswer).error;
      expect(told).toEqual(tellsNothing);
    }
  });

  it('an observer sees of a design its released revisions only', async () => {
    const { observer, designer } = team;
    const released = await bringTo(team, 'released');
    await send(designer, released, 'rework');
    const seen = (await observer.get(`/api/designs/${released.design.id}`)).body as { revisions: { letter: string }[] };
    expect(seen.revisions.map(({ letter }) => letter)).toEqual(['A']);
    const page = await read(observer, released.id);
    expect(page).toMatchObject({ availableEvents: [], mayEdit: false, continuedAs: null });
    expect(page.activity.map(({ sentence }) => sentence).join()).not.toMatch(/revision B/);
    expect((await observer.get('/api/desk')).body).toMatchObject({ waitsForMe: [], iWaitFor: [] });
  });

  it.each(['/api/briefs', '/api/designs', '/api/runs', '/api/instruments', '/api/catalogue'])(
    'an observer does not enter %s',
    async (path) => {
      expect((await team.observer.get(path)).status).toBe(403);
    },
  );

  it('an observer’s desk tells of releases only', async () => {
    const released = await bringTo(team, 'released');
    await send(team.designer, released, 'rework');
    const draft = await createDraft(team.designer);
    const { recent } = (await team.observer.get('/api/desk')).body as { recent: { href: string; sentence: string }[] };
    const hrefs = recent.map(({ href }) => href);
    expect(hrefs).toContain(`/designs/${released.design.id}/A`);
    expect(hrefs.filter((href) => href.includes(draft.design.id) || href.endsWith('/B'))).toEqual([]);
    expect(recent.map(({ sentence }) => sentence).join()).not.toMatch(/revision B/);
    const { recent: whole } = (await team.reviewer.get('/api/desk')).body as { recent: { href: string }[] };
    expect(whole.map(({ href }) => href)).toContain(`/designs/${draft.design.id}/A`);
  });

  it('nobody signed in gets 401, and an unknown revision is 404', async () => {
    const visitor = await team.server.visitor();
    const revision = await createDraft(team.designer);
    expect((await visitor.get(`/api/revisions/${revision.id}`)).status).toBe(401);
    expect((await sendRaw(visitor, revision, 'submit')).status).toBe(401);
    expect((await team.designer.get(`/api/revisions/${randomUUID()}`)).status).toBe(404);
    expect((await team.designer.get(`/api/runs/${randomUUID()}`)).status).toBe(404);
    expect((await team.designer.get(`/api/records/${randomUUID()}`)).status).toBe(404);
    expect((await team.designer.get(`/api/designs/${randomUUID()}`)).status).toBe(404);
    expect((await team.designer.get('/api/revisions/not-an-id')).status).toBe(422);
  });

  it('an administrator decides nothing', async () => {
    const revision = await send(team.designer, await createDraft(team.designer), 'submit');
    expect((await sendRaw(team.administrator, revision, 'approve')).status).toBe(403);
    expect((await read(team.administrator, revision.id)).availableEvents).toEqual([]);
  });
});
