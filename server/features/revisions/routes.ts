import type { Deps } from '../../app';
import type { Handlers } from '../../http/handlers';
import { changeDraft, readRevision, sendEvent } from './service';
import { passwordCheck } from './signing';

type RevisionRoutes = 'readRevision' | 'saveDraft' | 'sendEvent';

export function revisionHandlers(deps: Deps): Pick<Handlers, RevisionRoutes> {
  const confirmPassword = passwordCheck(deps);
  return {
    readRevision: ({ params, actor }) => readRevision(deps, params.revisionId, actor),
    saveDraft: ({ params, body, actor }) => changeDraft(deps, params.revisionId, body, actor),
    sendEvent: ({ params, body, actor }) => sendEvent(deps, params.revisionId, body, actor, confirmPassword),
  };
}
