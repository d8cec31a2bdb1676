import type { Page, Request } from '@playwright/test';
import { DEMO_DOMAIN } from '#scripts/demo.ts';
import { fromApp, newStudy } from './support/studies.ts';
import { expect, test, type Open } from './support/test.ts';

const CRITERION = 'Cost to first launch';
const WITHIN_MS = 2_000;

const points = (page: Page) => page.getByLabel(`Points for ${CRITERION}, as a number`);

async function give(page: Page, value: string): Promise<void> {
  await points(page).fill(value);
  await points(page).press('Enter');
}

/** A lead and a reader before the same ranking. */
async function together(open: Open, baseURL: string | undefined) {
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, 'Seen by two');
  const member = { email: `reader@${DEMO_DOMAIN}`, role: 'reader' };
  const members = `/api/v1/studies/${study}/members`;
  const added = await lead.request.post(members, { headers: fromApp(baseURL), data: member });
  expect(added.status()).toBe(201);
  const reader = await open({ person: 'reader' });
  for (const page of [lead, reader]) {
    await page.goto(`/studies/${study}/ranking`);
    await expect(points(page)).toBeVisible();
    await page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
  }
  return { lead, reader, study };
}

test('the lead’s weights reach a reader’s ranking within 2 seconds', async ({ open, baseURL }) => {
  const { lead, reader } = await together(open, baseURL);
  const before = await reader.getByRole('heading', { level: 1 }).innerText();
  await give(lead, '100');
  const started = Date.now();
  await expect(points(reader)).toHaveValue('100', { timeout: WITHIN_MS });
  await expect(reader.getByRole('heading', { level: 1 })).not.toHaveText(before, {
    timeout: WITHIN_MS - (Date.now() - started),
  });
  expect(await reader.getByRole('heading', { level: 1 }).innerText()).toBe(
    await lead.getByRole('heading', { level: 1 }).innerText(),
  );
});

test('a lost connection says so, and catches up when it is back', async ({ open, baseURL }) => {
  const { lead, reader, study } = await together(open, baseURL);
  reader.complaints.expect(/ERR_FAILED/);
  await reader.context().route('**/api/v1/events', (route) => route.abort());
  await reader.goto(`/studies/${study}/ranking`);
  await expect(reader.getByText('Connection lost: changes by others are not arriving.')).toBeVisible();
  await give(lead, '90');
  await expect(lead.getByRole('heading', { level: 1 })).not.toHaveText(
    await reader.getByRole('heading', { level: 1 }).innerText(),
  );
  await reader.context().unroute('**/api/v1/events');
  await expect(points(reader)).toHaveValue('90', { timeout: 20_000 });
  await expect(reader.getByText('Connection lost')).toHaveCount(0);
});

test('however many tabs a browser has open, it holds one stream', async ({ open, baseURL }) => {
  const { lead, study } = await together(open, baseURL);
  const reader = await open({ person: 'reader' });
  let streams = 0;
  const counted =
    (step: 1 | -1) =>
    (request: Request): void => {
      if (request.url().endsWith('/events')) streams += step;
    };
  const context = reader.context();
  context.on('request', counted(1));
  context.on('requestfinished', counted(-1));
  context.on('requestfailed', counted(-1));
  const tabs = [reader, await context.newPage(), await context.newPage()];
  for (const tab of tabs) {
    await tab.goto(`/studies/${study}/ranking`);
    await expect(points(tab)).toBeVisible();
  }
  await give(lead, '80');
  for (const tab of tabs) await expect(points(tab)).toHaveValue('80', { timeout: WITHIN_MS });
  expect(streams).toBe(1);
});
