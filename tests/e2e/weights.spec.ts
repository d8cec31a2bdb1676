import type { APIRequestContext, Page } from '@playwright/test';
import { DEMO_DOMAIN } from '#scripts/demo.ts';
import { fromApp, newStudy } from './support/studies.ts';
import { expect, test, type Open } from './support/test.ts';

/** Two entered criteria alone, so that pairs and orders are few; three sites with figures that pull apart. */
async function teamStudy(open: Open, baseURL: string | undefined) {
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, 'Weighed by three', 'blank');
  const api = `/api/v1/studies/${study}`;
  const post = async (path: string, data: object): Promise<{ id: string }> => {
    const answer = await lead.request.post(`${api}/${path}`, { headers: fromApp(baseURL), data });
    expect(answer.status(), await answer.text()).toBe(201);
    return (await answer.json()) as { id: string };
  };
  for (const role of ['engineer', 'reviewer', 'reader'] as const)
    await post('members', { email: `${role}@${DEMO_DOMAIN}`, role });
  const criteria = ['Cost', 'Time', 'Access'];
  const ids = [];
  for (const name of criteria)
    ids.push((await post('criteria', { source: 'entered', name, direction: 'more' })).id);
  const figures = [
    [10, 0, 5],
    [5, 10, 0],
    [0, 5, 10],
  ];
  for (const [place, row] of figures.entries()) {
    const name = ['Aro', 'Bem', 'Cal'][place] ?? '';
    await post('sites', {
      code: name.toUpperCase(),
      name,
      latitudeDeg: place,
      longitudeDeg: 10 + place,
      values: Object.fromEntries(ids.map((id, at) => [id, row[at]])),
    });
  }
  return { lead, study };
}

async function openCriteria(page: Page, study: string, whose: 'study' | 'mine'): Promise<void> {
  await page.goto(`/studies/${study}/criteria${whose === 'mine' ? '?weights=mine' : ''}`);
  await page.waitForFunction(() => document.querySelectorAll('astro-island[ssr]').length === 0);
  await expect(method(page, 'Points')).toBeVisible();
}

const method = (page: Page, name: string) =>
  page.getByRole('group', { name: 'How weights are set' }).getByText(name, { exact: true });

async function share(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Share my weights with the study' }).click();
  await expect(page.getByText('Shared with the study.')).toBeVisible();
}

interface Listed {
  items: { name: string; role: string; state: string; set: { method: string } | null }[];
}
const setsOf = async (request: APIRequestContext, study: string): Promise<Listed['items']> =>
  ((await (await request.get(`/api/v1/studies/${study}/weights/members`)).json()) as Listed).items;

test('three members set weights three ways, the lead chooses the mean, and agreement is told', async ({
  open,
  baseURL,
}) => {
  test.setTimeout(180_000);
  const { lead, study } = await teamStudy(open, baseURL);

  await test.step('the lead by points', async () => {
    await openCriteria(lead, study, 'mine');
    for (const [name, value] of [
      ['Cost', '60'],
      ['Time', '30'],
      ['Access', '10'],
    ] as const) {
      await lead.getByLabel(`Points for ${name}, as a number`).fill(value);
      await lead.getByLabel(`Points for ${name}, as a number`).press('Enter');
    }
    await share(lead);
  });

  const engineer = await open({ person: 'engineer' });
  await test.step('the engineer by pairs, with the keyboard; nothing is saved until all are there', async () => {
    await openCriteria(engineer, study, 'mine');
    await method(engineer, 'Pairwise').click();
    await engineer.getByRole('button', { name: 'Begin with nothing said' }).click();
    await expect(engineer.getByText('3 judgements missing.')).toBeVisible();
    const judge = async (first: string, second: string, name: RegExp, key: string): Promise<void> => {
      const strip = engineer.getByRole('group', { name: `${first} against ${second}` });
      await strip.getByRole('radio', { name }).focus();
      await engineer.keyboard.press(key);
      await expect(strip.getByText(/\(\d(\/\d)?\)\./)).toBeVisible();
    };
    // From the next stop by an arrow key: 5, then 2, then 1/2, which goes round in a circle.
    await judge('Cost', 'Time', /^6:/, 'ArrowRight');
    await expect(engineer.getByText('2 judgements missing.')).toBeVisible();
    expect((await setsOf(engineer.request, study)).find(({ role }) => role === 'engineer')?.state).toBe(
      'none',
    );
    await engineer.getByRole('button', { name: 'Next judgement' }).click();
    await judge('Cost', 'Access', /^1:/, 'ArrowRight');
    await engineer.getByRole('button', { name: 'Next judgement' }).click();
    await judge('Time', 'Access', /^3:/, 'ArrowRight');
    await expect(
      engineer.getByText(
        /Judgements disagree: consistency ratio \d\.\d\d, above 0\.10\. Start with Cost against Time: you wrote 5, the others imply about 1\.8\./,
      ),
    ).toBeVisible();
    await engineer.getByRole('button', { name: 'Go to Cost against Time' }).click();
    const strip = engineer.getByRole('group', { name: 'Cost against Time' });
    await strip.getByRole('radio', { name: /^5:/ }).focus();
    for (let press = 0; press < 5; press++) await engineer.keyboard.press('ArrowRight');
    await expect(
      engineer.getByText(/Time is equally to moderately more important than Cost/).first(),
    ).toBeVisible();
    await share(engineer);
  });

  const reviewer = await open({ person: 'reviewer' });
  await test.step('the reviewer by an order, moved with the keyboard', async () => {
    await openCriteria(reviewer, study, 'mine');
    await method(reviewer, 'Order').click();
    await reviewer.getByRole('button', { name: /^Start from the/ }).click();
    await reviewer.getByRole('button', { name: 'Access, 3 of 3' }).focus();
    await reviewer.keyboard.press('ArrowUp');
    await reviewer.keyboard.press('ArrowUp');
    await expect(reviewer.getByRole('button', { name: 'Access, 1 of 3' })).toBeFocused();
    await share(reviewer);
  });

  expect((await setsOf(lead.request, study)).map(({ state, set }) => [state, set?.method])).toEqual([
    ['shared', 'points'],
    ['shared', 'pairwise'],
    ['shared', 'centroid'],
  ]);

  await test.step('the lead chooses the mean, with a reason', async () => {
    await openCriteria(lead, study, 'study');
    await lead.getByRole('button', { name: 'Choose from members’ sets' }).click();
    await lead.getByRole('radio', { name: /^The mean of 3 shared sets/ }).check();
    await lead.getByRole('button', { name: 'Take these weights' }).click();
    await expect(lead.getByText('Write the reason for the choice.')).toBeVisible();
    await lead.getByLabel('Reason for the choice').fill('No view alone is the team’s.');
    await lead.getByRole('button', { name: 'Take these weights' }).click();
    await expect(
      lead.getByText(/^The mean of three members’ sets, chosen by .*: No view alone/),
    ).toBeVisible();
  });

  await test.step('a reader sees where the weights came from, and how far members agree', async () => {
    const reader = await open({ person: 'reader' });
    await openCriteria(reader, study, 'study');
    await expect(
      reader.getByText(/^The mean of three members’ sets, chosen by .*: No view alone/),
    ).toBeVisible();
    await reader.goto(`/studies/${study}/ranking?view=agreement`);
    await expect(
      reader.getByText(/3 members’ rankings of 3 sites .*: Kendall’s W is \d\.\d\d\./).first(),
    ).toBeVisible();
    await expect(reader.getByText(/^Weights lie furthest apart on /)).toBeVisible();
    await expect(reader.getByText(/^Ranks lie furthest apart on /)).toBeVisible();
    // Another set moves it while it is looked at.
    await reviewer.getByRole('button', { name: 'Stop sharing my weights' }).click();
    await expect(reader.getByText(/2 members’ rankings of 3 sites/).first()).toBeVisible();
    await openCriteria(reader, study, 'study');
    await expect(reader.getByText(/no longer shares a set\./)).toBeVisible();
  });
});

test('what is judged in part stays in the page, and is asked for before it is dropped', async ({
  open,
  baseURL,
}) => {
  const { lead, study } = await teamStudy(open, baseURL);
  await openCriteria(lead, study, 'study');
  await lead.getByRole('button', { name: 'Weigh all criteria the same' }).click();
  await expect(lead.getByText('Saved.', { exact: true })).toBeVisible();
  await method(lead, 'Swing').click();
  await lead.getByRole('button', { name: 'Begin with nothing said' }).click();
  await lead.getByRole('dialog').getByRole('button', { name: 'Begin with nothing said' }).click();
  await lead.getByRole('radio', { name: 'Time matters most' }).check();
  await expect(lead.getByText('2 swings missing.')).toBeVisible();
  await method(lead, 'Points').click();
  await expect(lead.getByLabel('Points for Cost, as a number')).toHaveValue('100');
  await method(lead, 'Swing').click();
  await expect(lead.getByText('2 swings missing.')).toBeVisible();
  for (const [name, value] of [
    ['Cost', '50'],
    ['Access', '0'],
  ] as const) {
    await lead.getByLabel(`Points for ${name}, as a number`).fill(value);
    await lead.getByLabel(`Points for ${name}, as a number`).press('Enter');
  }
  await expect(lead.getByText(/swings? missing/)).toHaveCount(0);
  await expect(lead.getByText('Saved.', { exact: true })).toBeVisible();
  await expect(lead.getByRole('heading', { level: 1 })).toHaveText('Time weighs most: 0.67 of 1.');
});
