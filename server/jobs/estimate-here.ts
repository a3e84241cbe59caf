import { engineVersion } from '#physics/engine';
import { invalid } from '../errors';
import { answerTo } from './estimate-request';
import type { Estimator } from './estimator';
import { rememberEstimates } from './remembered-estimates';

/** Estimates on the calling thread: for tools and tests, where nobody else waits. */
export const estimatesHere = (): Estimator =>
  rememberEstimates({
    engine: engineVersion,
    async estimate(request) {
      const answer = answerTo(request);
      if (!answer.ok) throw invalid(answer.issues);
      return answer.estimate;
    },
    close: () => Promise.resolve(),
  });
