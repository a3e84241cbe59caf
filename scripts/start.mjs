import { prepare } from './prepare.mjs';

// The server runs in this very process, so that a signal to `npm start` reaches it.
await prepare();
await import('../dist/server/index.js');
const { BASE_URL, HOST, PORT } = process.env;
console.log(
  `\nTremolode is ready: ${BASE_URL || `http://${HOST || '127.0.0.1'}:${PORT || 4480}`}   (Ctrl+C stops it)\n`,
);
