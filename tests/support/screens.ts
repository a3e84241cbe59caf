import type { Page } from 'playwright-core';
import type { PersonKey } from '#server/cli/demo/team';

export interface Screen {
  name: string;
  /** Who looks: a key of the demonstration team. */
  as: PersonKey | 'nobody';
  open(page: Page, url: string): Promise<void>;
  /** A further state of a screen that stands here already: the test suite looks at it in one theme only. */
  further?: true;
  /** Console errors that belong to the state shown. */
  expectedErrors?: RegExp[];
  /** False for states that never come to rest, such as a slow answer. */
  settle?: false;
}

const at =
  (path: string) =>
  async (page: Page, url: string): Promise<void> => {
    await page.goto(`${url}${path}`);
  };

/** Opens the newest revision of a design of the demonstration by its number and, where given, another letter. */
const atDesign =
  (number: string, letter?: string) =>
  async (page: Page, url: string): Promise<void> => {
    const { designs } = (await (await page.request.get(`${url}/api/designs`)).json()) as {
      designs: { id: string; number: string; latest: { letter: string } }[];
    };
    const design = designs.find((each) => each.number === number);
    if (!design) throw new Error(`The demonstration has no design ${number}.`);
    await page.goto(`${url}/designs/${design.id}/${letter ?? design.latest.letter}`);
  };

const byFirst =
  (
    list: string,
    key: string,
    path: (id: string) => string,
    pick: (entry: Record<string, unknown>) => boolean = () => true,
  ) =>
  async (page: Page, url: string): Promise<void> => {
    const answer = (await (await page.request.get(`${url}/api/${list}`)).json()) as Record<
      string,
      Record<string, unknown>[]
    >;
    const found = (answer[key] ?? []).find(pick);
    if (!found) throw new Error(`The demonstration has nothing in ${list} to show.`);
    await page.goto(`${url}${path(String(found.id))}`);
  };

/** Opens a new draft, so that what a screen types spoils no other. */
async function atFreshDraft(page: Page, url: string): Promise<void> {
  const { csrfToken } = (await (await page.request.get(`${url}/api/session`)).json()) as { csrfToken: string };
  const { briefs } = (await (await page.request.get(`${url}/api/briefs`)).json()) as {
    briefs: { id: string; vibrationInWords: string }[];
  };
  const brief = briefs.find(({ vibrationInWords }) => vibrationInWords.startsWith('49'));
  const answer = await page.request.post(`${url}/api/designs`, {
    headers: { 'x-csrf-token': csrfToken },
    data: { title: 'Quiet hours, second thoughts', briefId: (brief ?? briefs[0])?.id },
  });
  const { id } = (await answer.json()) as { id: string };
  await page.goto(`${url}/designs/${id}/A`);
  await field(page, 'Outer diameter').waitFor();
}

const field = (page: Page, label: string) => page.getByRole('textbox', { name: label }).first();
const offline = [/ERR_INTERNET_DISCONNECTED|ERR_FAILED|Failed to load resource/];
const answered = (status: number) => [new RegExp(`status of ${status}`)];

/** Every screen in its main states. The demonstration's stories: see server/cli/demo. */
export const screens: readonly Screen[] = [
  { name: 'sign-in', as: 'nobody', open: at('/sign-in') },
  {
    name: 'sign-in-refused',
    further: true,
    as: 'nobody',
    expectedErrors: answered(401),
    async open(page, url) {
      await page.goto(`${url}/sign-in`);
      await page.getByLabel('E-mail address').fill('nobody@fennmark.example');
      await page.getByLabel('Password', { exact: true }).fill('not the password');
      await page.getByRole('button', { name: 'Sign in' }).click();
      await page
        .getByText(/do not match|not right|wrong|unknown|incorrect/i)
        .first()
        .waitFor();
    },
  },
  { name: 'desk-designer', as: 'maren', open: at('/') },
  { name: 'desk-reviewer', further: true, as: 'sunniva', open: at('/') },
  { name: 'desk-observer', further: true, as: 'rafe', open: at('/') },
  { name: 'briefs', as: 'maren', open: at('/briefs') },
  { name: 'brief', as: 'maren', open: byFirst('briefs', 'briefs', (id) => `/briefs/${id}`) },
  { name: 'brief-new', as: 'maren', open: at('/briefs/new') },
  {
    name: 'brief-new-faulty',
    further: true,
    as: 'maren',
    async open(page, url) {
      await page.goto(`${url}/briefs/new`);
      await page
        .getByRole('button', { name: /save|write/i })
        .last()
        .click();
    },
  },
  { name: 'brief-edit', as: 'maren', open: byFirst('briefs', 'briefs', (id) => `/briefs/${id}/edit`) },
  { name: 'designs', as: 'maren', open: at('/designs') },
  { name: 'designs-none-found', further: true, as: 'maren', open: at('/designs?q=nothing-like-this') },
  { name: 'design-new', as: 'maren', open: at('/designs/new') },
  { name: 'revision-draft', as: 'maren', open: atDesign('FN-013') },
  { name: 'revision-draft-spectrum', further: true, as: 'maren', open: atDesign('FN-012') },
  {
    name: 'revision-draft-faulty',
    as: 'maren',
    expectedErrors: answered(422),
    async open(page, url) {
      await atFreshDraft(page, url);
      await field(page, 'Outer diameter').fill('13 mm');
      await page.waitForTimeout(1500);
    },
  },
  {
    name: 'revision-draft-offline',
    further: true,
    as: 'maren',
    expectedErrors: offline,
    async open(page, url) {
      await atFreshDraft(page, url);
      await field(page, 'Outer diameter').waitFor();
      await page.context().setOffline(true);
      await field(page, 'Outer diameter').fill('9.5 mm');
      await page.waitForTimeout(2500);
    },
    settle: false,
  },
  {
    name: 'revision-draft-slow',
    further: true,
    as: 'maren',
    async open(page, url) {
      await atFreshDraft(page, url);
      await page.waitForLoadState('networkidle');
      await page.route('**/api/estimates', async (route) => {
        await new Promise((resolve) => setTimeout(resolve, 8000));
        await route.continue();
      });
      await field(page, 'Outer diameter').fill('9.9 mm');
      await page.waitForTimeout(1200);
    },
    settle: false,
  },
  { name: 'revision-in-review', as: 'sunniva', open: atDesign('FN-010') },
  { name: 'revision-in-review-author', further: true, as: 'idris', open: atDesign('FN-006') },
  {
    name: 'revision-approve',
    as: 'sunniva',
    async open(page, url) {
      await atDesign('FN-010')(page, url);
      await page.getByRole('button', { name: 'Approve' }).first().click();
      await page.getByRole('alertdialog').waitFor();
    },
  },
  { name: 'revision-changes-requested', further: true, as: 'maren', open: atDesign('FN-011') },
  { name: 'revision-nonconforming', further: true, as: 'ottilie', open: atDesign('FN-005') },
  { name: 'revision-release-review', as: 'ottilie', open: atDesign('FN-008') },
  {
    name: 'revision-released',
    as: 'rafe',
    open: byFirst(
      'records',
      'records',
      (id) => `/records/${id}`,
      ({ state }) => state === 'released',
    ),
  },
  { name: 'bench', as: 'bram', open: at('/bench') },
  {
    name: 'run-open',
    as: 'bram',
    open: byFirst(
      'runs',
      'runs',
      (id) => `/bench/runs/${id}`,
      ({ state }) => state === 'open',
    ),
  },
  {
    name: 'run-signed',
    further: true,
    as: 'bram',
    open: byFirst(
      'runs',
      'runs',
      (id) => `/bench/runs/${id}`,
      ({ state }) => state === 'signed',
    ),
  },
  { name: 'catalogue', as: 'maren', open: at('/catalogue') },
  { name: 'records', as: 'rafe', open: at('/records') },
  {
    name: 'record-recalled',
    further: true,
    as: 'rafe',
    open: byFirst(
      'records',
      'records',
      (id) => `/records/${id}`,
      ({ state }) => state === 'recalled',
    ),
  },
  { name: 'administration-people', as: 'hale', open: at('/administration/people') },
  { name: 'administration-mail', as: 'hale', open: at('/administration/mail') },
  { name: 'administration-audit', as: 'hale', open: at('/administration/audit') },
  { name: 'account', as: 'maren', open: at('/account') },
  { name: 'not-found', as: 'maren', open: at('/no-such-page'), expectedErrors: answered(404) },
  { name: 'forbidden', further: true, as: 'rafe', open: at('/administration/people'), expectedErrors: answered(403) },
  {
    name: 'unknown-record',
    further: true,
    as: 'rafe',
    open: at('/records/00000000-0000-4000-8000-000000000000'),
    expectedErrors: answered(404),
  },
];
