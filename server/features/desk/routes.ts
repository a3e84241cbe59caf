import type { Desk } from '#contracts/desk';
import type { Actor } from '#workflows/revision';
import type { Deps } from '../../app';
import type { Handlers } from '../../http/handlers';
import { latestDeeds } from '../../way/story';
import { seenStates } from '../../way/revisions';
import { onTheWay, waiting } from './waiting';

/** Deeds shown as recent. */
const mostRecent = 15;

async function desk({ db }: Deps, actor: Actor): Promise<Desk> {
  const states = seenStates(actor);
  const recent = await latestDeeds(db, states, mostRecent);
  if (states !== 'all') return { waitsForMe: [], iWaitFor: [], recent };
  return { ...waiting(await onTheWay(db, actor.id), actor), recent };
}

export const deskHandlers = (deps: Deps): Pick<Handlers, 'readDesk'> => ({
  readDesk: ({ actor }) => desk(deps, actor),
});
