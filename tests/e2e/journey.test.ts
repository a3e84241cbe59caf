import type { Browser, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { addressOf, demoPassword } from '#server/cli/demo/team';
import type { PersonKey } from '#server/cli/demo/team';
import { launchBrowser, openContext, settled, watchErrors } from '../support/browser';
import { signIn } from '../support/profiles';
import { startProduction } from '../support/production';
import type { Production } from '../support/production';
import { startMailSink } from '../support/smtp';
import type { MailSink } from '../support/smtp';

let production: Production;
let sink: MailSink;
let browser: Browser;

beforeAll(async () => {
  sink = await startMailSink();
  // Seeded without a mail server, so that the demonstration's own messages stay here.
  production = await startProduction();
  await production.kill();
  await production.restart({ SMTP_URL: sink.url });
  browser = await launchBrowser();
});
afterAll(async () => {
  await browser.close();
  await production.close();
  await sink.close();
});

/** A person at an own machine: own profile, signed in through the form. */
async function arrive(key: PersonKey): Promise<{ page: Page; errors: string[] }> {
  const context = await openContext(browser, 'light', 1440);
  const page = await context.newPage();
  const errors = watchErrors(page);
  await signIn(page, production.url, key);
  return { page, errors };
}

/** The address in a message that leads back into the application. */
const linkIn = (text: string | undefined): string => {
  const link = text?.match(/https?:\/\/\S+/)?.[0];
  if (link === undefined) throw new Error(`No link in the message: ${text}`);
  return new URL(link).pathname;
};

const mailTo = (key: PersonKey, subject: RegExp) =>
  sink
    .until((messages) =>
      messages.some(
        (mail) => [mail.to].flat()[0]?.text.includes(addressOf(key)) === true && subject.test(mail.subject ?? ''),
      ),
    )
    .then((messages) =>
      messages.filter(
        (mail) => [mail.to].flat()[0]?.text.includes(addressOf(key)) === true && subject.test(mail.subject ?? ''),
      ),
    );

const dialogOf = (page: Page) => page.locator('[role=dialog], [role=alertdialog]');

/** Fills fields by the beginning of their label; `true` ticks a box. */
async function fill(scope: Locator, fields: Record<string, string | true>): Promise<void> {
  for (const [label, value] of Object.entries(fields)) {
    const named = new RegExp(`^${label}`);
    if (value === true) await scope.getByText(named).first().click();
    else if (label === 'Password') await scope.locator('input[type=password]').fill(value);
    else await scope.getByRole('textbox', { name: named }).first().fill(value);
  }
}

/** Takes a step as a person does: the button, the dialog, its own button. */
async function send(page: Page, button: string, fields: Record<string, string | true>, verb = button): Promise<void> {
  await page
    .getByRole('button', { name: new RegExp(`^${button}`) })
    .first()
    .click();
  const dialog = dialogOf(page);
  await dialog.waitFor();
  await fill(dialog, fields);
  await dialog.getByRole('button', { name: verb, exact: true }).click();
  await dialog.waitFor({ state: 'detached' });
  await settled(page);
}

describe('one design from brief to release', () => {
  it('is carried the whole way by four people at their own machines', async () => {
    const designer = await arrive('maren');
    const { page } = designer;

    // The brief.
    await page.goto(`${production.url}/briefs/new`);
    await page.getByLabel('Title (required)', { exact: true }).fill('Cooling-water pump, 50 Hz');
    await page.getByLabel('Machine', { exact: true }).fill('Pump P-204');
    await page.getByLabel('Frequency', { exact: true }).fill('50 Hz');
    await page.getByLabel('Acceleration', { exact: true }).fill('1 m/s²');
    await page.getByLabel('Power needed').fill('1 mW');
    await page.getByLabel('Diameter (required)', { exact: true }).fill('22 mm');
    await page.getByLabel('Length (required)', { exact: true }).fill('60 mm');
    await page.getByLabel('Lowest temperature').fill('5');
    await page.getByLabel('Highest temperature').fill('60');
    const requirement = page.getByRole('group', { name: 'Requirement 1' });
    await requirement.getByLabel('Limit', { exact: true }).fill('1 mW');
    await page.getByRole('button', { name: 'Save the brief' }).click();
    await page.getByRole('heading', { level: 1, name: 'Cooling-water pump, 50 Hz' }).waitFor();

    // The design: a draft tuned to the brief's tone, changed by typing.
    await page
      .getByRole('link', { name: /start a design/i })
      .or(page.getByRole('button', { name: /start a design/i }))
      .first()
      .click();
    await page.getByLabel('Title (required)', { exact: true }).fill('Cooling-water pump node');
    await page.getByRole('button', { name: /start/i }).last().click();
    await page.waitForURL(/\/designs\/[0-9a-f-]+\/A$/);
    await page.getByRole('textbox', { name: /^Load/ }).first().fill('0k82');
    await page
      .getByText(/into 820/)
      .locator('visible=true')
      .first()
      .waitFor();
    await page
      .getByText(/^saved/)
      .locator('visible=true')
      .first()
      .waitFor();
    const revisionPath = new URL(page.url()).pathname;
    await send(page, 'Submit for review', { 'A word to the reviewers': 'Tuned to 50 Hz; look at the coil first.' });
    await page.getByText('In review').first().waitFor();

    // The reviewer follows the message, remarks, and approves once it is answered.
    const [asked] = await mailTo('sunniva', /Cooling-water pump node/);
    expect(asked?.text).toContain('Maren Tolk');
    const reviewer = await arrive('sunniva');
    await reviewer.page.goto(production.url + linkIn(asked?.text));
    await reviewer.page.waitForURL(`**${revisionPath}`);
    await send(reviewer.page, 'Add a remark', { Remark: 'Is 820 Ω a stocked value?', Blocking: true });
    await reviewer.page.getByText('Is 820 Ω a stocked value?').first().waitFor();
    const approve = reviewer.page.getByRole('button', { name: 'Approve' }).first();
    expect(await approve.getAttribute('aria-disabled')).toBe('true');

    await mailTo('maren', /remark/i);
    await page.reload();
    await send(page, 'Close remark', { Answer: 'Yes, E24.' });

    await reviewer.page.reload();
    await send(reviewer.page, 'Approve', { Password: demoPassword }, 'Sign the approval');
    await reviewer.page.getByText('Cleared for bench').first().waitFor();

    // The bench: a run with a reading entered by hand, signed.
    const bench = await arrive('bram');
    await bench.page.goto(production.url + revisionPath);
    await send(bench.page, 'Start a run', { Specimen: 'CW-01' });
    await bench.page.waitForURL('**/bench/runs/**');
    await bench.page.getByRole('button', { name: 'Enter a reading' }).first().click();
    const reading = dialogOf(bench.page);
    const instrument = reading.getByRole('combobox', { name: /Instrument/ });
    const names = await instrument.locator('option').allTextContents();
    await instrument.selectOption({ label: names.find((name) => name.includes('Digital multimeter')) ?? '' });
    await fill(reading, { Reading: '1.24 mW' });
    await reading.getByRole('button', { name: 'Enter the reading' }).click();
    await reading.waitFor({ state: 'detached' });
    await bench.page.getByText('1.24').first().waitFor();
    await send(bench.page, 'Sign the result', {
      Conforming: true,
      Statement: 'Shaker at 50.0 Hz, 1.00 m/s² peak, 23 °C.',
      Password: demoPassword,
    });

    // Release.
    const [weigh] = await mailTo('ottilie', /Cooling-water pump node/);
    const authority = await arrive('ottilie');
    await authority.page.goto(production.url + linkIn(weigh?.text));
    await authority.page.waitForURL(`**${revisionPath}`);
    await send(authority.page, 'Sign and release', { Password: demoPassword });
    await authority.page.getByText('Released').first().waitFor();

    // The observer reads the record; nobody was told anything twice.
    const [told] = await mailTo('rafe', /release/i);
    const observer = await arrive('rafe');
    await observer.page.goto(`${production.url}/records`);
    await observer.page.getByText('Cooling-water pump node').first().click();
    await observer.page
      .getByText(/REL-\d{4}-\d{3}/)
      .first()
      .waitFor();
    expect(told?.subject).toContain('Cooling-water pump node');
    expect(told?.text).toMatch(/Its record is REL-\d{4}-\d{3}\./);
    const ids = sink.messages.map(({ messageId }) => messageId);
    expect(new Set(ids).size).toBe(ids.length);

    for (const { errors } of [designer, reviewer, bench, authority, observer]) expect(errors).toEqual([]);
  });
});
