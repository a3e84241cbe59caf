import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { createApp } from './app';
import { ConfigError, loadConfig } from './config';
import { migrateToLatest } from './db';
import { closeDeps, openDeps } from './deps';
import { removeExpiredSessions } from './http/session-store';
import { smtpTransport } from './mail/transport';
import { startMailWorker } from './mail/worker';
import { openApi } from './openapi';

const hour = 60 * 60 * 1000;
/** Requests under way get this long to end when the server is told to stop. */
const grace = 10_000;

/** Resolves once requests are answered. */
async function serve(): Promise<void> {
  const config = loadConfig(process.env);
  const deps = openDeps(config);
  const { db, log, now } = deps;
  const carriedOut = await migrateToLatest(db);
  if (carriedOut.length > 0) log.info({ migrations: carriedOut }, 'Database brought up to date');

  if ((await db('people').first('id')) === undefined) {
    log.warn('Nobody can sign in yet. For the demonstration: npm run seed. For real work: npm run setup -- --no-demo');
  }

  const { smtpUrl } = config.mail;
  const mailWorker = startMailWorker({
    db,
    log,
    now,
    transport: smtpUrl === null ? null : smtpTransport(smtpUrl, config),
  });
  const sweep = () => {
    removeExpiredSessions(db, now()).catch((error: unknown) => log.error({ err: error }, 'Old sessions stay'));
  };
  sweep();
  const sweeper = setInterval(sweep, hour);

  // Takes a moment: made now rather than while somebody waits.
  openApi(config.version);
  const server = createServer(createApp(deps));
  server.listen(config.port, config.host);
  await new Promise<void>((resolve, reject) => {
    server.once('listening', resolve);
    server.once('error', reject);
  });
  const { address, port } = server.address() as AddressInfo;
  log.info(
    { mail: smtpUrl === null ? 'kept here' : 'by SMTP', data: config.dataDir },
    `Serving http://${address}:${port}`,
  );

  const stop = async (signal: string): Promise<void> => {
    log.info(`${signal}: stopping`);
    clearInterval(sweeper);
    const closed = new Promise<void>((resolve) => server.close(() => resolve()));
    server.closeIdleConnections();
    const cut = setTimeout(() => server.closeAllConnections(), grace);
    await closed;
    clearTimeout(cut);
    await mailWorker.stop();
    await closeDeps(deps);
    log.info('Stopped');
  };
  let stopping = false;
  for (const signal of ['SIGTERM', 'SIGINT'] as const) {
    process.on(signal, () => {
      if (stopping) process.exit(1);
      stopping = true;
      stop(signal).then(
        () => process.exit(0),
        (error: unknown) => {
          log.fatal({ err: error }, 'Stopping failed');
          process.exit(1);
        },
      );
    });
  }
}

await serve().catch((error: unknown) => {
  const inUse = error instanceof Error && 'code' in error && error.code === 'EADDRINUSE';
  if (error instanceof ConfigError) console.error(error.message);
  else if (inUse) console.error('The port is in use already. PORT chooses another.');
  else console.error(error);
  process.exit(1);
});
