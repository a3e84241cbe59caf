import type { EstimateRequest } from '#contracts/estimates';
import { answerTo } from './estimate-request';
import type { EstimateAnswer } from './estimate-request';

/** What a worker thread does with one request. */
const work = (request: EstimateRequest): EstimateAnswer => answerTo(request);
export default work;
