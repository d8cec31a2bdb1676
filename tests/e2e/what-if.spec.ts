import type { Page } from '@playwright/test';
import { DEMO_DOMAIN } from '#scripts/demo.ts';
import { fromApp, newStudy } from './support/studies.ts';
import { expect, test, type Open, type Person } from './support/test.ts';
import { picture } from './support/pictures.ts';

const PROMISE = 'Nothing here changes the study until the lead adopts it.';

/** A study of its own with an engineer and a reader beside its lead. */
async function team(open: Open, baseURL: string | undefined, title: string) {
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, title);
  for (const role of ['engineer', 'reader'] as const) {
    const answer = await lead.request.post(`/api/v1/studies/${study}/members`, {
      headers: fromApp(baseURL),
      data: { email: `${role}@${DEMO_DOMAIN}`, role },
    });
    expect(answer.status()).toBe(201);
  }
  const at = `/studies/${study}/ranking?view=what-if`;
  const come = async (person: Person, address = at) => {
    const page = await open({ person });
    await page.goto(address);
    await expect(page.getByText(PROMISE)).toBeVisible();
    await expect(page.getByRole('heading', { name: 'Rank moves' })).toBeVisible();
    return page;
  };
  return { lead, study, come };
}

const finding = (page: Page) => page.getByRole('heading', { level: 1 });
const outcome = (page: Page) => page.getByRole('region', { name: 'What comes of it' });

/** Leaves the leader out and puts all weight on one criterion. */
async function trySomething(page: Page, leader: string): Promise<void> {
  await page.getByLabel('Site to leave out').selectOption({ label: leader });
  await page.getByRole('button', { name: 'Leave this site out' }).click();
  const points = page.getByLabel('Points for Cost to first launch, as a number');
  await points.fill('100');
  await points.press('Enter');
}

test('an engineer tries, names and shares; the lead adopts with a reason, and the study’s ranking moves', async ({
  open,
  baseURL,
}) => {
  test.slow();
  const { study, come } = await team(open, baseURL, 'What if the leader fell out');
  const engineer = await come('engineer');
  const before = await finding(engineer).innerText();
  const leader = before.replace(/ leads by .*/, '');
  await trySomething(engineer, leader);
  await expect(outcome(engineer)).toContainText(`takes the lead from ${leader}.`);
  await expect(finding(engineer)).toHaveText(before);
  await engineer.getByText('As a table').click();
  await expect(
    engineer.getByRole('row', { name: new RegExp(`^${leader} 1 left out now left out`) }),
  ).toBeVisible();

  await engineer.getByLabel('Name of the what-if').fill('Without the leader');
  await engineer.getByRole('button', { name: 'Save what-if' }).click();
  await expect(engineer).toHaveURL(/what-if=[0-9a-f-]{36}/);
  await expect(engineer.getByText('You alone see it')).toBeVisible();
  const address = new URL(engineer.url());
  const whatIf = address.pathname + address.search;
  const id = address.searchParams.get('what-if') ?? '';

  const lead = await open({ person: 'lead' });
  await lead.goto(whatIf);
  await expect(lead.getByText('This what-if is not to be seen')).toBeVisible();
  await expect(lead.getByText('Without the leader')).toHaveCount(0);
  expect((await lead.request.get(`/api/v1/studies/${study}/what-ifs/${id}`)).status()).toBe(404);

  await engineer.getByRole('switch', { name: 'Shared with the study’s members' }).click();
  await expect(lead.getByRole('button', { name: 'Without the leader' })).toBeVisible({ timeout: 10_000 });
  // What the lead's address named is there as soon as it is shared.
  await expect(outcome(lead)).toContainText(`takes the lead from ${leader}.`);
  const expected = await outcome(lead).getByRole('status').innerText();
  await picture(lead, 'what-if');
  await lead.getByRole('button', { name: 'Adopt for the study' }).click();
  const dialog = lead.getByRole('dialog');
  await expect(dialog).toContainText(`${leader} is removed from Sites; it can be brought back there.`);
  await dialog.getByRole('button', { name: 'Adopt “Without the leader”' }).click();
  await expect(dialog.getByText('Write the reason for adopting it.')).toBeVisible();
  await dialog.getByLabel('Reason').fill('The port is closed to us from 2030.');
  await dialog.getByRole('button', { name: 'Adopt “Without the leader”' }).click();
  await expect(dialog).toHaveCount(0);
  await expect(finding(lead)).not.toHaveText(before);
  expect(expected).toContain(await finding(lead).innerText());
  await expect(finding(engineer)).toHaveText(await finding(lead).innerText());
  const sites = await lead.request.get(`/api/v1/studies/${study}/sites?query=${encodeURIComponent(leader)}`);
  expect(((await sites.json()) as { total: number }).total).toBe(0);
  const weights = await lead.request.get(`/api/v1/studies/${study}/weights?weights=study`);
  expect(await weights.json()).toMatchObject({ reason: 'The port is closed to us from 2030.' });
});

test('unsaved work is asked for, kept beside the other views, and undone step by step', async ({
  open,
  baseURL,
}) => {
  const { come } = await team(open, baseURL, 'Half a thought');
  const engineer = await come('engineer');
  const leader = (await finding(engineer).innerText()).replace(/ leads by .*/, '');
  const start = await outcome(engineer).innerText();
  await trySomething(engineer, leader);
  await engineer.getByRole('tab', { name: 'Compare' }).click();
  await expect(engineer.getByText(PROMISE)).toHaveCount(0);
  await engineer.getByRole('tab', { name: 'What-if' }).click();
  await expect(engineer.getByText('Not saved')).toBeVisible();

  let asked = '';
  engineer.once('dialog', (dialog) => {
    asked = dialog.type();
    void dialog.dismiss();
  });
  await engineer.evaluate(() => location.reload());
  await expect.poll(() => asked).toBe('beforeunload');

  await engineer.getByRole('button', { name: 'Start anew' }).click();
  await expect(engineer.getByRole('dialog')).toContainText('changes that are not saved');
  await engineer.keyboard.press('Escape');
  await engineer.getByRole('button', { name: 'Undo points for Cost to first launch' }).click();
  await engineer.getByRole('button', { name: `Undo leaving out ${leader}` }).click();
  await expect(engineer.getByText('Not saved')).toHaveCount(0);
  expect(await outcome(engineer).innerText()).toBe(start);
});

test('a reader looks on, and the keyboard alone tries, saves and lets go', async ({ open, baseURL }) => {
  const { come } = await team(open, baseURL, 'By keyboard');
  const engineer = await come('engineer');
  await engineer.getByRole('slider', { name: 'Points for Access' }).focus();
  await engineer.keyboard.press('End');
  await engineer.getByLabel('Name of the what-if').focus();
  await engineer.keyboard.type('Access above all');
  await engineer.getByRole('button', { name: 'Save what-if' }).focus();
  await engineer.keyboard.press('Enter');
  const shared = engineer.getByRole('switch', { name: 'Shared with the study’s members' });
  await expect(shared).toBeVisible();
  await shared.focus();
  await engineer.keyboard.press('Space');
  await expect(shared).toBeChecked();

  const reader = await come('reader');
  await reader.getByRole('button', { name: 'Access above all' }).click();
  await expect(reader.getByText(/A reader looks on/).first()).toBeVisible();
  await expect(reader.getByRole('button', { name: 'Keep a copy of my own' })).toHaveAttribute(
    'aria-disabled',
    'true',
  );

  await engineer.getByRole('button', { name: 'Let it go' }).focus();
  await engineer.keyboard.press('Enter');
  await engineer.getByRole('dialog').getByRole('button', { name: 'Let it go' }).press('Enter');
  await expect(engineer.getByText('No what-ifs kept yet.')).toBeVisible();
  await expect(reader.getByText('This what-if is not to be seen')).toBeVisible();
});
