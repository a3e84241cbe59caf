import { readdirSync, rmSync } from 'node:fs';
import { build } from 'esbuild';

/** Bundles the server, its set-up, and its worker threads; installed packages stay outside. */
const workers = readdirSync('server/jobs').filter((file) => file.endsWith('-worker.ts'));

rmSync('dist/server', { recursive: true, force: true });
await build({
  entryPoints: ['server/index.ts', 'server/cli/setup.ts', ...workers.map((file) => `server/jobs/${file}`)],
  outdir: 'dist/server',
  entryNames: '[name]',
  bundle: true,
  splitting: true,
  platform: 'node',
  target: 'node20',
  format: 'esm',
  packages: 'external',
  sourcemap: true,
  logLevel: 'warning',
});
