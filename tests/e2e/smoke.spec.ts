import { expect, test } from './support/test.ts';

test('the server answers for its health', async ({ request }) => {
  const answer = await request.get('/api/health');
  expect(answer.status()).toBe(200);
  expect(await answer.json()).toEqual({ status: 'ok', database: 'up' });
});

test('a visitor who is signed out meets the sign-in page', async ({ open }) => {
  const page = await open({ person: null });
  await page.goto('/studies');
  await expect(page).toHaveURL(/\/sign-in/);
});
