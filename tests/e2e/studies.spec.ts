import { newStudy } from './support/studies.ts';
import { expect, test } from './support/test.ts';

test('a study is found, copied, archived and restored', async ({ open, baseURL }) => {
  const page = await open({ person: 'engineer' });
  const title = `Found again ${Date.now()}`;
  await newStudy(page.request, baseURL, title);
  await page.goto('/studies');
  await page.getByLabel('Find a study').fill(title.toUpperCase());
  const list = page.getByRole('region', { name: 'Studies' });
  await expect(list.getByRole('row')).toHaveCount(2);
  await expect(page).toHaveURL(/query=/);

  await page.getByRole('button', { name: `Copy ${title}` }).click();
  await page.getByRole('button', { name: 'Make study' }).click();
  await page.waitForURL('**/requirement');
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(
    '5 target orbits, 12 flights a year, flown by Rowan M.',
  );

  await page.goto(`/studies?query=${encodeURIComponent(title)}`);
  await expect(list.getByRole('row')).toHaveCount(3);
  await page.getByRole('button', { name: `Archive ${title}`, exact: true }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Archive study' }).click();
  await expect(list.getByRole('row')).toHaveCount(2);
  await page.getByText('Archived', { exact: true }).click();
  await page.getByRole('button', { name: `Restore ${title}`, exact: true }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Restore study' }).click();
  await expect(page.getByText('Nothing matches.')).toBeVisible();
  await page.getByRole('button', { name: 'Show all current studies' }).click();
  await expect(list.getByRole('link', { name: title, exact: true })).toBeVisible();
});

test('members come, wait, change roles and go; the last lead stays', async ({ open, baseURL }) => {
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, 'Members');
  const waiting = `waiting-${Date.now()}@quillon.test`;
  await lead.goto(`/studies/${study}/members`);
  await lead.getByLabel('Mail address').fill('no address');
  await lead.getByLabel('Mail address').blur();
  await expect(lead.getByText('This is no mail address')).toBeVisible();
  for (const email of ['reader@spinward.test', waiting]) {
    await lead.getByLabel('Mail address').fill(email);
    await lead.getByRole('button', { name: 'Add member' }).click();
    await expect(lead.getByRole('row', { name: new RegExp(email) })).toBeVisible();
  }
  await expect(lead.getByRole('heading', { level: 1 })).toHaveText(
    '3 members in this study, 1 waiting for an account.',
  );

  const admin = await open({ person: 'admin' });
  await admin.goto('/admin/people');
  await expect(admin.getByText(waiting)).toBeVisible();

  await lead.getByLabel('Role of L. Brandt').selectOption('engineer');
  await expect(lead.getByText('L. Brandt is engineer now')).toBeVisible();
  const leave = lead.getByRole('button', { name: 'Leave the study' });
  await expect(leave).toHaveAttribute('aria-disabled', 'true');
  await expect(leave).toHaveAccessibleDescription(/you are the last one/);
  lead.complaints.expect(/status of 409/);
  await lead.getByLabel('Role of I. Marsh').selectOption('reader');
  await expect(lead.getByText('A study keeps a lead, and this is the last one.')).toBeVisible();

  const member = await open({ person: 'reader' });
  await member.goto(`/studies/${study}/members`);
  await member.getByRole('button', { name: 'Leave the study' }).click();
  await member.getByRole('dialog').getByRole('button', { name: 'Leave study' }).click();
  await member.waitForURL('**/studies');
  expect((await member.request.get(`/api/v1/studies/${study}`)).status()).toBe(404);
  await expect(lead.getByRole('row', { name: /L. Brandt/ })).toHaveCount(0);
});
