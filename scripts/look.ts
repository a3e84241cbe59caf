import { mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Browser } from 'playwright-core';
import { axeViolations, launchBrowser, openContext, settled, watchErrors } from '../tests/support/browser';
import type { Theme } from '../tests/support/browser';
import { Profiles } from '../tests/support/profiles';
import { startProduction } from '../tests/support/production';
import { screens } from '../tests/support/screens';
import type { Screen } from '../tests/support/screens';

/**
 * Photographs every screen of the seeded production build in its main states, both themes, three widths, into look/ with a
 * contact sheet per screen. `npm run look -- desk run` takes only screens whose name contains one of the words;
 * `--widths 390,1440` only these widths.
 */
const folder = 'look';
const words = process.argv
  .slice(2)
  .filter((word, index, all) => !word.startsWith('--') && all[index - 1] !== '--widths');
const widthsAt = process.argv.indexOf('--widths');
const widths = widthsAt < 0 ? [390, 1440, 2560] : (process.argv[widthsAt + 1] ?? '').split(',').map(Number);
const themes: Theme[] = ['light', 'dark'];
const heights: Record<number, number> = { 390: 844, 1440: 900, 2560: 1440 };

async function photograph(
  browser: Browser,
  profiles: Profiles,
  url: string,
  screen: Screen,
  theme: Theme,
  width: number,
): Promise<string[]> {
  const profile = await profiles.of(screen.as);
  const context = await openContext(browser, theme, width, heights[width] ?? 900, profile);
  const page = await context.newPage();
  const remarks = watchErrors(page, screen.expectedErrors ?? []);
  try {
    await screen.open(page, url);
    if (screen.settle !== false) await settled(page);
    await page.screenshot({ path: join(folder, `${screen.name}-${theme}-${width}.png`), fullPage: true });
    if (width !== 2560) remarks.push(...(await axeViolations(page)));
    const overflow = await page.evaluate(
      () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
    );
    if (overflow > 0) remarks.push(`scrolls sideways by ${overflow} px`);
  } catch (error) {
    remarks.push(error instanceof Error ? (error.message.split('\n')[0] ?? '') : String(error));
  } finally {
    await context.close();
  }
  return remarks.map((remark) => `${screen.name} ${theme} ${width}: ${remark}`);
}

/** One picture with all photographs of a screen side by side, made by the same browser. */
async function contactSheet(browser: Browser, name: string): Promise<void> {
  const page = await browser.newPage({ viewport: { width: 1800, height: 1000 } });
  const cells = widths.flatMap((width) =>
    themes.map((theme) => {
      const file = `${name}-${theme}-${width}.png`;
      return `<figure><img src="${file}"><figcaption>${theme} ${width}</figcaption></figure>`;
    }),
  );
  const html = `<!doctype html><style>body{font:14px sans-serif;margin:8px;background:#888;display:flex;gap:8px;align-items:start}
    figure{margin:0;flex:1 1 0;min-width:0}img{width:100%;display:block}</style><body>${cells.join('')}`;
  const file = join(process.cwd(), folder, `${name}.html`);
  writeFileSync(file, html);
  await page.goto(`file://${file}`, { waitUntil: 'load' });
  await page.screenshot({ path: join(folder, `sheet-${name}.png`), fullPage: true });
  await page.close();
}

const wanted = screens.filter(({ name }) => words.length === 0 || words.some((word) => name.includes(word)));
if (words.length === 0) rmSync(folder, { recursive: true, force: true });
mkdirSync(folder, { recursive: true });
const production = await startProduction();
const browser = await launchBrowser();
const profiles = new Profiles(browser, production.url);
const remarks: string[] = [];
try {
  for (const screen of wanted) {
    for (const width of widths) {
      // Both themes at once: one machine core each.
      const both = await Promise.all(
        themes.map((theme) => photograph(browser, profiles, production.url, screen, theme, width)),
      );
      remarks.push(...both.flat());
    }
    await contactSheet(browser, screen.name);
    console.log(`${screen.name}: ${folder}/sheet-${screen.name}.png`);
  }
} finally {
  await browser.close();
  await production.close();
}
for (const remark of remarks) console.log(remark);
console.log(remarks.length === 0 ? 'Nothing to remark.' : `${remarks.length} things to look at.`);
