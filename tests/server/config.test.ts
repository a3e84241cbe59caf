import { mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { ConfigError, loadConfig } from '#server/config';

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'tremolode-config-'));
});
afterEach(() => rmSync(folder, { recursive: true }));
const load = (environment: Record<string, string> = {}) => loadConfig({ DATA_DIR: folder, ...environment });

describe('the configuration', () => {
  test('needs nothing', () => {
    expect(load()).toMatchObject({
      host: '127.0.0.1',
      port: 4480,
      baseUrl: 'http://127.0.0.1:4480',
      dataDir: folder,
      databaseFile: join(folder, 'tremolode.sqlite'),
      tls: false,
      trustedProxies: 0,
      mail: { smtpUrl: null, from: 'Tremolode <tremolode@localhost.example>' },
    });
  });

  test('takes what is given; empty counts as absent', () => {
    expect(
      load({
        PORT: '4490',
        HOST: '',
        BASE_URL: 'https://tremolode.fennmark.example/',
        TRUST_PROXY: '1',
        SMTP_URL: 'smtp://mail.fennmark.example:587',
        SESSION_SECRET: 'x'.repeat(40),
      }),
    ).toMatchObject({
      host: '127.0.0.1',
      port: 4490,
      baseUrl: 'https://tremolode.fennmark.example',
      tls: true,
      sessionSecret: 'x'.repeat(40),
      mail: {
        smtpUrl: 'smtp://mail.fennmark.example:587',
        from: 'Tremolode <tremolode@tremolode.fennmark.example>',
      },
    });
    expect(load({ TRUST_PROXY: '1', TLS: 'false' }).tls).toBe(false);
  });

  test.each([
    ['PORT', 'eighty'],
    ['PORT', '70000'],
    ['BASE_URL', 'tremolode.example'],
    ['BASE_URL', 'javascript:alert(1)'],
    ['SMTP_URL', 'http://mail.example'],
    ['MAIL_FROM', 'nobody'],
    ['MAIL_FROM', 'a@b.example\r\nBcc: c@d.example'],
    ['SESSION_SECRET', 'short'],
    ['TLS', 'maybe'],
    ['TRUST_PROXY', 'yes'],
    ['LOG_LEVEL', 'loud'],
  ])('%s=%j is refused by name', (name, value) => {
    expect(() => load({ [name]: value })).toThrow(ConfigError);
    expect(() => load({ [name]: value })).toThrow(new RegExp(`^  ${name}: .+`, 'm'));
  });

  test('https without a proxy that ends it is refused', () => {
    expect(() => load({ BASE_URL: 'https://tremolode.example' })).toThrow(/TRUST_PROXY/);
    expect(() => load({ TLS: 'true' })).toThrow(/TRUST_PROXY/);
  });

  test('a secret is made once, kept, and readable by its owner only', () => {
    const { sessionSecret } = load();
    expect(sessionSecret).toMatch(/^[0-9a-f]{64}$/);
    const file = join(folder, 'session-secret');
    expect(statSync(file).mode & 0o777).toBe(0o600);
    expect(readFileSync(file, 'utf8').trim()).toBe(sessionSecret);
    expect(load().sessionSecret).toBe(sessionSecret);
  });
});
