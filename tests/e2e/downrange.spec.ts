import fs from 'node:fs/promises';
import type { Page } from '@playwright/test';
import type { CorridorOutput } from '#contract/corridor.ts';
import type { Site, SiteList } from '#contract/site.ts';
import { expect, test } from './support/test.ts';
import { MAIN_STUDY, fromApp, newStudy, studyId } from './support/studies.ts';

/** A study of this test's own from the example, with its first site by code, opened at its Downrange section. */
async function openDownrange(
  page: Page,
  baseURL: string | undefined,
  { title, query = '' }: { title: string; query?: string },
): Promise<{ study: string; site: Site }> {
  const study = await newStudy(page.request, baseURL, title);
  const list = (await (await page.request.get(`/api/v1/studies/${study}/sites`)).json()) as SiteList;
  const site = list.items.find(({ name }) => name === 'Tern Head');
  if (!site) throw new Error('the example has no Tern Head');
  await page.goto(`/studies/${study}/downrange?site=${site.code}&azimuth=90&class=small${query}`);
  await page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
  return { study, site };
}

test('the azimuth is turned by key; the corridor is drawn, its figures are the open interface’s, its file comes', async ({
  open,
  baseURL,
}) => {
  test.slow();
  const page = await open({ person: 'engineer' });
  const { site } = await openDownrange(page, baseURL, { title: 'Downrange by key' });
  await expect(page.getByText('Screening only.').first()).toBeVisible();
  await expect(page.getByText(/licensed flight-safety analysts decide/).first()).toBeVisible();
  const fan = page.getByRole('slider', { name: 'Launch azimuth from Tern Head, on the fan' });
  await expect(fan).toHaveAttribute('aria-valuenow', '90', { timeout: 30_000 });
  await fan.focus();
  await fan.press('ArrowRight');
  await fan.press('ArrowRight');
  await expect(fan).toHaveAttribute('aria-valuenow', '92');
  await expect(page).toHaveURL(/azimuth=92/);
  const figures = page.locator('section.panel', { hasText: 'Corridor at 92°' });
  await expect(figures).toBeVisible({ timeout: 30_000 });

  const { latitudeDeg, longitudeDeg } = site;
  const asked = await page.request.post('/api/v1/corridors', {
    headers: fromApp(baseURL),
    data: { latitudeDeg, longitudeDeg, azimuthDeg: 92, vehicleClass: 'small' },
  });
  const open92 = (await asked.json()) as CorridorOutput;
  const { people } = open92.features[1].properties;
  await expect(figures.locator('[data-people]')).toHaveText(people.toLocaleString('en-US'));
  await expect(figures).toContainText('verify against the regulation');
  await expect(page.getByRole('heading', { level: 1 })).toContainText('At 92° from Tern Head');
  expect(await page.title()).toContain('At 92° from Tern Head');

  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Corridor as GeoJSON' }).click();
  const file = await download;
  expect(file.suggestedFilename()).toBe(`corridor-${site.code}-92.geojson`);
  expect(JSON.parse(await fs.readFile(await file.path(), 'utf8'))).toEqual(open92);
});

test('sectors that keep within typed limits become the permitted azimuths, and are taken back', async ({
  open,
  baseURL,
}) => {
  const page = await open({ person: 'engineer' });
  const { study, site } = await openDownrange(page, baseURL, {
    title: 'Downrange limits',
    query: '&range=1000',
  });
  const read = async () =>
    ((await (await page.request.get(`/api/v1/studies/${study}/sites/${site.id}`)).json()) as Site)
      .permittedAzimuthsDeg;
  await page.getByLabel('Clear distance, at least').fill('400');
  const use = page.getByRole('button', { name: 'Use as permitted azimuths' });
  await expect(use).toBeVisible({ timeout: 30_000 });
  const text = await page.locator('.downrange-sectors').textContent();
  await use.click();
  await expect.poll(async () => (await read()).map(([from, to]) => `${from}-${to}`).join('; ')).toBe(text);
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect.poll(read).toEqual(site.permittedAzimuthsDeg);
});

test('sectors changed by someone else meanwhile stand beside yours, and the person chooses', async ({
  open,
  baseURL,
}) => {
  const page = await open({ person: 'engineer' });
  page.complaints.expect(/status of 409/);
  page.complaints.expect(/Failed to load resource/);
  const { study, site } = await openDownrange(page, baseURL, {
    title: 'Downrange conflict',
    query: '&range=1000&clear=400',
  });
  const address = `/api/v1/studies/${study}/sites/${site.id}`;
  const use = page.getByRole('button', { name: 'Use as permitted azimuths' });
  await expect(use).not.toHaveAttribute('aria-disabled', 'true', { timeout: 30_000 });
  const text = (await page.locator('.downrange-sectors').textContent()) ?? '';
  // Nothing tells this page of the other change in time: it can't read the site again.
  await page.route(`**${address}`, (route) =>
    route.request().method() === 'GET' ? route.abort() : route.continue(),
  );
  const other = await page.request.patch(address, {
    headers: { ...fromApp(baseURL), 'if-match': `"${site.version}"` },
    data: { permittedAzimuthsDeg: [[10, 20]] },
  });
  expect(other.status()).toBe(200);
  await use.click();
  const conflict = page.getByRole('alert').filter({ hasText: 'the permitted azimuths of Tern Head' });
  await expect(conflict).toContainText('10-20');
  await expect(conflict).toContainText(text);
  await conflict.getByRole('button', { name: `Put ${text}` }).click();
  await expect
    .poll(async () =>
      ((await (await page.request.get(address)).json()) as Site).permittedAzimuthsDeg
        .map(([from, to]) => `${from}-${to}`)
        .join('; '),
    )
    .toBe(text);
});

test('a reader sees the sectors and may not use them', async ({ open }) => {
  const reader = await open({ person: 'reader' });
  const study = await studyId(reader.request, MAIN_STUDY);
  await reader.goto(`/studies/${study}/downrange?clear=400`);
  const use = reader.getByRole('button', { name: 'Use as permitted azimuths' });
  await expect(use).toHaveAttribute('aria-disabled', 'true', { timeout: 30_000 });
});

test('a study without sites says what to do', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer' });
  const id = await newStudy(page.request, baseURL, 'Downrange of nothing', 'blank');
  await page.goto(`/studies/${id}/downrange`);
  await expect(page.getByRole('link', { name: 'Add candidate sites' })).toBeVisible();
  await expect(page.getByText('Screening only.').first()).toBeVisible();
});
