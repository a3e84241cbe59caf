import type { Estimate, EstimateRequest } from '#contracts/estimates';

/** Where estimates come from: worker threads when serving, the calling thread in tests and tools. */
export interface Estimator {
  /** Version of the numerical core, as stored with each estimate. */
  engine: string;
  /** Throws DomainError `invalid` naming what is wrong with a document; rejects when the signal aborts. */
  estimate(request: EstimateRequest, signal?: AbortSignal): Promise<Estimate>;
  close(): Promise<void>;
}
