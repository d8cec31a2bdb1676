import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { MAIN_STUDY, newStudy, studyId } from './support/studies.ts';
import { expect, test } from './support/test.ts';

/** The demo's ascents take seconds; the rest of the budget is a busy machine's. */
const FLOWN = { timeout: 60_000 };

const flight = (study: string, query = '') => `/studies/${study}/flight${query}`;
const awake = (page: Page) =>
  page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
const bar = (page: Page) => page.getByRole('region', { name: 'Losses and flown ascents' });

test.setTimeout(90_000);

test('one orbit is flown, drawn, compared, followed on the map and taken away as files', async ({
  open,
  baseURL,
}) => {
  const page = await open({ person: 'lead' });
  const study = await newStudy(page.request, baseURL, 'Flown in the browser');
  await page.goto(flight(study));
  await awake(page);
  await expect(bar(page).getByRole('button', { name: 'Fly 60 ascents' })).toBeVisible();
  // The same inputs may have been flown for another study before: then there is less to ask for, or nothing.
  const one = bar(page).getByRole('button', { name: /^Fly 12 to / });
  const inputsFlown = (await one.count()) === 0;
  await (inputsFlown ? bar(page).getByRole('button', { name: /^Fly \d+ ascents$/ }) : one).click();
  const table = page.getByRole('region', { name: /^Flown ascents to / });
  await expect(table.getByRole('row')).toHaveCount(13, FLOWN);
  await expect(table.getByText(/Waiting to be flown|Being flown|Not flown yet/)).toHaveCount(0, FLOWN);

  const chart = page.getByRole('img', { name: /^Ascent from .* burn-out after/ });
  await expect(chart).toBeVisible();
  await expect(chart.getByText('limit 50').first()).toBeVisible();
  await expect(chart.getByText('injection')).toBeVisible();
  await page.getByText('Against downrange', { exact: true }).click();
  await expect(chart.getByText('downrange, km over the ground')).toBeVisible();
  await page.getByLabel('Compare with').selectOption({ index: 1 });
  await expect(page.getByRole('img', { name: /^Ascent from .* beside it/ })).toBeVisible();

  const slider = page.getByRole('slider', { name: 'Time from lift-off' });
  await slider.focus();
  await page.keyboard.press('ArrowRight');
  await expect(slider).toHaveAttribute('aria-valuetext', /^61 s after lift-off, [\d.]+ km up$/);
  await page.keyboard.press('End');
  await expect(page.getByText('nowhere: in orbit')).toBeVisible();

  for (const [name, file] of [
    ['Trajectory as CSV', /^ascent-\w+-\w+\.csv$/],
    ['Trajectory as GeoJSON', /^ascent-\w+-\w+\.geojson$/],
  ] as const) {
    const download = page.waitForEvent('download');
    await page.getByRole('link', { name }).click();
    expect((await download).suggestedFilename()).toMatch(file);
  }
  await expect(page.getByText('Estimates for comparing sites, not flight data.')).toBeVisible();
  const { violations } = await new AxeBuilder({ page }).analyze();
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html ?? ''}`)).toEqual([]);

  await page.getByRole('button', { name: 'Open the map of this flight' }).click();
  await expect(page.getByRole('button', { name: 'All pads' })).toBeVisible({ timeout: 20_000 });
});

test('the study’s losses are chosen, move the revision, and go stale with an input', async ({
  open,
  baseURL,
}) => {
  const page = await open({ person: 'lead' });
  const study = await newStudy(page.request, baseURL, 'Losses chosen in the browser');
  await page.goto(flight(study, '?orbit=LOW'));
  await awake(page);
  const revision = page.locator('[data-revision-number]').first();
  const before = Number(await revision.textContent());
  await bar(page).locator('label', { hasText: 'Flown' }).click();
  await expect(bar(page).getByRole('radio', { name: 'Flown' })).toBeChecked();
  await expect(bar(page).getByText('Each site’s own losses and payload')).toBeVisible();
  const settings = await page.request.get(`/api/v1/studies/${study}/settings`);
  expect(await settings.json()).toMatchObject({ losses: 'flown' });
  await expect(revision).toHaveText(String(before + 1));

  const ask = bar(page).getByRole('button', { name: /^Fly \d+ ascents$/ });
  if ((await ask.getAttribute('aria-disabled')) === null) await ask.click();
  await expect(bar(page).getByText('All of them are current.').first()).toBeVisible(FLOWN);
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/, flown: .* carries most, [\d,]+ kg\.$/);

  const { items } = (await (await page.request.get(`/api/v1/studies/${study}/sites?pageSize=1`)).json()) as {
    items: { id: string; name: string; version: number; latitudeDeg: number }[];
  };
  const [site] = items;
  const moved = await page.request.patch(`/api/v1/studies/${study}/sites/${site?.id ?? ''}`, {
    headers: { origin: baseURL ?? '' },
    data: { latitudeDeg: (site?.latitudeDeg ?? 0) + 0.01, version: site?.version },
  });
  expect(moved.status(), await moved.text()).toBe(200);
  const row = page
    .getByRole('region', { name: /^Flown ascents to / })
    .getByRole('row', { name: site?.name ?? '' });
  await expect(row.getByText('Inputs changed since; figures of the inputs before.')).toBeVisible(FLOWN);
  await expect(row).toHaveAttribute('data-stale', '');
  await expect(bar(page).getByRole('button', { name: 'Fly 5 ascents' })).toBeVisible();
});

test('a reader sees why nothing can be chosen or asked for, and reads it on a phone in one column', async ({
  open,
}) => {
  const page = await open({ person: 'reader', viewport: { width: 390, height: 844 } });
  await page.goto(flight(await studyId(page.request, MAIN_STUDY)));
  await awake(page);
  await expect(bar(page).getByText('A lead or an engineer asks for ascents.').first()).toBeVisible();
  await expect(bar(page).getByText(/A lead or an engineer changes the inputs/)).toBeVisible();
  const width = await page.evaluate(() => document.documentElement.scrollWidth);
  expect(width).toBeLessThanOrEqual(390);
});
