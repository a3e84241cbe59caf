import { existsSync, readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type * as AxeCoreModule from 'axe-core';
import { chromium } from 'playwright-core';
import type { Browser, BrowserContext, BrowserContextOptions, Page } from 'playwright-core';

type AxeCore = typeof AxeCoreModule;

const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

export const chromiumPath = process.env.CHROMIUM_PATH ?? '/usr/bin/chromium';

/** Starts Debian's Chromium without its background connections; says what to install where it is missing. */
export async function launchBrowser(): Promise<Browser> {
  if (!existsSync(chromiumPath)) {
    throw new Error(`No Chromium at ${chromiumPath}: apt-get install chromium, or set CHROMIUM_PATH.`);
  }
  return chromium.launch({
    executablePath: chromiumPath,
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  });
}

export type Theme = 'light' | 'dark';

/** A fresh profile in one theme and size; `storageState` starts it with the cookies of another. */
export const openContext = (
  browser: Browser,
  theme: Theme,
  width: number,
  height = 900,
  storageState?: BrowserContextOptions['storageState'],
): Promise<BrowserContext> =>
  browser.newContext({
    ...(storageState ? { storageState } : {}),
    colorScheme: theme,
    viewport: { width, height },
    reducedMotion: 'reduce',
    locale: 'en-GB',
    timezoneId: 'Europe/London',
  });

/**
 * Collects everything that the console or the page itself reports as an error. Answers of 401, 409 and 422 that a test
 * provokes on purpose are named by the test; anything else fails it.
 */
export function watchErrors(page: Page, expected: readonly RegExp[] = []): string[] {
  const errors: string[] = [];
  const keep = (text: string) => {
    if (!expected.some((pattern) => pattern.test(text))) errors.push(text);
  };
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning')
      keep(`${message.text()} (${message.location().url})`);
  });
  page.on('pageerror', (error) => keep(String(error)));
  return errors;
}

/** Violations of WCAG 2.2 A and AA on the page as it stands, one line each. */
export async function axeViolations(page: Page): Promise<string[]> {
  await page.evaluate(axeSource);
  return page.evaluate(async () => {
    const { axe } = globalThis as unknown as { axe: AxeCore };
    const { violations } = await axe.run(document, {
      runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'],
    });
    return violations.flatMap(({ id, help, nodes }) =>
      nodes.map(({ target, failureSummary }) => `${id}: ${help}; ${target.join(' ')}; ${failureSummary ?? ''}`),
    );
  });
}

/** Waits until nothing is loading: no request under way and no pending mark on screen. */
export async function settled(page: Page): Promise<void> {
  await page.waitForLoadState('networkidle');
  await page.waitForFunction(() => document.querySelector('[aria-busy="true"]') === null, undefined, {
    timeout: 60_000,
  });
  await page.evaluate(() => document.fonts.ready);
}
