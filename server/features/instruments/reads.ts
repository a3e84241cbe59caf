export { calibrationHolds, loadInstrument } from './store';
export type { InstrumentRow } from './store';
