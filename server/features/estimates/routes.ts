import type { Deps } from '../../app';
import type { Handlers } from '../../http/handlers';

/** A client that has gone away takes its estimate with it: while typing, only the last one is waited for. */
export const estimateHandlers = ({ estimator }: Deps): Pick<Handlers, 'estimate'> => ({
  estimate: ({ body, request }) => {
    const gone = new AbortController();
    request.res?.once('close', () => gone.abort());
    return estimator.estimate(body, gone.signal);
  },
});
