import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { z } from 'zod';

export interface Config {
  production: boolean;
  host: string;
  port: number;
  /** Address that people use, without a slash at the end; for links in mail. */
  baseUrl: string;
  dataDir: string;
  /** File of the database, or `:memory:`. */
  databaseFile: string;
  /** The built client: index.html and assets/. */
  clientDir: string;
  sessionSecret: string;
  /** People come by https, as they do behind a trusted proxy unless TLS=false: cookies are Secure and browsers are told to stay with it. */
  tls: boolean;
  /** How many proxies in front are trusted to tell the caller's address. */
  trustedProxies: number;
  mail: { smtpUrl: string | null; from: string };
  logLevel: 'silent' | 'fatal' | 'error' | 'warn' | 'info' | 'debug' | 'trace';
  version: string;
}

/** The folder with package.json above this file: the same from source and from the bundle. */
function projectRoot(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, 'package.json'))) {
    const above = dirname(folder);
    if (above === folder) throw new Error('package.json was not found above the server.');
    folder = above;
  }
  return folder;
}

const text = z.string().trim();
const yesOrNo = z
  .enum(['true', 'false', '1', '0'], 'Say true or false.')
  .transform((word) => word === 'true' || word === '1');

const Environment = z
  .object({
    NODE_ENV: text.default('development'),
    HOST: text.min(1).default('127.0.0.1'),
    PORT: z.coerce.number('A port is a number.').int('A port is whole.').min(0).max(65_535).default(4480),
    BASE_URL: z.url({ protocol: /^https?$/, error: 'Give an http or https address.' }).optional(),
    DATA_DIR: text.min(1).default('data'),
    SESSION_SECRET: z.string().min(32, 'At least 32 characters.').optional(),
    TLS: yesOrNo.optional(),
    TRUST_PROXY: z.coerce.number('Give the number of proxies in front.').int().min(0).max(10).default(0),
    SMTP_URL: z.url({ protocol: /^smtps?$/, error: 'Give an smtp: or smtps: address.' }).optional(),
    MAIL_FROM: text
      .max(320)
      .regex(/^[^\r\n]*@[^\r\n]+$/, 'Give a sender as “Name <address>” or an address.')
      .optional(),
    LOG_LEVEL: z.enum(['silent', 'fatal', 'error', 'warn', 'info', 'debug', 'trace']).default('info'),
  })
  .refine(({ TLS, TRUST_PROXY }) => TLS !== true || TRUST_PROXY > 0, {
    path: ['TRUST_PROXY'],
    message: 'TLS=true needs the proxy that ends TLS: give the number of proxies in front, usually 1.',
  })
  .refine(({ BASE_URL, TRUST_PROXY }) => BASE_URL?.startsWith('https:') !== true || TRUST_PROXY > 0, {
    path: ['TRUST_PROXY'],
    message: 'An https address needs the proxy that ends TLS: give the number of proxies in front, usually 1.',
  });

export class ConfigError extends Error {
  override readonly name = 'ConfigError';
}

/** Kept in the data folder so that sessions outlive a restart; readable by the server's own user only. */
function keptSecret(dataDir: string): string {
  const file = join(dataDir, 'session-secret');
  if (existsSync(file)) return readFileSync(file, 'utf8').trim();
  mkdirSync(dataDir, { recursive: true, mode: 0o700 });
  const secret = randomBytes(32).toString('hex');
  writeFileSync(file, `${secret}\n`, { mode: 0o600, flag: 'wx' });
  return secret;
}

/** A name that can stand in an address: not that of this very machine. */
function mailHost(baseUrl: string): string {
  const { hostname } = new URL(baseUrl);
  return /^[\d.]+$|^\[|^localhost$/.test(hostname) ? 'localhost.example' : hostname;
}

/**
 * Reads the environment. Empty variables count as absent. Throws ConfigError naming each bad variable.
 * Where SESSION_SECRET is absent, one is made and kept in the data folder.
 */
export function loadConfig(environment: NodeJS.ProcessEnv): Config {
  const given = Object.fromEntries(Object.entries(environment).filter(([, value]) => value !== ''));
  const read = Environment.safeParse(given);
  if (!read.success) {
    const faults = read.error.issues.map(({ path, message }) => `${path.join('.')}: ${message}`);
    throw new ConfigError(`The configuration cannot be used.\n${faults.map((fault) => `  ${fault}`).join('\n')}`);
  }
  const env = read.data;
  const root = projectRoot();
  const dataDir = resolve(root, env.DATA_DIR);
  const baseUrl = (env.BASE_URL ?? `http://127.0.0.1:${env.PORT}`).replace(/\/+$/, '');
  const { version } = z
    .object({ version: z.string() })
    .parse(JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')));
  return {
    production: env.NODE_ENV === 'production',
    host: env.HOST,
    port: env.PORT,
    baseUrl,
    dataDir,
    databaseFile: join(dataDir, 'tremolode.sqlite'),
    clientDir: join(root, 'dist', 'client'),
    sessionSecret: env.SESSION_SECRET ?? keptSecret(dataDir),
    tls: env.TLS ?? env.TRUST_PROXY > 0,
    trustedProxies: env.TRUST_PROXY,
    mail: {
      smtpUrl: env.SMTP_URL ?? null,
      from: env.MAIL_FROM ?? `Tremolode <tremolode@${mailHost(baseUrl)}>`,
    },
    logLevel: env.LOG_LEVEL,
    version,
  };
}
