import type { Deps } from '../../app';
import type { Handlers } from '../../http/handlers';
import { listRuns } from './list';
import { addReading, readRun, recordConditions, strikeReading } from './service';

type RunRoutes = 'listRuns' | 'readRun' | 'recordConditions' | 'addReading' | 'strikeReading';

export const runHandlers = (deps: Deps): Pick<Handlers, RunRoutes> => ({
  listRuns: () => listRuns(deps.db),
  readRun: ({ params, actor }) => readRun(deps, params.runId, actor),
  recordConditions: ({ params, body, actor }) => recordConditions(deps, params.runId, body, actor),
  addReading: ({ params, body, actor }) => addReading(deps, params.runId, body, actor),
  strikeReading: ({ params, body, actor }) => strikeReading(deps, params.runId, params.readingId, body.reason, actor),
});
