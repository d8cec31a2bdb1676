import type { Page } from '@playwright/test';
import { MAIN_STUDY, studyId } from './support/studies.ts';
import { expect, test } from './support/test.ts';
import { expectSoon } from '#tests/support/soon.ts';

interface Script {
  name: string;
  bytes: number;
}

/** The scripts a page fetches, with their size over the wire, headers excluded. */
async function scriptsOf(page: Page, address: string): Promise<Script[]> {
  const devtools = await page.context().newCDPSession(page);
  await devtools.send('Network.enable');
  await devtools.send('Network.setCacheDisabled', { cacheDisabled: true });
  const names = new Map<string, string>();
  const scripts: Script[] = [];
  devtools.on('Network.responseReceived', ({ requestId, response, type }) => {
    if (type === 'Script' || /javascript/.test(response.mimeType)) names.set(requestId, response.url);
  });
  devtools.on('Network.loadingFinished', ({ requestId, encodedDataLength }) => {
    const name = names.get(requestId);
    if (name) scripts.push({ name, bytes: encodedDataLength });
  });
  await page.goto(address);
  await page.waitForLoadState('load');
  await page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
  await page.waitForTimeout(1_500);
  return scripts;
}
const total = (scripts: readonly Script[]): number => scripts.reduce((sum, { bytes }) => sum + bytes, 0);

/** Names that Vite gives the chunks of the two large libraries. */
const LARGE = { map: /maplibre/i, grid: /ag-?grid|RankingGrid/i };

test('the first load of the ranking takes under 400 kB of script', async ({ open }) => {
  const page = await open({ person: 'lead' });
  const study = await studyId(page.request, MAIN_STUDY);
  const scripts = await scriptsOf(page, `/studies/${study}/ranking`);
  await expect(page.getByRole('grid').or(page.getByRole('treegrid')).first()).toBeVisible();
  test.info().annotations.push({ type: 'bytes of script', description: String(total(scripts)) });
  expect(total(scripts)).toBeGreaterThan(50_000);
  expect(total(scripts)).toBeLessThan(400_000);
  expect(scripts.filter(({ name }) => LARGE.grid.test(name)).length).toBeGreaterThan(0);
  expect(scripts.filter(({ name }) => LARGE.map.test(name))).toEqual([]);
});

for (const section of ['requirement', 'flight', 'criteria', 'memo'])
  test(`neither map nor grid is loaded by ${section}`, async ({ open }) => {
    const page = await open({ person: 'lead' });
    const study = await studyId(page.request, MAIN_STUDY);
    const scripts = await scriptsOf(page, `/studies/${study}/${section}`);
    expect(scripts.filter(({ name }) => LARGE.map.test(name) || LARGE.grid.test(name))).toEqual([]);
    expect(total(scripts)).toBeLessThan(400_000);
  });

test('the sites sheet can be used within 3 seconds, its map drawn', async ({ open }) => {
  const page = await open({ person: 'engineer' });
  const study = await studyId(page.request, MAIN_STUDY);
  const started = Date.now();
  await page.goto(`/studies/${study}/sites`);
  await expect(page.getByRole('button', { name: 'All pads' })).toBeVisible();
  await page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
  const took = Date.now() - started;
  expectSoon('Sites usable', took, 3_000);
});
