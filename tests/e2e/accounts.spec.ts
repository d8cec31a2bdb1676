import { expect, test } from './support/test.ts';

test('invited, signed in, with a key, deactivated: an account’s life', async ({ open, browser, baseURL }) => {
  test.slow();
  const email = `tove-${Date.now()}@quillon.test`;
  const admin = await open({ person: 'admin' });

  await admin.goto('/admin/people');
  await admin.getByLabel('Mail address to invite').fill(email);
  await admin.getByRole('button', { name: 'Invite', exact: true }).click();
  await expect(admin.getByRole('region', { name: 'Invitations' }).getByText(email)).toBeVisible();

  // No mail server is set: the letter stands in the outbox, with the link that went nowhere else.
  await admin.goto('/admin/outbox');
  const letter = admin.getByRole('region', { name: 'Mail kept here' }).getByRole('row', { name: email });
  await letter.getByRole('button').click({ timeout: 20_000 });
  const link = await admin.getByRole('link', { name: /\/invitation\// }).getAttribute('href');

  const guest = await open({ person: null });
  await guest.goto(link ?? '');
  await guest.getByLabel('Name').fill('Tove Marsh');
  await guest.getByLabel('Password').fill('short');
  await guest.getByRole('button', { name: 'Make account' }).click();
  await expect(guest.getByText('A password has at least 10 characters.')).toBeVisible();
  await guest.getByLabel('Password').fill('tide tables of 1911');
  await guest.getByRole('button', { name: 'Make account' }).click();
  await guest.waitForURL('**/studies');

  await guest.goto('/account');
  await guest.getByLabel('What the new key is for').fill('nightly upload');
  await guest.getByRole('button', { name: 'Make key' }).click();
  const key = (await guest.getByText(/^sw_\S{20,}$/).textContent()) ?? '';
  const script = await browser.newContext({ baseURL, extraHTTPHeaders: { authorization: `Bearer ${key}` } });
  const who = await script.request.get('/api/v1/account');
  expect(await who.json()).toMatchObject({ email, name: 'Tove Marsh', administrator: false });

  await admin.goto('/admin/people');
  await admin.getByLabel('Find a person').fill(email);
  await admin.getByRole('button', { name: 'Deactivate Tove Marsh' }).click();
  await admin.getByRole('dialog').getByRole('button', { name: 'Deactivate Tove Marsh' }).click();
  await expect(admin.getByRole('button', { name: 'Activate Tove Marsh', exact: true })).toBeVisible();
  expect((await script.request.get('/api/v1/account')).status()).toBe(401);
  await script.close();
  await guest.goto('/studies');
  await expect(guest).toHaveURL(/\/sign-in\?next=/);
});

test('signing in leads to the page that was asked for, and only to one of ours', async ({ open }) => {
  const page = await open({ person: null });
  await page.goto('/account');
  await expect(page).toHaveURL('/sign-in?next=%2Faccount');
  const signIn = async (person: string): Promise<void> => {
    await page.getByRole('button', { name: `Fill in ${person}@spinward.test` }).click();
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  };
  await signIn('reader');
  await page.waitForURL('**/account');
  await page.getByRole('button', { name: /open the menu/ }).click();
  await page.getByRole('button', { name: 'Sign out', exact: true }).click();
  await page.waitForURL('**/sign-in');
  await page.goto('/sign-in?next=//elsewhere.test/');
  await signIn('reader');
  await page.waitForURL('**/studies');
});

test('keys, theme and find work without a pointer', async ({ open }) => {
  const page = await open({ person: 'reader', colorScheme: 'light' });
  await page.goto('/studies');
  await page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
  await page.keyboard.press('k');
  await expect(page.getByRole('dialog', { name: 'Keys' })).toBeVisible();
  await page.getByRole('switch', { name: /Single keys/ }).uncheck();
  await page.keyboard.press('Escape');
  await page.keyboard.press('f');
  await expect(page.getByRole('dialog', { name: 'Find' })).toBeHidden();
  await page.getByRole('button', { name: 'Keys (k)' }).click();
  await page.getByRole('switch', { name: /Single keys/ }).check();
  await page.keyboard.press('Escape');
  await page.keyboard.press('f');
  const find = page.getByRole('dialog', { name: 'Find' });
  await find.getByLabel('Study').fill('second');
  await expect(find.getByRole('link', { name: /Second launch site/ })).toBeVisible();
  await page.keyboard.press('Enter');
  await page.waitForURL(/\/studies\/[0-9a-f-]{36}\/\w+/);
  await page.keyboard.press('2');
  await page.waitForURL(/\/sites$/);
  await page.getByRole('button', { name: 'Day or night' }).first().click();
  await expect(page.locator('html')).toHaveAttribute('data-theme', 'night');
  await page.reload();
  await expect(page.locator('html')).toHaveAttribute('data-theme', 'night');
});
