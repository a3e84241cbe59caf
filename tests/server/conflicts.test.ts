import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ErrorAnswer } from '#contracts/error';
import { testPassword } from '../support/server';
import { bringTo, createDraft, read, referenceDesign, send, sendRaw, startTeam } from '../support/way';
import type { Team } from '../support/way';

let team: Team;
beforeAll(async () => {
  team = await startTeam();
});
afterAll(() => team.close());

const errorOf = (response: { body: unknown }) => (response.body as ErrorAnswer).error;
const countOf = async (table: string, where: Record<string, unknown>) =>
  (await team.server.db(table).where(where)).length;

describe('a step on a page that is out of date', () => {
  it('is refused, and what happened meanwhile is told in sentences', async () => {
    const { designer, reviewer, server } = team;
    const second = await server.as('reviewer');
    const page = await send(designer, await createDraft(designer), 'submit');
    await send(second, page, 'remark', { text: 'Why N42?', blocking: true });
    await send(designer, page, 'closeRemark', { answer: 'In stock.' });
    const refused = await sendRaw(reviewer, page, 'approve');
    expect(refused.status).toBe(409);
    expect(errorOf(refused).changed).toEqual([
      expect.objectContaining({ version: page.version + 1, what: 'Put a blocking remark on it: Why N42?.' }),
      expect.objectContaining({ version: page.version + 2, what: 'Closed a remark on it: In stock.' }),
    ]);
    expect(errorOf(refused).changed?.every(({ by }) => by?.startsWith('Person '))).toBe(true);
    expect((await read(reviewer, page.id)).signatures).toEqual([]);
  });

  it('a second tab does not overwrite what the first has saved', async () => {
    const { designer, server } = team;
    const draft = await createDraft(designer);
    const path = `/api/revisions/${draft.id}/document`;
    const first = await designer.put(path, { version: draft.version, document: referenceDesign({ title: 'First' }) });
    expect(first.status).toBe(200);
    const colleague = await server.as('designer');
    const second = await colleague.put(path, {
      version: draft.version,
      document: referenceDesign({ title: 'Second' }),
    });
    expect(second.status).toBe(409);
    expect(errorOf(second).changed).toEqual([expect.objectContaining({ what: 'Saved the draft.' })]);
    expect((await read(designer, draft.id)).document).toMatchObject({ title: 'First' });
    expect((await read(designer, draft.id)).authors.map(({ id }) => id)).not.toContain(colleague.personId);
  });

  it('an event of another state is refused with the state', async () => {
    const { designer, reviewer } = team;
    const draft = await createDraft(designer);
    const refused = await sendRaw(reviewer, draft, 'approve');
    expect(refused.status).toBe(409);
    expect(errorOf(refused).message).toMatch(/“Draft”/);
  });
});

describe('the same step sent twice at once', () => {
  it('submit: one effect, one message to each reviewer', async () => {
    const { designer, reviewer } = team;
    const draft = await createDraft(designer);
    const answers = await Promise.all([1, 2, 3].map(() => sendRaw(designer, draft, 'submit')));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
    expect(await countOf('audit_entries', { action: 'submitted', subject_id: draft.id })).toBe(1);
    const event_id = `revision ${draft.id} version ${draft.version + 1}`;
    expect(await countOf('mail_messages', { event_id, recipient_id: reviewer.personId })).toBe(1);
  });

  it('approve: one signature', async () => {
    const { designer, reviewer } = team;
    const page = await send(designer, await createDraft(designer), 'submit');
    const answers = await Promise.all([1, 2].map(() => sendRaw(reviewer, page, 'approve')));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(await countOf('signatures', { revision_id: page.id })).toBe(1);
  });

  it('release: one record, one release number', async () => {
    const { authority } = team;
    const page = await read(authority, (await bringTo(team, 'releaseReview')).id);
    const before = await team.server.db('records');
    const answers = await Promise.all([1, 2].map(() => sendRaw(authority, page, 'release')));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect((await team.server.db('records')).length).toBe(before.length + 1);
    const [sequence] = await team.server.db('number_sequences').where('name', 'like', 'REL-%');
    expect(sequence).toMatchObject({ last: before.length + 1 });
  });

  it('rework: one next revision', async () => {
    const { designer } = team;
    const page = await bringTo(team, 'changesRequested');
    const answers = await Promise.all([1, 2].map(() => sendRaw(designer, page, 'rework')));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(await countOf('revisions', { design_id: page.design.id })).toBe(2);
  });
});

describe('signing', () => {
  it('takes the password again and refuses a wrong one at its field', async () => {
    const { designer, server } = team;
    const reviewer = await server.as('reviewer');
    const page = await send(designer, await createDraft(designer), 'submit');
    const refused = await sendRaw(reviewer, page, 'approve', { password: 'not the password' });
    expect(refused.status).toBe(422);
    expect(errorOf(refused).issues).toEqual([{ path: 'password', message: 'This is not your password.' }]);
    expect(JSON.stringify(refused.body)).not.toContain('not the password');
    expect((await sendRaw(reviewer, page, 'approve')).status).toBe(200);
  });

  it('slows guessing down: after five wrong passwords even the right one has to wait', async () => {
    const { designer, server } = team;
    const reviewer = await server.as('reviewer');
    const page = await send(designer, await createDraft(designer), 'submit');
    const guesses = await Promise.all(
      [1, 2, 3, 4, 5, 6, 7].map((guess) => sendRaw(reviewer, page, 'approve', { password: `guess ${guess}` })),
    );
    expect(guesses.map(({ status }) => status).sort()).toEqual([422, 422, 422, 422, 422, 429, 429]);
    const waits = await sendRaw(reviewer, page, 'approve');
    expect(waits.status).toBe(429);
    expect(Number(waits.headers['retry-after'])).toBeGreaterThan(0);
    expect((await sendRaw(team.reviewer, page, 'approve')).status).toBe(200);
  });

  it('signs exactly what was shown: another digest is refused', async () => {
    const { designer, reviewer } = team;
    const page = await send(designer, await createDraft(designer), 'submit');
    const refused = await sendRaw(reviewer, page, 'approve', { signedDigest: 'a'.repeat(64) });
    expect(refused.status).toBe(409);
    expect(errorOf(refused).message).toMatch(/not what stands now/);
    const approved = await send(reviewer, page, 'approve');
    expect(approved.signatures[0]).toMatchObject({ digest: page.digest, by: { id: reviewer.personId } });
    expect(approved.digest).not.toBe(page.digest);
  });

  it('keeps the name as it was signed', async () => {
    const { designer, server } = team;
    const reviewer = await server.as('reviewer');
    await server.db('people').where({ id: reviewer.personId }).update({ name: 'Before Marriage' });
    const page = await send(designer, await createDraft(designer), 'submit');
    await send(reviewer, page, 'approve');
    await server.db('people').where({ id: reviewer.personId }).update({ name: 'After Marriage' });
    expect((await read(designer, page.id)).signatures[0]?.by.name).toBe('Before Marriage');
  });

  it('asks for no password where the step is refused anyway', async () => {
    const { designer, bench } = team;
    const page = await send(designer, await createDraft(designer), 'submit');
    const refused = await sendRaw(bench, page, 'approve', { password: `${testPassword}!` });
    expect(refused.status).toBe(403);
  });
});
