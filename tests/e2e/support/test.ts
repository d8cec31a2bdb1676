import { expect, test as base, type Browser, type BrowserContextOptions, type Page } from '@playwright/test';
import { DEMO_DOMAIN, DEMO_PASSWORD, type DEMO_PEOPLE } from '#scripts/demo.ts';

export type Person = (typeof DEMO_PEOPLE)[number];
type State = Awaited<ReturnType<Awaited<ReturnType<Browser['newContext']>>['storageState']>>;

/** What a page complained of: console errors and warnings, exceptions, requests that left the server's own origin. */
export interface Complaints {
  list: string[];
  /** Names what a test provokes on purpose, such as the browser's own note of a 409. */
  expect(pattern: RegExp): void;
}

interface Options extends BrowserContextOptions {
  /** Nobody: signed out. */
  person: Person | null;
}

/** A page of a context of its own, signed in as one of the demo's people; its complaints fail the test. */
export type Open = (options: Options) => Promise<Page & { complaints: Complaints }>;

interface Fixtures {
  open: Open;
}

const states = new Map<Person, State>();

/** Signs in once a worker and person: attempts are counted by address, and the tests have one. */
async function stateOf(browser: Browser, baseURL: string, person: Person): Promise<State> {
  const known = states.get(person);
  if (known) return known;
  const context = await browser.newContext({ baseURL });
  const answer = await context.request.post('/api/auth/sign-in/email', {
    headers: { origin: baseURL },
    data: { email: `${person}@${DEMO_DOMAIN}`, password: DEMO_PASSWORD },
  });
  expect(answer.status(), `${person} signs in`).toBe(200);
  const state = await context.storageState();
  await context.close();
  states.set(person, state);
  return state;
}

function watch(page: Page, origin: string): Complaints {
  const list: string[] = [];
  const patterns: RegExp[] = [];
  const complain = (text: string): void => {
    if (!patterns.some((pattern) => pattern.test(text))) list.push(text);
  };
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type()))
      complain(`${message.type()}: ${message.text()} (${message.location().url})`);
  });
  page.on('pageerror', (error) => complain(`exception: ${error.message}`));
  page.on('request', (request) => {
    const url = request.url();
    if (/^(https?|wss?):/.test(url) && !url.startsWith(`${origin}/`)) complain(`left the origin: ${url}`);
  });
  return { list, expect: (pattern) => void patterns.push(pattern) };
}

export const test = base.extend<Fixtures>({
  open: async ({ browser, baseURL }, use) => {
    const origin = baseURL ?? '';
    const opened: { page: Page; complaints: Complaints }[] = [];
    await use(async ({ person, ...options }) => {
      const storageState = person ? await stateOf(browser, origin, person) : undefined;
      const context = await browser.newContext({
        baseURL: origin,
        viewport: { width: 1440, height: 900 },
        timezoneId: 'UTC',
        ...(storageState ? { storageState } : {}),
        ...options,
      });
      const page = await context.newPage();
      const complaints = watch(page, origin);
      opened.push({ page, complaints });
      return Object.assign(page, { complaints });
    });
    for (const { page, complaints } of opened) {
      await page.context().close();
      expect(complaints.list, 'complaints of the page').toEqual([]);
    }
  },
});
export { expect };
