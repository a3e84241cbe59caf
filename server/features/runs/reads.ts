export { benchRequirements, linesOf } from './lines';
export { findRun, runsOfRevision, summaryOf } from './store';
export type { StoredRun } from './store';
