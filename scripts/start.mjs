import { prepare } from './prepare.mjs';

// The server runs in this very process, so that a signal to `npm start` reaches it.
await prepare();
await import('../dist/server/index.js');
