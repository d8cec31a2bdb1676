import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { expect, test, type Person } from './support/test.ts';
import { MAIN_STUDY, studyId } from './support/studies.ts';

const SECTIONS = [
  'requirement',
  'sites',
  'flight',
  'downrange',
  'criteria',
  'ranking',
  'memo',
  'members',
] as const;

/** Every page, with someone who may see it. `{study}` stands for the demo's main study. */
const PAGES: readonly { name: string; address: string; person: Person | null; status?: number }[] = [
  { name: 'sign-in', address: '/sign-in', person: null },
  { name: 'forgotten', address: '/forgotten', person: null },
  { name: 'reset', address: '/reset?token=none', person: null },
  { name: 'invitation', address: '/invitation/none', person: null, status: 410 },
  { name: 'unknown', address: '/nowhere', person: 'reader', status: 404 },
  { name: 'studies', address: '/studies', person: 'lead' },
  ...SECTIONS.map((name) => ({ name, address: `/studies/{study}/${name}`, person: 'lead' as const })),
  { name: 'account', address: '/account', person: 'reader' },
  { name: 'people', address: '/admin/people', person: 'admin' },
  { name: 'vehicles', address: '/admin/vehicles', person: 'admin' },
  { name: 'outbox', address: '/admin/outbox', person: 'admin' },
];

const THEMES = [
  { theme: 'day', colorScheme: 'light' },
  { theme: 'night', colorScheme: 'dark' },
] as const;

const WIDTHS = [
  { width: 1440, height: 900 },
  { width: 390, height: 844 },
] as const;

/** Loaded, islands at work, and nothing asked of the server any more (the event stream never ends). */
async function settle(page: Page): Promise<void> {
  await page.waitForLoadState('load');
  await page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
  await page.evaluate(() => document.fonts.ready);
  await page.waitForTimeout(500);
}

/** What holds for every page, whatever it shows. */
async function inspect(page: Page, picture: string): Promise<void> {
  await settle(page);
  await expect(page.locator('h1')).toHaveCount(1);
  await page.screenshot({ path: `test-results/screens/${picture}.png`, fullPage: true });
  const wider = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  );
  expect(wider, `${picture}: pixels wider than the screen`).toBeLessThanOrEqual(0);
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'])
    .analyze();
  const found = violations.map(
    ({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(', ')}`,
  );
  expect(found, `${picture}: axe`).toEqual([]);
}

for (const { name, address, person, status = 200 } of PAGES)
  for (const { theme, colorScheme } of THEMES)
    test(`${name} by ${theme}: no violation, no complaint, nothing wider than the screen`, async ({
      open,
    }) => {
      // The memo is a long document, and axe reads all of it.
      test.slow();
      for (const viewport of WIDTHS) {
        const page = await open({ person, colorScheme, viewport, reducedMotion: 'reduce' });
        if (status !== 200) page.complaints.expect(new RegExp(`status of ${status}`));
        const study = address.includes('{study}') ? await studyId(page.request, MAIN_STUDY) : '';
        const answer = await page.goto(address.replace('{study}', study));
        expect(answer?.status()).toBe(status);
        await expect(page.locator('html')).toHaveAttribute('data-theme', theme);
        await inspect(page, `${name}-${theme}-${viewport.width}`);
      }
    });

// Fewer controls and more words than a lead's.
test('a reader’s sections: no violation, no complaint, nothing wider than the screen', async ({ open }) => {
  test.slow();
  const page = await open({ person: 'reader', reducedMotion: 'reduce' });
  const study = await studyId(page.request, MAIN_STUDY);
  for (const section of SECTIONS) {
    await page.goto(`/studies/${study}/${section}`);
    await inspect(page, `reader-${section}`);
  }
});
