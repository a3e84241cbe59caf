export { digestOf, evidenceOf } from './evidence';
