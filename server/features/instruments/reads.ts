export { calibrationHolds, loadInstrument } from './store';
