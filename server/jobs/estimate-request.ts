import type { Issue } from '#contracts/error';
import type { Estimate, EstimateRequest } from '#contracts/estimates';
import { DocumentError, estimate } from '#physics/estimate';

/** The answer in a form that crosses threads; issues carry the path within the request. */
export type EstimateAnswer = { ok: true; estimate: Estimate } | { ok: false; issues: Issue[] };

/** Computes one request on the calling thread. Anything thrown besides a faulty document is a bug of the core. */
export function answerTo({
  design,
  vibration,
  positions,
  quietArrays,
  temperatureRange,
}: EstimateRequest): EstimateAnswer {
  try {
    return {
      ok: true,
      estimate: estimate(design, vibration, { positions, arrays: quietArrays !== true, temperatureRange }),
    };
  } catch (error) {
    if (!(error instanceof DocumentError)) throw error;
    return {
      ok: false,
      issues: error.issues.map(({ document, path, value, message, limit }) => ({
        path: [document ?? '', path].filter((part) => part !== '').join('.'),
        value,
        message,
        ...(limit === undefined ? {} : { limit }),
      })),
    };
  }
}
