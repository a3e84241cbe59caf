import type { Deps } from '../../app';
import type { Handlers } from '../../http/handlers';
import { createDesign, listDesigns, readDesign } from './service';

export const designHandlers = (deps: Deps): Pick<Handlers, 'listDesigns' | 'createDesign' | 'readDesign'> => ({
  listDesigns: ({ actor }) => listDesigns(deps, actor),
  createDesign: ({ body, actor }) => createDesign(deps, body, actor),
  readDesign: ({ params, actor }) => readDesign(deps, params.designId, actor),
});
