export { digestOf, evidenceOf } from './evidence';
export type { Evidence } from './evidence';
