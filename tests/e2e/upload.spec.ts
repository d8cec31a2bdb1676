import { readFile } from 'node:fs/promises';
import { newStudy } from './support/studies.ts';
import { expect, test } from './support/test.ts';
import { expectSoon } from '#tests/support/soon.ts';

test('a file with errors is read, put right, committed, undone, and had back', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer' });
  const study = await newStudy(page.request, baseURL, 'Upload screen');
  await page.goto(`/studies/${study}/sites`);
  const panel = page.locator('#upload');
  await panel.locator('input[type=file]').setInputFiles('seed/candidates-with-errors.csv');
  await expect(panel.getByText('12 rows read: 8 accepted, 1 changed, 3 refused.')).toBeVisible();
  await expect(panel.getByText('Code ES is taken by Essery Bank. Give this row another code.')).toBeVisible();
  await expect(panel.getByText('Longitude 184.8600 brought into −180 to 180.')).toBeVisible();

  await panel.getByRole('button', { name: 'Show them' }).click();
  await panel.getByLabel('Choose line 9, Kolob Bay').uncheck();
  await panel.getByRole('button', { name: 'Add 8 chosen rows' }).click();
  await expect(page.getByText('8 sites added from candidates-with-errors.csv')).toBeVisible();
  await expect(page.getByRole('heading', { level: 1 })).toContainText('20 candidates');

  const corrected = (await readFile('seed/candidates-with-errors.csv', 'utf8')).replace('140-140', '40-140');
  await panel.locator('input[type=file]').setInputFiles({
    name: 'corrected.csv',
    mimeType: 'text/csv',
    buffer: Buffer.from(corrected),
  });
  await expect(panel.getByText('8 in the study already, 2 refused')).toBeVisible();
  await panel.getByText('Update the sites').click();
  await panel.getByRole('button', { name: 'Add 2 good rows, update 8 sites' }).click();
  await expect(page.getByText('2 sites added from corrected.csv')).toBeVisible();

  await panel.getByText('Files kept: 2').click();
  const download = page.waitForEvent('download');
  await panel.getByRole('link', { name: 'Original file corrected.csv' }).click();
  expect(await readFile(await (await download).path(), 'utf8')).toBe(corrected);
  await panel.getByRole('button', { name: 'Undo the upload of corrected.csv' }).click();
  await page.getByRole('button', { name: 'Undo the upload', exact: true }).click();
  await expect(panel.getByText('2 added, 0 updated; undone')).toBeVisible();
  await expect(page.getByRole('heading', { level: 1 })).toContainText('20 candidates');
});

test('rows are pasted, and the columns matched by hand', async ({ open, baseURL }) => {
  const page = await open({ person: 'lead' });
  const study = await newStudy(page.request, baseURL, 'Pasted rows', 'blank');
  await page.goto(`/studies/${study}/sites`);
  const panel = page.locator('#upload');
  await panel.getByRole('button', { name: 'Paste rows' }).click();
  await panel
    .getByLabel('Rows with their heading')
    .fill('ort\tbreite\tlänge\tfjell\nGråskjær\t−4,5\t37,25\t12\n');
  await panel.getByRole('button', { name: 'Read the rows' }).click();
  await expect(panel.getByText('The heading names no column for a name.')).toBeVisible();
  await panel.getByLabel('ort is read as').selectOption('Name');
  await expect(panel.getByText('1 row read: 1 accepted, 0 refused.')).toBeVisible();
  await expect(panel.getByText('fjell, a new criterion')).toBeVisible();
  await panel.getByRole('button', { name: 'Add 1 good row' }).click();
  await expect(page.getByText('1 site added from pasted rows.tsv')).toBeVisible();
});

test('10,000 rows are read and added while the page answers', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer' });
  const study = await newStudy(page.request, baseURL, 'Ten thousand rows', 'blank');
  await page.goto(`/studies/${study}/sites`);
  // The map is drawn first, so that the time is the reader's alone.
  await expect(page.getByRole('button', { name: 'All pads' })).toBeVisible();
  const rows = Array.from(
    { length: 10_000 },
    (_, i) => `Site ${i},${(i % 1700) / 10 - 85},${(i * 7) % 360},${i}`,
  );
  const buffer = Buffer.from(`name,lat,lon,Cost\n${rows.join('\n')}\n`);
  // The main thread's own time, so that a busy machine does not count as a busy page.
  const devtools = await page.context().newCDPSession(page);
  await devtools.send('Performance.enable', { timeDomain: 'threadTicks' });
  const mainThreadS = async (): Promise<number> => {
    const { metrics } = await devtools.send('Performance.getMetrics');
    return metrics.find(({ name }) => name === 'TaskDuration')?.value ?? Infinity;
  };
  const before = await mainThreadS();
  const panel = page.locator('#upload');
  const started = Date.now();
  await panel.locator('input[type=file]').setInputFiles({ name: 'many.csv', mimeType: 'text/csv', buffer });
  await expect(panel.getByText('10,000 rows read')).toBeVisible({ timeout: 15_000 });
  expectSoon('preview of 10,000 rows', Date.now() - started, 3_000);
  // All of the page's work together stays under the half second after which progress would have to be shown.
  expectSoon('the page’s own work', ((await mainThreadS()) - before) * 1_000, 500);
  const sent = Date.now();
  await panel.getByRole('button', { name: 'Add 10,000 good rows' }).click();
  await expect(page.getByText('10,000 sites added from many.csv')).toBeVisible({ timeout: 30_000 });
  expectSoon('commit of 10,000 rows', Date.now() - sent, 5_000);
});
