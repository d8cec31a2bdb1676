import type { Page } from '@playwright/test';
import { expect, test } from './support/test.ts';
import { fromApp, newStudy } from './support/studies.ts';
import { expectSoon } from '#tests/support/soon.ts';

/** A study of this test's own from the example, opened at its sites. */
async function openSites(
  page: Page,
  baseURL: string | undefined,
  title: string,
  query = '',
): Promise<string> {
  const study = await newStudy(page.request, baseURL, title);
  await page.goto(`/studies/${study}/sites${query}`);
  await page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
  return study;
}

const row = (page: Page, name: string) => page.getByRole('row', { name: new RegExp(name) });
const cell = (page: Page, name: string, column: number) =>
  row(page, name).locator(`[data-column="${column}"]`);

interface Listed {
  items: {
    id: string;
    name: string;
    version: number;
    elevationM: number;
    permittedAzimuthsDeg: number[][];
  }[];
}
async function sitesOf(page: Page, study: string): Promise<Listed['items']> {
  return ((await (await page.request.get(`/api/v1/studies/${study}/sites?pageSize=500`)).json()) as Listed)
    .items;
}

test('a cell is edited by the keyboard, in degrees, minutes and seconds', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer' });
  const study = await openSites(page, baseURL, 'Edit by cell', '?view=table');
  await cell(page, 'Tern Head', 3).click();
  await page.keyboard.press('Enter');
  const field = page.getByRole('textbox', { name: 'Latitude of Tern Head' });
  await field.fill('97.2');
  await field.press('Enter');
  await expect(page.getByText('Latitude 97.2 is outside −90 to 90.')).toBeVisible();
  await field.fill('12 41 30 S');
  await expect(page.getByText('read as −12.6917')).toBeVisible();
  await field.press('Enter');
  await expect(cell(page, 'Tern Head', 3)).toHaveText('−12.6917');
  await expect
    .poll(async () => (await sitesOf(page, study)).find(({ name }) => name === 'Tern Head')?.version)
    .toBe(2);
  // The database knows of the change a moment before the page does and hands the keyboard back to the grid.
  await expect(cell(page, 'Tern Head', 3)).toBeFocused();
  await page.keyboard.press('ArrowDown');
  await expect(cell(page, 'Pointe Rovana', 3)).toBeFocused();
});

test('a stale write shows both figures, and the person chooses', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer' });
  page.complaints.expect(/status of 409/);
  const study = await openSites(page, baseURL, 'Stale cell', '?view=table');
  const site = (await sitesOf(page, study)).find(({ name }) => name === 'Tern Head');
  await cell(page, 'Tern Head', 5).dblclick();
  const field = page.getByRole('textbox', { name: 'Elevation of Tern Head' });
  await field.fill('12');
  // Nothing tells this page of the other change in time: its stream is cut.
  await page.route('**/sites?**', (route) => route.abort());
  page.complaints.expect(/Failed to load resource/);
  const other = await page.request.patch(`/api/v1/studies/${study}/sites/${site?.id}`, {
    headers: { ...fromApp(baseURL), 'if-match': `"${site?.version}"` },
    data: { elevationM: 44 },
  });
  expect(other.status()).toBe(200);
  await field.press('Enter');
  const conflict = page.getByRole('alert').filter({ hasText: 'Elevation of Tern Head' });
  await expect(conflict).toContainText('12');
  await expect(conflict).toContainText('44');
  await conflict.getByRole('button', { name: 'Put 12' }).click();
  await expect(cell(page, 'Tern Head', 5)).toHaveText('12');
  await expect
    .poll(async () => (await sitesOf(page, study)).find(({ name }) => name === 'Tern Head')?.elevationM)
    .toBe(12);
});

test('a site is added by typing, and refused beside the field at fault', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer' });
  page.complaints.expect(/status of 422/);
  await openSites(page, baseURL, 'Add by typing', '?view=table');
  await page.getByRole('button', { name: 'Add a site' }).click();
  const form = page.locator('form.add-site');
  await form.getByLabel('Name').fill('Tern Head');
  await form.getByLabel('Latitude').fill('145.3');
  await form.getByLabel('Longitude').fill('-15');
  await form.getByRole('button', { name: 'Swap them' }).click();
  await expect(form.getByLabel('Latitude')).toHaveValue('-15');
  await form.getByLabel('Longitude').fill('193.4');
  await expect(form.getByText('read as −166.6000, brought into −180 to 180')).toBeVisible();
  await form.getByRole('button', { name: 'Add site' }).click();
  await expect(form.getByText('The study already has a site named Tern Head.')).toBeVisible();
  await form.getByLabel('Name').fill('Windward Shelf');
  await form.getByRole('button', { name: 'Add site' }).click();
  await expect(row(page, 'Windward Shelf')).toHaveAttribute('aria-selected', 'true');
  await expect(page).toHaveURL(/site=WS/);
  await expect(page.getByRole('heading', { level: 1 })).toContainText('13 candidates.');
});

test('sites are removed together after a question, and undone', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer' });
  const study = await openSites(page, baseURL, 'Remove and undo', '?view=table');
  await page.getByLabel('Select Tern Head').check();
  await page.getByLabel('Select Skarvnes').check();
  await page.getByRole('button', { name: 'Remove 2 sites' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Remove Tern Head and Skarvnes' }).click();
  await expect(row(page, 'Skarvnes')).toHaveCount(0);
  expect(await sitesOf(page, study)).toHaveLength(10);
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(row(page, 'Skarvnes')).toBeVisible();
  expect(await sitesOf(page, study)).toHaveLength(12);
});

test('the map is there in time, and row and pad find each other', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer', reducedMotion: 'reduce' });
  const study = await openSites(page, baseURL, 'Map and table');
  await page.goto('about:blank');
  const started = Date.now();
  await page.goto(`/studies/${study}/sites`);
  await expect(page.locator('.map-stop').first()).toBeAttached();
  await cell(page, 'Tern Head', 2).click();
  await expect(page.getByRole('slider', { name: 'Tern Head, sector 1, from' })).toBeVisible();
  expectSoon('map drawn and a pad chosen', Date.now() - started, 3_000);
  await expect(page).toHaveURL(/site=TH/);
  await page
    .getByRole('list', { name: 'Pads' })
    .getByRole('button', { name: /^Skarvnes/ })
    .press('Enter');
  await expect(row(page, 'Skarvnes')).toHaveAttribute('aria-selected', 'true');
  await page.locator('h1').click();
  await page.keyboard.press('p');
  await expect(row(page, 'Cabo Almarza')).toHaveAttribute('aria-selected', 'true');
});

test('a sector turns by its handle: arrows, Shift, and dragging', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer', reducedMotion: 'reduce' });
  const study = await openSites(page, baseURL, 'Turn a sector', '?site=TH');
  const sectors = async () =>
    (await sitesOf(page, study)).find(({ name }) => name === 'Tern Head')?.permittedAzimuthsDeg;
  const from = page.getByRole('slider', { name: 'Tern Head, sector 1, from' });
  await from.focus();
  await from.press('ArrowRight');
  await from.press('Shift+ArrowRight');
  await expect(from).toHaveAttribute('aria-valuetext', '47.1° clockwise from north');
  await expect.poll(sectors).toEqual([[47.1, 112]]);
  await expect(cell(page, 'Tern Head', 6)).toHaveText('47.1–112');
  const to = page.getByRole('slider', { name: 'Tern Head, sector 1, to' });
  const box = await to.boundingBox();
  const pad = await page.getByRole('button', { name: /^Tern Head/ }).boundingBox();
  if (!box || !pad) throw new Error('the handle or the pad is not drawn');
  await page.mouse.move(box.x + 14, box.y + 14);
  await page.mouse.down();
  // Due south of the pad.
  await page.mouse.move(pad.x + 14, pad.y + 14 + 150, { steps: 6 });
  await page.mouse.up();
  await expect.poll(sectors).toEqual([[47.1, 180]]);
});

test('a place is taken from the map', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer', reducedMotion: 'reduce' });
  await openSites(page, baseURL, 'Take a place', '?site=PV');
  await expect(page.locator('.map-stop').first()).toBeAttached();
  await page.getByRole('button', { name: 'Take a place from the map' }).click();
  await page.getByRole('button', { name: 'Take the middle of the map' }).click();
  const form = page.locator('form.add-site');
  await expect(form.getByLabel('Latitude')).toHaveValue(/^−?-?4\.7/);
  await expect(form.getByLabel('Name')).toBeFocused();
});

test('without WebGL the table remains and says so', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer' });
  await page.addInitScript(() => {
    const real = HTMLCanvasElement.prototype.getContext;
    HTMLCanvasElement.prototype.getContext = function (
      this: HTMLCanvasElement,
      kind: string,
      ...rest: unknown[]
    ) {
      return kind.startsWith('webgl') ? null : Reflect.apply(real, this, [kind, ...rest]);
    } as typeof real;
  });
  await openSites(page, baseURL, 'No WebGL');
  await expect(page.getByText('The map cannot be drawn here')).toBeVisible();
  await expect(row(page, 'Tern Head')).toBeVisible();
});

test('a reader looks, filters and sorts, and changes nothing', async ({ open, baseURL }) => {
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, 'To be read');
  await lead.request.post(`/api/v1/studies/${study}/members`, {
    headers: fromApp(baseURL),
    data: { email: 'reader@spinward.test', role: 'reader' },
  });
  const page = await open({ person: 'reader' });
  await page.goto(`/studies/${study}/sites?view=table`);
  await page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
  await page.getByLabel('Find a site').fill('head');
  await expect(page).toHaveURL(/find=head/);
  await expect(row(page, 'Skarvnes')).toHaveCount(0);
  await page.getByLabel('Find a site').fill('');
  await page.getByRole('button', { name: 'Latitude' }).click();
  await expect(page.locator('tr[data-row="0"]')).toContainText('Cabo Almarza');
  await cell(page, 'Tern Head', 3).dblclick();
  await expect(page.getByRole('textbox', { name: 'Latitude of Tern Head' })).toHaveCount(0);
  await expect(page.getByText('A lead or an engineer changes the inputs.').first()).toBeVisible();
});
