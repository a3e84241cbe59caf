import type { Deps } from '../app';
import { openApi } from '../openapi';
import type { Handlers } from './handlers';

export const systemHandlers = ({ db, config, estimator }: Deps): Pick<Handlers, 'readHealth' | 'readOpenApi'> => ({
  async readHealth() {
    await db.raw('SELECT 1');
    return { ok: true, version: config.version, engine: estimator.engine };
  },
  readOpenApi: () => Promise.resolve(openApi(config.version)),
});
