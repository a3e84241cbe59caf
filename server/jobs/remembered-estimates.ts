import type { Estimate, EstimateRequest } from '#contracts/estimates';
import { canonicalJson, sha256 } from '../canonical-json';
import type { Estimator } from './estimator';

/** Estimates kept; one with arrays takes some 100 kB. */
const kept = 64;
/** Longer requests (recordings) are cheaper to compute again than to keep. */
const longestKept = 200_000;

/** Null for what is not remembered: long requests, and those with numbers that JSON cannot say, which are refused anyway. */
function keyOf(request: EstimateRequest): string | null {
  try {
    const text = canonicalJson(request);
    return text.length > longestKept ? null : sha256(text);
  } catch (error) {
    if (error instanceof TypeError) return null;
    throw error;
  }
}

/** Answers the same request from memory: an estimate is a pure function of it. The least recently asked go first. */
export function rememberEstimates(estimator: Estimator): Estimator {
  const memory = new Map<string, Estimate>();
  return {
    ...estimator,
    async estimate(request, signal) {
      const key = keyOf(request);
      const known = key === null ? undefined : memory.get(key);
      const estimate = known ?? (await estimator.estimate(request, signal));
      if (key !== null) {
        memory.delete(key);
        memory.set(key, estimate);
        const [oldest] = memory.keys();
        if (memory.size > kept && oldest !== undefined) memory.delete(oldest);
      }
      return estimate;
    },
  };
}
