import type { Deps } from '../../app';
import type { Handlers } from '../../http/handlers';
import { changePerson, createPerson } from './service';
import { listPeople } from './store';

export const peopleHandlers = (deps: Deps): Pick<Handlers, 'listPeople' | 'createPerson' | 'changePerson'> => ({
  listPeople: async () => ({ people: await listPeople(deps.db) }),
  createPerson: ({ body, actor }) => createPerson(deps, body, actor.id),
  changePerson: ({ params, body, actor }) => changePerson(deps, params.personId, body, actor.id),
});
