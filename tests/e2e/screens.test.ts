import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { axeViolations, launchBrowser, openContext, settled, watchErrors } from '../support/browser';
import { startProduction } from '../support/production';
import type { Production } from '../support/production';
import { Profiles } from '../support/profiles';
import { screens } from '../support/screens';

let production: Production;
let browser: Browser;
let profiles: Profiles;

beforeAll(async () => {
  [production, browser] = await Promise.all([startProduction(), launchBrowser()]);
  profiles = new Profiles(browser, production.url);
});
afterAll(async () => {
  await browser.close();
  await production.close();
});

// Both themes and both ends of the widths that people use, in two loads of each screen.
const looks = [
  { theme: 'light', width: 1440, shown: screens },
  { theme: 'dark', width: 390, shown: screens.filter(({ further }) => !further) },
] as const;

describe.each(looks)('every screen, $theme, $width px', ({ theme, width, shown }) => {
  it.concurrent.each(shown.map((screen) => ({ screen, name: screen.name })))(
    '$name: WCAG 2.2 AA, nothing on the console, no scrolling sideways',
    async ({ screen }) => {
      const context = await openContext(browser, theme, width, 900, await profiles.of(screen.as));
      try {
        const page = await context.newPage();
        const errors = watchErrors(page, screen.expectedErrors);
        await screen.open(page, production.url);
        if (screen.settle !== false) await settled(page);
        expect(await axeViolations(page)).toEqual([]);
        const overflow = await page.evaluate(
          () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
        );
        expect(overflow).toBeLessThanOrEqual(0);
        expect(errors).toEqual([]);
      } finally {
        await context.close();
      }
    },
  );
});
