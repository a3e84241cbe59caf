import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Desk } from '#contracts/desk';
import { isClientRoute } from '#contracts/client-routes';
import type { Revision } from '#contracts/revisions';
import type { TestAgent } from '../support/server';
import { bringTo, send, startTeam, takeReadings } from '../support/way';
import type { Team } from '../support/way';

let team: Team;
beforeAll(async () => {
  team = await startTeam();
});
afterAll(() => team.close());

/** What the desk of a person says on one revision: asked of them, or waited for. */
async function told(agent: TestAgent, revision: Revision): Promise<{ mine: string[]; others: string[] }> {
  const desk = Desk.parse((await agent.get('/api/desk')).body);
  for (const { href } of [...desk.waitsForMe, ...desk.iWaitFor, ...desk.recent])
    expect(isClientRoute(href), href).toBe(true);
  const here = ({ href }: { href: string }) =>
    href === `/designs/${revision.design.id}/${revision.letter}` ||
    revision.runs.some(({ id }) => href === `/bench/runs/${id}`);
  return {
    mine: desk.waitsForMe.filter(here).map(({ what }) => what),
    others: desk.iWaitFor.filter(here).map(({ what }) => what),
  };
}

describe('the desk tells whose turn it is', () => {
  const rows: [Revision['state'], keyof Team, RegExp | null, RegExp | null][] = [
    ['draft', 'designer', /Finish the draft/, null],
    ['draft', 'reviewer', null, null],
    ['inReview', 'reviewer', /Review it/, null],
    ['inReview', 'designer', null, /reviewer who did not draw it/],
    ['inReview', 'bench', null, null],
    ['changesRequested', 'designer', /Start the next revision/, null],
    ['clearedForBench', 'bench', /Start a run/, null],
    ['clearedForBench', 'designer', null, /bench has to start/],
    ['clearedForBench', 'reviewer', null, /bench has to start/],
    ['onBench', 'bench', /2 of its lines have no reading/, null],
    ['onBench', 'authority', null, null],
    ['nonconforming', 'designer', /rework it/, null],
    ['nonconforming', 'bench', /Test it again/, null],
    ['nonconforming', 'authority', /concession/, null],
    ['releaseReview', 'authority', /evidence is complete/, null],
    ['releaseReview', 'designer', null, /release authority has to decide/],
    ['released', 'authority', null, null],
    ['abandoned', 'designer', null, null],
  ];
  it.each(rows)('%s, seen by %s', async (state, who, mine, others) => {
    const revision = await bringTo(team, state);
    const seen = await told(team[who] as TestAgent, revision);
    expect(seen.mine).toEqual(mine === null ? [] : [expect.stringMatching(mine)]);
    expect(seen.others).toEqual(others === null ? [] : [expect.stringMatching(others)]);
  });

  it('an author who reviews is not asked to review the own work', async () => {
    const author = await team.server.as('designer', 'reviewer');
    const draft = await bringTo(team, 'draft');
    const submitted = await send(author, draft, 'submit');
    expect((await told(author, submitted)).mine).toEqual([]);
  });

  it('asks for the signature once every line has a reading', async () => {
    const revision = await bringTo(team, 'onBench');
    await takeReadings(team.bench, revision);
    expect((await told(team.bench, revision)).mine).toEqual([expect.stringMatching(/Sign the result of RUN-/)]);
  });

  it('asks the author to answer remarks', async () => {
    const revision = await bringTo(team, 'inReview');
    await send(team.reviewer, revision, 'remark');
    expect((await told(team.designer, revision)).mine).toEqual([expect.stringMatching(/Answer the open remarks/)]);
  });
});
