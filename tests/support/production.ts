import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { programEnvironment } from './environment';

export interface Production {
  url: string;
  dataDir: string;
  /** Everything that the process wrote so far. */
  output(): string;
  /** Ends the process at once, as a power cut would. */
  kill(): Promise<void>;
  /** Starts it again on the same data. */
  restart(environment?: Record<string, string>): Promise<void>;
  /** Ends it in good order and removes its data. */
  close(): Promise<void>;
}

const freePort = (): Promise<number> =>
  new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as AddressInfo;
      probe.close(() => resolve(port));
    });
  });

const exited = (child: ChildProcess): Promise<void> =>
  child.exitCode !== null || child.signalCode !== null
    ? Promise.resolve()
    : new Promise((resolve) => child.once('exit', () => resolve()));

/** `npm start` as on a new machine, on a free port and an own data folder: production build, migrated, seeded unless told not to. */
export async function startProduction(
  environment: Record<string, string> = {},
  { demo = true }: { demo?: boolean } = {},
): Promise<Production> {
  const dataDir = mkdtempSync(join(tmpdir(), 'tremolode-'));
  const port = await freePort();
  const url = `http://127.0.0.1:${port}`;
  let child: ChildProcess;
  let written = '';

  const start = async (extra: Record<string, string>) => {
    child = spawn(process.execPath, ['scripts/start.mjs', ...(demo ? [] : ['--no-demo'])], {
      env: programEnvironment({ PORT: String(port), DATA_DIR: dataDir, LOG_LEVEL: 'warn', ...extra }),
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    for (const stream of [child.stdout, child.stderr]) {
      stream?.on('data', (chunk: Buffer) => (written += chunk.toString()));
    }
    const deadline = Date.now() + 120_000;
    for (;;) {
      if (child.exitCode !== null) throw new Error(`The server ended while starting:\n${written}`);
      const answer = await fetch(`${url}/api/health`).catch(() => null);
      if (answer?.ok) return;
      if (Date.now() > deadline) throw new Error(`The server did not answer in time:\n${written}`);
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
  };
  await start(environment);

  return {
    url,
    dataDir,
    output: () => written,
    async kill() {
      child.kill('SIGKILL');
      await exited(child);
    },
    restart: (again = environment) => start(again),
    async close() {
      child.kill('SIGTERM');
      await exited(child);
      rmSync(dataDir, { recursive: true, force: true });
    },
  };
}
