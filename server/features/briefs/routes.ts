import type { Deps } from '../../app';
import type { Handlers } from '../../http/handlers';
import { changeBrief, createBrief, listBriefs, readBrief } from './service';

type BriefRoutes = 'listBriefs' | 'createBrief' | 'readBrief' | 'changeBrief';

export const briefHandlers = (deps: Deps): Pick<Handlers, BriefRoutes> => ({
  listBriefs: ({ actor }) => listBriefs(deps, actor),
  createBrief: ({ body, actor }) => createBrief(deps, body, actor),
  readBrief: ({ params, actor }) => readBrief(deps, params.briefId, actor),
  changeBrief: ({ params, body, actor }) => changeBrief(deps, params.briefId, body, actor),
});
