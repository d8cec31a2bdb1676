import { execFile } from 'node:child_process';
import { readFileSync, writeFileSync } from 'node:fs';
import { promisify } from 'node:util';
import type { Page } from '@playwright/test';
import { DEMO_DOMAIN, DEMO_PASSWORD } from '#scripts/demo.ts';
import { picture } from './support/pictures.ts';
import { MAIN_STUDY } from './support/studies.ts';
import { expect, test, type Person } from './support/test.ts';

const run = promisify(execFile);

async function signIn(page: Page, person: Person): Promise<void> {
  await page.goto('/');
  await page.getByLabel('Mail address').fill(`${person}@${DEMO_DOMAIN}`);
  await page.getByLabel('Password', { exact: true }).fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.getByRole('link', { name: MAIN_STUDY }).first().click();
  await expect(page.getByRole('navigation', { name: 'Study sections' })).toBeVisible();
}

async function signOut(page: Page): Promise<void> {
  await page.getByRole('button', { name: /signed in/i }).click();
  await page.getByRole('button', { name: 'Sign out' }).click();
  await expect(page).toHaveURL(/\/sign-in/);
}

const section = (page: Page, name: string) =>
  page
    .getByRole('navigation', { name: 'Study sections' })
    .getByRole('link', { name: new RegExp(`^${name}`) });

/** The rows as they have to be: a latitude, a code and a sector were wrong. */
const putRight = (csv: string): string =>
  csv.replace('97.2150', '67.2150').replace(/,ES,/, ',EN,').replace('140-140', '140-170');

test('the main job: from a CSV with errors to a ranking and a memo', async ({ open }) => {
  test.setTimeout(240_000);
  const page = await open({ person: null });

  await test.step('the engineer uploads candidates and sees what is wrong with them', async () => {
    await signIn(page, 'engineer');
    await section(page, 'Sites').click();
    await page.getByLabel('File of candidate sites').setInputFiles('seed/candidates-with-errors.csv');
    const panel = page.getByRole('region', { name: 'Upload of candidate sites' });
    await expect(panel.getByText('12 rows read: 8 accepted, 1 changed, 3 refused.')).toBeVisible();
    await expect(panel.getByText('Latitude 97.2150 is outside −90 to 90.')).toBeVisible();
    await expect(panel.getByText(/Code ES is taken by Essery Bank\./)).toBeVisible();
    await picture(page, 'main-upload');
  });

  const refused =
    await test.step('adds the good rows, and takes the refused ones away to put them right', async () => {
      const download = page.waitForEvent('download');
      await page.getByRole('button', { name: 'Refused rows' }).click();
      const file = await (await download).path();
      await page.getByRole('button', { name: 'Add 9 good rows' }).click();
      await expect(page.getByText('9 sites added from candidates-with-errors.csv')).toBeVisible();
      return putRight(readFileSync(file, 'utf8'));
    });

  await test.step('uploads the refused rows put right', async () => {
    const buffer = Buffer.from(refused);
    await page
      .getByLabel('File of candidate sites')
      .setInputFiles({ name: 'put-right.csv', mimeType: 'text/csv', buffer });
    await expect(page.getByText(/3 rows read: 3 accepted, 0 refused\./)).toBeVisible();
    await page.getByRole('button', { name: 'Add 3 good rows' }).click();
    await expect(page.getByText('3 sites added from put-right.csv')).toBeVisible();
    await picture(page, 'main-sites');
  });

  await test.step('sees them in the ranking, incomplete until their figures are entered', async () => {
    await section(page, 'Ranking').click();
    await expect(page.getByText('Ponta Serrada').first()).toBeVisible();
    await expect(page.getByText(/Incomplete, rank could be/).first()).toBeVisible();
    await picture(page, 'main-ranking');
    await signOut(page);
  });

  await test.step('the reader takes the memo', async () => {
    await signIn(page, 'reader');
    await section(page, 'Memo').click();
    await picture(page, 'main-memo');
    // The browser shows the file in the tab.
    const shown = page.waitForResponse((response) => response.url().includes('/memo.pdf'));
    await page.getByRole('link', { name: 'Draft PDF' }).click();
    const answer = await shown;
    expect(answer.headers()['content-type']).toBe('application/pdf');
    const file = test.info().outputPath('memo.pdf');
    writeFileSync(file, await (await page.request.get(answer.url())).body());
    const { stdout } = await run('pdftotext', ['-layout', file, '-']);
    expect(stdout).toContain(MAIN_STUDY);
    expect(stdout).toMatch(/draft/i);
    expect(stdout).toContain('Ponta Serrada');
    await page.goBack();
    await signOut(page);
  });

  await test.step('the engineer undoes both uploads', async () => {
    await signIn(page, 'engineer');
    await section(page, 'Sites').click();
    await page.getByText('Files kept: 2').click();
    for (const name of ['put-right.csv', 'candidates-with-errors.csv']) {
      await page.getByRole('button', { name: `Undo the upload of ${name}` }).click();
      await page.getByRole('dialog').getByRole('button', { name: /^Undo/ }).click();
      await expect(page.getByRole('button', { name: `Undo the upload of ${name}` })).toHaveCount(0);
    }
    await expect(page.getByText('Ponta Serrada')).toHaveCount(0);
  });
});
