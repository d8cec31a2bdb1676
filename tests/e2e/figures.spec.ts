import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import type { Locator, Page } from '@playwright/test';
import { fromApp, newStudy } from './support/studies.ts';
import { expect, test } from './support/test.ts';

interface Named {
  id: string;
  name: string;
  source: string;
  unit: string;
}
interface Stored {
  id: string;
  version: number;
  values: Record<string, number>;
  particulars: Record<string, { low?: number; high?: number; source?: string }>;
}

const PDF = Buffer.from('%PDF-1.7\n1 0 obj\n<< /Type /Catalog >>\nendobj\n%%EOF\n');

async function criterionOf(page: Page, study: string, source: string): Promise<Named> {
  const answer = await page.request.get(`/api/v1/studies/${study}/criteria?pageSize=100`);
  const { items } = (await answer.json()) as { items: Named[] };
  const found = items.find((one) => one.source === source);
  if (!found) throw new Error(`no criterion is ${source}`);
  return found;
}

/** The leader's cell under a criterion, once the grid stands. */
async function leadersCell(page: Page, study: string, { id }: Named): Promise<Locator> {
  await page.goto(`/studies/${study}/ranking`);
  const cell = page.locator(`.rk-grid [row-index="0"] [col-id="${id}"]`);
  await expect(cell).toBeVisible();
  return cell;
}

async function siteOf(page: Page, study: string, name: string): Promise<Stored> {
  const answer = await page.request.get(`/api/v1/studies/${study}/sites?query=${encodeURIComponent(name)}`);
  const [site] = ((await answer.json()) as { items: Stored[] }).items;
  if (!site) throw new Error(`no site is named ${name}`);
  return site;
}

const leaderName = async (page: Page): Promise<string> =>
  (await page.locator('.rk-grid [row-index="0"] .name').innerText()).trim();

test('low, likely and high are typed in the grid, refused with the text kept, saved and undone', async ({
  open,
  baseURL,
}) => {
  const page = await open({ person: 'lead' });
  const study = await newStudy(page.request, baseURL, 'Typed figures');
  const entered = await criterionOf(page, study, 'entered');
  const cell = await leadersCell(page, study, entered);
  const name = await leaderName(page);
  const before = await siteOf(page, study, name);
  const old = before.values[entered.id] ?? 0;

  await cell.click();
  await page.keyboard.press('Enter');
  const field = page.getByRole('textbox', { name: `${entered.name} of ${name}` });
  await field.fill(`${old + 9} / ${old} / ${old + 1}`);
  await field.press('Enter');
  await expect(page.getByRole('alert')).toContainText('is above the figure');
  await expect(field).toHaveValue(`${old + 9} / ${old} / ${old + 1}`);
  await field.press('Escape');
  await expect(field).toBeHidden();

  await page.keyboard.press('Enter');
  await field.fill(`${old - 1} / ${old} / ${old + 2}`);
  await field.press('Enter');
  await expect(page.getByText(`${entered.name} of ${name}: ${old} (${old - 1} to ${old + 2})`)).toBeVisible();
  await expect(cell).toContainText(`uncertain, low ${old - 1} and high ${old + 2}`);
  expect((await siteOf(page, study, name)).particulars[entered.id]).toMatchObject({
    low: old - 1,
    high: old + 2,
  });

  await page.getByRole('button', { name: 'Undo' }).click();
  await expect
    .poll(async () => (await siteOf(page, study, name)).particulars[entered.id])
    .toEqual(before.particulars[entered.id]);
});

test('a rating is chosen by its steps with the keyboard alone', async ({ open, baseURL }) => {
  const page = await open({ person: 'lead' });
  const study = await newStudy(page.request, baseURL, 'Chosen steps');
  const rating = await criterionOf(page, study, 'rating');
  const cell = await leadersCell(page, study, rating);
  const name = await leaderName(page);
  const { values } = await siteOf(page, study, name);
  const step = (values[rating.id] ?? 0) === 4 ? 3 : 4;
  await cell.click();
  await page.keyboard.press('Enter');
  await expect(page.locator('.fig-editor').getByRole('radio', { checked: true })).toBeFocused();
  await page.keyboard.press(String(step));
  await expect.poll(async () => (await siteOf(page, study, name)).values[rating.id]).toBe(step);
});

test('someone else’s change of the same figure meanwhile is a choice between the two', async ({
  open,
  baseURL,
}) => {
  const page = await open({ person: 'lead' });
  page.complaints.expect(/status of 409/);
  const study = await newStudy(page.request, baseURL, 'Two hands');
  const entered = await criterionOf(page, study, 'entered');
  const cell = await leadersCell(page, study, entered);
  const name = await leaderName(page);
  const { id, version, values } = await siteOf(page, study, name);
  const old = values[entered.id] ?? 0;
  await cell.click();
  await page.keyboard.press('Enter');
  const field = page.getByRole('textbox', { name: `${entered.name} of ${name}` });
  await field.fill(String(old + 3));
  const answer = await page.request.patch(`/api/v1/studies/${study}/sites/${id}`, {
    headers: fromApp(baseURL),
    data: { version, values: { [entered.id]: old + 1 }, particulars: { [entered.id]: null } },
  });
  expect(answer.status()).toBe(200);
  // Not on the field, which gives way to the choice.
  await page.keyboard.press('Enter');
  await expect(page.getByText('while you were typing')).toBeVisible();
  await page.getByRole('button', { name: `Put ${old + 3}` }).click();
  await expect.poll(async () => (await siteOf(page, study, name)).values[entered.id]).toBe(old + 3);
});

test('figures without a source are found, given one and evidence, and the file comes back as it went', async ({
  open,
  baseURL,
}) => {
  const page = await open({ person: 'lead' });
  page.complaints.expect(/status of 422/);
  const study = await newStudy(page.request, baseURL, 'Sources');
  await page.goto(`/studies/${study}/criteria`);
  await page.getByRole('link', { name: 'See them' }).click();
  const count = page.getByText(/^\d+ of \d+ figures have no source\.$/);
  const [without = 0, all = 0] = (await count.innerText()).match(/\d+/g)?.map(Number) ?? [];
  expect(without).toBeGreaterThan(0);
  const rows = page.getByRole('table', { name: 'Entered figures' }).locator('tbody tr[data-site]');
  await expect(rows).toHaveCount(without);
  const name = (await rows.first().locator('th').innerText()).replace(/\s+\S+$/, '');

  await rows.first().getByRole('button').press('Enter');
  const sheet = page.locator('.side-sheet');
  await sheet.getByRole('textbox', { name: 'Source' }).fill('Harbour pilot book, 4th printing');
  await sheet.getByRole('textbox', { name: 'Date of the figure' }).fill('2026-06-30');
  await sheet.getByLabel('Confidence').selectOption('High');
  await sheet.getByRole('button', { name: /^Save the figure/ }).click();
  await expect(page.getByText(`${without - 1} of ${all} figures`)).toBeVisible();

  const picker = sheet.getByLabel('Evidence file');
  await picker.setInputFiles({
    name: 'page.pdf',
    mimeType: 'application/pdf',
    buffer: Buffer.from('<html>'),
  });
  await expect(sheet.getByText('page.pdf is no PDF')).toBeVisible();
  await picker.setInputFiles({ name: 'pilot book.pdf', mimeType: 'application/pdf', buffer: PDF });
  const link = sheet.getByRole('link', { name: 'pilot book.pdf' });
  const download = page.waitForEvent('download');
  await link.click();
  expect(await readFile(await (await download).path())).toEqual(PDF);

  const address = (await link.getAttribute('href')) ?? '';
  const file = await page.request.get(address);
  expect(file.headers()).toMatchObject({
    'content-type': 'application/pdf',
    'content-disposition': "attachment; filename*=UTF-8''pilot%20book.pdf",
    'content-security-policy': "sandbox; default-src 'none'",
    'x-content-type-options': 'nosniff',
  });
  expect(await file.body()).toEqual(PDF);
  const list = await page.request.get(`/api/v1/studies/${study}/evidence`);
  const sha256 = createHash('sha256').update(PDF).digest('hex');
  expect(await list.json()).toMatchObject({ total: 1, items: [{ sha256, mediaType: 'application/pdf' }] });

  const member = { email: 'reader@spinward.test', role: 'reader' };
  const stranger = await open({ person: 'reader' });
  expect((await stranger.request.get(address)).status()).toBe(404);
  await page.request.post(`/api/v1/studies/${study}/members`, { headers: fromApp(baseURL), data: member });
  expect((await stranger.request.get(address)).status()).toBe(200);
  await stranger.goto(`/studies/${study}/ranking?view=figures`);
  await stranger
    .getByRole('button', { name: `of ${name},` })
    .first()
    .click();
  await expect(stranger.getByText('Figures are an engineer’s or a lead’s to enter.').first()).toBeVisible();
  await expect(stranger.getByRole('button', { name: /^Save the figure/ })).toHaveCount(0);
  const refused = await stranger.request.delete(address.replace(/\/file$/, ''), {
    headers: fromApp(baseURL),
  });
  expect(refused.status()).toBe(403);

  await sheet.getByRole('button', { name: 'Remove pilot book.pdf' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Remove pilot book.pdf' }).click();
  await expect(sheet.getByText('No evidence files yet.')).toBeVisible();
  expect((await page.request.get(address)).status()).toBe(404);
});
