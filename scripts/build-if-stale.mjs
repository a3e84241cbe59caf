import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';

const shared = ['package.json', 'package-lock.json'];
/** What each half is made of, how, and the file whose age tells when that was done. */
const halves = [
  {
    name: 'client',
    sources: [
      ...shared,
      'src',
      'server/contracts',
      'server/physics',
      'workflows',
      'vite.config.ts',
      'tailwind.config.ts',
    ],
    made: 'dist/client/index.html',
    command: ['node_modules/vite/bin/vite.js', 'build', '--logLevel', 'warn'],
  },
  {
    name: 'server',
    sources: [...shared, 'server', 'workflows', 'migrations', 'scripts/build-server.mjs'],
    made: 'dist/server/index.js',
    command: ['scripts/build-server.mjs'],
  },
];

/** Youngest change below a path; folders count, so that a removed file is noticed. */
function newest(path) {
  const status = statSync(path);
  if (!status.isDirectory()) return status.mtimeMs;
  return readdirSync(path).reduce((latest, name) => Math.max(latest, newest(join(path, name))), status.mtimeMs);
}

const isStale = ({ sources, made }) => !existsSync(made) || Math.max(...sources.map(newest)) > statSync(made).mtimeMs;

/** Builds the half of the bundle that is missing or older than its sources. Ends the process where a build fails. */
export function buildIfStale() {
  for (const half of halves.filter(isStale)) {
    const started = Date.now();
    console.log(`Building the ${half.name} …`);
    const { status } = spawnSync(process.execPath, half.command, {
      stdio: 'inherit',
      env: { ...process.env, NODE_ENV: 'production' },
    });
    if (status !== 0) {
      console.error(`Building the ${half.name} failed.`);
      process.exit(1);
    }
    console.log(`Built the ${half.name} in ${((Date.now() - started) / 1000).toFixed(1)} s.`);
  }
}
