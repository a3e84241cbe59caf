import { register } from 'tsx/esm/api';

// A worker thread does not inherit the loader of the main thread: from source it has to be told of TypeScript itself.
register();
const { default: work } = await import('./estimate-worker.ts');
export default work;
