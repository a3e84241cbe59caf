import { useCallback, useEffect, useMemo, useReducer, useRef, useState } from 'react';
import { readDesignDocument } from '#contracts/design-document';
import { estimateRoutes } from '#contracts/estimates';
import type { EstimateRequest } from '#contracts/estimates';
import { callRoute } from '../../lib/fetch-json';
import { isCancelled, isRequestError, messageOf } from '../../lib/request-error';
import { follow, freshnessOf, nothingYet } from './live-estimate';
import type { Freshness, LiveEstimate } from './live-estimate';

/** ms without a further change before the server is asked. */
const pause = 100;

/**
 * The estimate of a document as it is typed: asked for when typing pauses, the request before it given up, the last good answer
 * kept. A document that is faulty by its form alone is told so at once, without asking.
 * @param request null asks for nothing.
 */
export function useLiveEstimate(
  request: EstimateRequest | null,
): LiveEstimate & { freshness: Freshness; again: () => void } {
  const [state, dispatch] = useReducer(follow, nothingYet);
  const wanted = useMemo(() => (request === null ? '' : JSON.stringify(request)), [request]);
  const latest = useRef(request);
  const [attempt, setAttempt] = useState(0);
  const asked = useRef(false);
  useEffect(() => {
    latest.current = request;
  });
  useEffect(() => {
    const body = latest.current;
    if (wanted === '' || body === null) return;
    const gone = new AbortController();
    const timer = setTimeout(
      () => {
        asked.current = true;
        dispatch({ type: 'asked', request: wanted });
        const reading = readDesignDocument(body.design);
        if (!reading.ok) {
          dispatch({ type: 'refused', request: wanted, design: body.design, issues: [...reading.issues] });
          return;
        }
        callRoute(estimateRoutes.estimate, { body, signal: gone.signal }).then(
          (estimate) => dispatch({ type: 'answered', request: wanted, design: body.design, estimate }),
          (error: unknown) => {
            if (gone.signal.aborted || isCancelled(error)) return;
            if (isRequestError(error, 'invalid'))
              dispatch({ type: 'refused', request: wanted, design: body.design, issues: error.issues });
            else dispatch({ type: 'failed', request: wanted, message: messageOf(error) });
          },
        );
      },
      asked.current ? pause : 0,
    );
    return () => {
      clearTimeout(timer);
      gone.abort();
    };
  }, [wanted, attempt]);

  const freshness = freshnessOf(state, wanted);
  const again = useCallback(() => setAttempt((before) => before + 1), []);
  useEffect(() => {
    if (freshness !== 'failed') return;
    window.addEventListener('online', again);
    const timer = setTimeout(again, 5000);
    return () => {
      window.removeEventListener('online', again);
      clearTimeout(timer);
    };
  }, [freshness, again, attempt]);
  return { ...state, freshness, again };
}
