import type { Browser, BrowserContext, Page } from 'playwright-core';
import { addressOf, demoPassword } from '#server/cli/demo/team';
import type { PersonKey } from '#server/cli/demo/team';

type Profile = Awaited<ReturnType<BrowserContext['storageState']>>;

/** Signs a person of the demonstration in through the form and waits for the desk. */
export async function signIn(page: Page, url: string, person: PersonKey): Promise<void> {
  await page.goto(`${url}/sign-in`);
  await page.getByLabel('E-mail address').fill(addressOf(person));
  await page.getByLabel('Password', { exact: true }).fill(demoPassword);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((address) => !address.pathname.startsWith('/sign-in'));
}

/** Signs each person in once; later pages start with the same cookies. */
export class Profiles {
  readonly #browser: Browser;
  readonly #url: string;
  readonly #known = new Map<PersonKey, Promise<Profile>>();

  constructor(browser: Browser, url: string) {
    this.#browser = browser;
    this.#url = url;
  }

  async of(person: PersonKey | 'nobody'): Promise<Profile | undefined> {
    if (person === 'nobody') return undefined;
    const known = this.#known.get(person) ?? this.#signedIn(person);
    this.#known.set(person, known);
    return known;
  }

  async #signedIn(person: PersonKey): Promise<Profile> {
    const context = await this.#browser.newContext();
    await signIn(await context.newPage(), this.#url, person);
    const profile = await context.storageState();
    await context.close();
    return profile;
  }
}
