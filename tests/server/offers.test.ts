import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ErrorAnswer } from '#contracts/error';
import type { Revision } from '#contracts/revisions';
import { eventTypes, eventsOf, offersFor, revisionStates } from '#workflows/revision';
import type { RevisionEventType } from '#workflows/revision';
import { snapshot } from '../support/snapshot';
import {
  bringTo,
  latestOf,
  read,
  reading,
  send,
  sendRaw,
  addInstrument,
  startTeam,
  takeReadings,
} from '../support/way';
import type { Team } from '../support/way';

let team: Team;
beforeAll(async () => {
  team = await startTeam();
  // The author holds every deciding role: only the separation of duties keeps this person from deciding.
  team.designer = await team.server.as('designer', 'reviewer', 'bench', 'releaseAuthority');
});
afterAll(() => team.close());

interface Stand {
  name: string;
  /** Brings a fresh revision there. */
  make: () => Promise<Revision>;
  /** What an event has to carry there to have a chance. */
  changes?: Partial<Record<RevisionEventType, Record<string, unknown>>>;
}

const withRemark = async (blocking: boolean) =>
  send(team.reviewer, await bringTo(team, 'inReview'), 'remark', { blocking });

const stands: Stand[] = [
  ...revisionStates.map((state) => ({ name: state, make: () => bringTo(team, state) })),
  { name: 'inReview with an open blocking remark', make: () => withRemark(true) },
  { name: 'inReview with an open remark', make: () => withRemark(false) },
  {
    name: 'onBench with one reading of two',
    make: async () => {
      const revision = await bringTo(team, 'onBench');
      const instrument = await addInstrument(team.bench);
      await team.bench.post(`/api/runs/${revision.runs[0]?.id ?? ''}/readings`, reading(instrument));
      return revision;
    },
  },
  {
    name: 'onBench with readings that meet',
    make: async () => {
      const revision = await bringTo(team, 'onBench');
      await takeReadings(team.bench, revision);
      return revision;
    },
  },
  {
    name: 'onBench with readings that miss',
    make: async () => {
      const revision = await bringTo(team, 'onBench');
      await takeReadings(team.bench, revision, 1e-4);
      return revision;
    },
    changes: { signResult: { result: 'nonconforming' } },
  },
  {
    name: 'releaseReview with a concession',
    make: async () => send(team.authority, await bringTo(team, 'nonconforming'), 'grantConcession'),
  },
  {
    name: 'releaseReview with an open blocking remark',
    make: async () => send(team.authority, await bringTo(team, 'releaseReview'), 'remark', { blocking: true }),
  },
  {
    name: 'released with a draft of its successor',
    make: async () => send(team.designer, await bringTo(team, 'released'), 'rework'),
  },
  {
    name: 'released with a released successor',
    make: async () => {
      const first = await send(team.designer, await bringTo(team, 'released'), 'rework');
      await bringTo(team, 'released', await latestOf(team.designer, first));
      return first;
    },
  },
];

// Each case sends up to a hundred requests, and one that is cut off would disturb the next: it gets the time it needs.
describe('offered and accepted are the same through the interface', { timeout: 180_000 }, () => {
  it.each(stands)('$name', async ({ make, changes }) => {
    const { designer, reviewer, bench, authority, administrator, server } = team;
    const everything = await server.as('designer', 'reviewer', 'bench', 'releaseAuthority');
    const revision = await make();
    const restore = await snapshot(server.db);
    for (const agent of [designer, reviewer, bench, authority, administrator, everything]) {
      const page = await read(agent, revision.id);
      // Events of other states are the same for everybody; one person who may send anything stands for all.
      for (const type of agent === everything ? eventTypes : eventsOf(page.state)) {
        const offered = page.availableEvents.includes(type);
        const answer = await sendRaw(agent, page, type, changes?.[type]);
        const where = `${type} offered: ${offered}, answered: ${answer.status} ${answer.text.slice(0, 300)}`;
        if (offered) {
          expect(answer.status, where).toBe(200);
          expect((answer.body as Revision).version, where).toBe(page.version + 1);
          await restore();
          continue;
        }
        const known = eventsOf(page.state).includes(type);
        expect(type in page.whyNot, where).toBe(known);
        if (agent === administrator) expect(answer.status, where).toBe(403);
        else if (type === 'closeRemark') expect([403, 409, 422], where).toContain(answer.status);
        else if (known) expect((answer.body as ErrorAnswer).error.message, where).toBe(page.whyNot[type]);
        else expect(answer.status, where).toBe(409);
      }
      expect(await read(agent, revision.id)).toEqual(page);
    }
  });

  it('covers every state', () => {
    expect(new Set(stands.map(({ name }) => name.split(' ')[0]))).toEqual(new Set(revisionStates));
  });

  it('offers what the chart offers with the stored facts', async () => {
    const revision = await bringTo(team, 'releaseReview');
    const page = await read(team.authority, revision.id);
    const row = await team.server.db('revisions').where({ id: revision.id }).first<{ facts: string }>('facts');
    const actor = { id: team.authority.personId ?? '', roles: ['releaseAuthority' as const] };
    const { availableEvents, whyNot } = offersFor('releaseReview', JSON.parse(row.facts) as never, actor);
    expect(page).toMatchObject({ availableEvents, whyNot });
  });
});
