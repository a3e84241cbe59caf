import { Piscina } from 'piscina';
import type { EstimateRequest } from '#contracts/estimates';
import { engineVersion } from '#physics/engine';
import { invalid, unavailable } from '../errors';
import type { EstimateAnswer } from './estimate-request';
import type { Estimator } from './estimator';
import { rememberEstimates } from './remembered-estimates';

const threads = { least: 1, most: 2 };
/** Requests that may wait; beyond this the server says that it is busy. */
const longestQueue = 200;
/** A thread is ended only when a request that nobody waits for has kept it this long: starting a thread costs more. */
const patience = 250;
/** No estimate may take longer, ms. */
const limit = 60_000;

const fromSource = import.meta.url.endsWith('.ts');
const workerFile = new URL(fromSource ? './estimate-worker-dev.mjs' : './estimate-worker.js', import.meta.url);

const aborted = (): Error =>
  Object.assign(new Error('Nobody waits for this estimate any more.'), { name: 'AbortError' });

interface Waiting {
  start: () => void;
  giveUp: () => void;
}

/** Estimates in worker threads, at most two at a time, so that the server goes on answering meanwhile. */
export function estimatesInThreads(): Estimator {
  const pool = new Piscina({
    filename: workerFile.href,
    minThreads: threads.least,
    maxThreads: threads.most,
    idleTimeout: 60_000,
  });
  const waiting: Waiting[] = [];
  let running = 0;

  /** Waits for a free thread; leaves the queue at once when the signal aborts. */
  const turn = (signal: AbortSignal | undefined): Promise<void> => {
    if (signal?.aborted === true) return Promise.reject(aborted());
    if (running < threads.most) {
      running += 1;
      return Promise.resolve();
    }
    if (waiting.length >= longestQueue) {
      return Promise.reject(unavailable('Too many estimates are waiting. Try again in a moment.'));
    }
    return new Promise((resolve, reject) => {
      const place: Waiting = {
        start() {
          signal?.removeEventListener('abort', place.giveUp);
          running += 1;
          resolve();
        },
        giveUp() {
          waiting.splice(waiting.indexOf(place), 1);
          reject(aborted());
        },
      };
      signal?.addEventListener('abort', place.giveUp, { once: true });
      waiting.push(place);
    });
  };

  const nextTurn = () => {
    running -= 1;
    waiting.shift()?.start();
  };

  /** Runs in a thread. An abort answers the caller at once and ends the thread only after a while. */
  const inThread = (request: EstimateRequest, signal: AbortSignal | undefined): Promise<EstimateAnswer> =>
    new Promise((resolve, reject) => {
      const end = new AbortController();
      const late = setTimeout(() => {
        reject(unavailable(`This estimate takes longer than ${limit / 1000} s and was given up.`));
        end.abort();
      }, limit);
      const nobodyWaits = () => {
        reject(aborted());
        setTimeout(() => end.abort(), patience).unref();
      };
      signal?.addEventListener('abort', nobodyWaits, { once: true });
      (pool.run(request, { signal: end.signal }) as Promise<EstimateAnswer>).then(resolve, reject).finally(() => {
        clearTimeout(late);
        signal?.removeEventListener('abort', nobodyWaits);
        nextTurn();
      });
    });

  return rememberEstimates({
    engine: engineVersion,
    async estimate(request, signal) {
      await turn(signal);
      if (signal?.aborted === true) {
        nextTurn();
        throw aborted();
      }
      const answer = await inThread(request, signal);
      if (!answer.ok) throw invalid(answer.issues);
      return answer.estimate;
    },
    async close() {
      for (const { giveUp } of [...waiting]) giveUp();
      await pool.destroy();
    },
  });
}
