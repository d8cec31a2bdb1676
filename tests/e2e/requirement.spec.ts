import { DEMO_DOMAIN } from '#scripts/demo.ts';
import { fromApp, newStudy } from './support/studies.ts';
import { expect, test } from './support/test.ts';

test('a blank study becomes a requirement: orbits, vehicle, question, all saved on the way', async ({
  open,
}) => {
  const page = await open({ person: 'engineer' });
  await page.goto('/studies');
  await page.getByRole('button', { name: 'New study' }).click();
  await page.getByRole('button', { name: 'Make study' }).click();
  await expect(page.getByText('A study has a title.')).toBeVisible();
  await page.getByLabel('Title').fill('Written from nothing');
  await page.getByRole('button', { name: 'Make study' }).click();
  await page.waitForURL('**/requirement');
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('No target orbits yet.');

  await page.getByRole('button', { name: 'Add target orbit' }).click();
  await page.getByLabel('Name (optional)').fill('Morning watch');
  await page.getByLabel('Perigee altitude').fill('6');
  await page.getByLabel('Apogee altitude').fill('600');
  await expect(page.getByText('An orbit’s altitude lies between 80 km and 1,000,000 km.')).toBeVisible();
  await page.getByLabel('Perigee altitude').fill('600');
  await page.getByRole('switch', { name: 'Sun-synchronous' }).check();
  await expect(page.getByText('Inclination 97.79°')).toBeVisible();
  await page.getByLabel('Flights a year').fill('4');
  await page.getByRole('button', { name: 'Add orbit' }).click();
  const manifest = page.getByRole('region', { name: 'Launch manifest' });
  await expect(manifest.getByRole('row', { name: /Morning watch/ })).toContainText('97.79');

  await page.getByLabel('From the library').selectOption({ label: 'Alder S (invented small two-stage)' });
  await page.getByRole('button', { name: 'Take Alder S' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(
    '1 target orbit, 4 flights a year, flown by Alder S.',
  );
  const check = page.getByRole('region', { name: 'Payload check' });
  const payload = check
    .getByRole('row', { name: /Morning watch/ })
    .getByRole('cell')
    .last();
  const before = await payload.innerText();
  await page.getByLabel('Gravity loss').fill('1700');
  await page.getByLabel('Gravity loss').blur();
  await expect(page.getByText('Above the usual range')).toBeVisible();
  await expect(payload).not.toHaveText(before);

  await page.getByLabel('Question to decide').fill('From where should the morning watch fly?');
  await page.getByLabel('Decide by').fill('31.1.2027');
  await page.getByLabel('Decide by').blur();
  await expect(page.getByText('Write the day as YYYY-MM-DD.')).toBeVisible();
  await page.getByLabel('Decide by').fill('2027-01-31');
  await page.getByLabel('Decide by').blur();
  // An orbit, a vehicle taken and changed, a question, a day: five changes after the first revision.
  await expect(page.locator('[data-revision-number]').first()).toHaveText('6');

  await page.reload();
  await expect(page.getByLabel('Question to decide')).toHaveValue('From where should the morning watch fly?');
  await expect(page.getByLabel('Decide by')).toHaveValue('2027-01-31');
  await expect(page.getByLabel('Gravity loss')).toHaveValue('1700');

  await page.getByRole('button', { name: 'Remove Morning watch' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toContainText('No target orbits yet');
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(manifest.getByRole('row', { name: /Morning watch/ })).toContainText('97.79');
});

test('two people at one field: the second sees both versions and chooses', async ({ open, baseURL }) => {
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, 'Two at one field');
  await lead.request.post(`/api/v1/studies/${study}/members`, {
    headers: fromApp(baseURL),
    data: { email: `engineer@${DEMO_DOMAIN}`, role: 'engineer' },
  });
  const engineer = await open({ person: 'engineer' });
  for (const page of [lead, engineer]) {
    await page.goto(`/studies/${study}/requirement`);
    await page.getByRole('button', { name: 'Edit Polar' }).click();
  }
  await lead.getByLabel('Flights a year').fill('7');
  await engineer.getByLabel('Flights a year').fill('5');
  await engineer.getByLabel('Flights a year').blur();
  // The engineer's figure reaches the lead's table; the field being typed in keeps what is typed.
  await expect(
    lead
      .getByRole('row', { name: /^Polar POL/ })
      .getByRole('cell')
      .nth(5),
  ).toHaveText('5');
  await expect(lead.getByLabel('Flights a year')).toHaveValue('7');
  await lead.getByLabel('Flights a year').blur();
  await expect(lead.getByText('changed this orbit while you were typing')).toBeVisible();
  await expect(engineer.getByLabel('Flights a year')).toHaveValue('5');
  await lead.getByRole('button', { name: 'Put yours in its place' }).click();
  await expect(engineer.getByLabel('Flights a year')).toHaveValue('7');

  // Different fields go together without a question; the browser itself notes the stale write.
  lead.complaints.expect(/status of 409/);
  await lead.getByLabel('Parking altitude').fill('190');
  await engineer.getByLabel('Flights a year').fill('2');
  await engineer.getByLabel('Flights a year').blur();
  await lead.getByLabel('Parking altitude').blur();
  await expect(engineer.getByLabel('Parking altitude')).toHaveValue('190');
  await expect(lead.getByLabel('Flights a year')).toHaveValue('2');
});

test('a stale write that no event announced shows both versions too', async ({ open, baseURL }) => {
  const page = await open({ person: 'lead' });
  const study = await newStudy(page.request, baseURL, 'Unannounced');
  await page.route('**/api/v1/events', (route) => route.abort());
  page.complaints.expect(/ERR_FAILED|status of 409/);
  await page.goto(`/studies/${study}/requirement`);
  await page.request.patch(`/api/v1/studies/${study}`, {
    headers: fromApp(baseURL),
    data: { question: 'Theirs', version: 1 },
  });
  await page.getByLabel('Question to decide').fill('Mine');
  await page.getByLabel('Question to decide').blur();
  await expect(page.getByText('Question to decide: Theirs')).toBeVisible();
  await page.getByRole('button', { name: 'Keep theirs' }).click();
  await expect(page.getByLabel('Question to decide')).toHaveValue('Theirs');
});

test('an orbit that a criterion is worked out for stays, with the reason', async ({ open, baseURL }) => {
  const page = await open({ person: 'lead' });
  const study = await newStudy(page.request, baseURL, 'Held orbit');
  const orbits = await page.request.get(`/api/v1/studies/${study}/orbits?query=Polar`);
  const { items } = (await orbits.json()) as { items: { id: string }[] };
  await page.request.post(`/api/v1/studies/${study}/criteria`, {
    headers: fromApp(baseURL),
    data: { source: 'computed', quantity: 'payload', orbitId: items[0]?.id },
  });
  page.complaints.expect(/status of 409/);
  await page.goto(`/studies/${study}/requirement`);
  await page.getByRole('button', { name: 'Remove Polar' }).click();
  await expect(page.getByText('Payload to Polar is worked out for it')).toBeVisible();
  await expect(page.getByRole('row', { name: /^Polar POL/ })).toBeVisible();
});

test('a reader sees the requirement and why it cannot be changed', async ({ open, baseURL }) => {
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, 'Read only');
  await lead.request.post(`/api/v1/studies/${study}/members`, {
    headers: fromApp(baseURL),
    data: { email: `reader@${DEMO_DOMAIN}`, role: 'reader' },
  });
  const reader = await open({ person: 'reader' });
  await reader.goto(`/studies/${study}/requirement`);
  await expect(reader.getByText('leads and engineers write the inputs')).toBeVisible();
  await expect(reader.getByRole('button', { name: 'Add target orbit' })).toHaveCount(0);
  await expect(reader.getByLabel('Question to decide')).toHaveAttribute('readonly');
});
