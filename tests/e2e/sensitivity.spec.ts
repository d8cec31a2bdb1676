import type { APIRequestContext, Page } from '@playwright/test';
import { formatNumber } from '#contract/format.ts';
import type { CriterionList } from '#contract/criterion.ts';
import type { Sensitivity, SiteAcceptability } from '#contract/sensitivity.ts';
import { leaderChangeInWords, namesOf } from '#contract/sensitivity-words.ts';
import { errorFigure, shareFigure, underOneIn } from '#contract/share-words.ts';
import type { SiteList } from '#contract/site.ts';
import { picture } from './support/pictures.ts';
import { fromApp, newStudy } from './support/studies.ts';
import { expect, test } from './support/test.ts';

/** A study of its own whose entered figures have a low and a high about them. */
async function uncertainStudy(
  request: APIRequestContext,
  baseURL: string | undefined,
  title: string,
): Promise<string> {
  const id = await newStudy(request, baseURL, title);
  const address = `/api/v1/studies/${id}`;
  const { items: criteria } = (await (
    await request.get(`${address}/criteria?pageSize=500`)
  ).json()) as CriterionList;
  const { items: sites } = (await (await request.get(`${address}/sites?pageSize=500`)).json()) as SiteList;
  const entered = criteria.filter(({ source }) => source === 'entered');
  for (const { id: siteId, values, version } of sites) {
    const particulars = entered.flatMap((criterion) => {
      const figure = values[criterion.id];
      return typeof figure === 'number' ? [[criterion.id, { low: figure * 0.9, high: figure * 1.2 }]] : [];
    });
    const answer = await request.patch(`${address}/sites/${siteId}`, {
      headers: fromApp(baseURL),
      data: { particulars: Object.fromEntries(particulars), version },
    });
    expect(answer.status(), await answer.text()).toBe(200);
  }
  return id;
}

/** More candidates beside those of the study, so that drawing takes its time on any machine. */
async function addSites(
  request: APIRequestContext,
  baseURL: string | undefined,
  studyId: string,
  count: number,
): Promise<void> {
  const address = `/api/v1/studies/${studyId}/sites`;
  const { items } = (await (await request.get(`${address}?pageSize=500`)).json()) as SiteList;
  const [first] = items;
  for (let k = 0; k < count; k++) {
    const answer = await request.post(address, {
      headers: fromApp(baseURL),
      data: { name: `Candidate ${k}`, latitudeDeg: k / 4, longitudeDeg: k, values: first?.values ?? {} },
    });
    expect(answer.status(), await answer.text()).toBe(201);
  }
}

async function sensitivityOf(request: APIRequestContext, studyId: string, query = ''): Promise<Sensitivity> {
  const answer = await request.get(`/api/v1/studies/${studyId}/sensitivity${query}`);
  expect(answer.status()).toBe(200);
  return (await answer.json()) as Sensitivity;
}

/** The cells of a table's rows, heading first, as they are read. */
const rowsOf = (page: Page, label: string): Promise<string[][]> =>
  page
    .getByRole('region', { name: label })
    .locator('tbody tr')
    .evaluateAll((rows) =>
      rows.map((row) =>
        [...row.querySelectorAll('th, td')].map((cell) =>
          (cell.textContent ?? '').replace(/\s+/g, ' ').trim(),
        ),
      ),
    );

const shareCell = (share: number, samples: number): string =>
  share === 0
    ? `·${underOneIn(samples)}`
    : `${shareFigure(share, samples)}standard error ${errorFigure(share, samples)}`;

const tab = (page: Page, name: string) => page.getByRole('tab', { name });

test('rank acceptability, drawn in the browser, is the server’s in every printed figure', async ({
  open,
  baseURL,
}) => {
  test.setTimeout(120_000);
  const page = await open({ person: 'lead' });
  const study = await uncertainStudy(page.request, baseURL, 'Draws beside the server');
  await page.goto(`/studies/${study}/ranking`);
  await tab(page, 'Rank acceptability').click();
  await expect(page).toHaveURL(/view=acceptability/);
  await expect(page.getByRole('heading', { name: /is first in .* of 10,000 draws\./ })).toBeVisible({
    timeout: 30_000,
  });
  await picture(page, 'sensitivity-acceptability');

  const { acceptability, sites } = await sensitivityOf(page.request, study);
  if (!acceptability) throw new Error('the server drew nothing');
  const { samples } = acceptability;
  const nameOf = new Map(sites.map(({ siteId, name }) => [siteId, name]));
  const drawn = (rowOf: (site: SiteAcceptability) => string[]): string[][] =>
    acceptability.sites.map((site) => [nameOf.get(site.siteId) ?? '', ...rowOf(site)]);
  expect(await rowsOf(page, 'Rank acceptability of every site')).toEqual(
    drawn(({ shares }) => shares.map((share) => shareCell(share, samples))),
  );
  expect(await rowsOf(page, 'First rank and confidence factors')).toEqual(
    drawn(({ shares: [first = 0], confidence }) => [
      shareFigure(first, samples),
      errorFigure(first, samples),
      ...(confidence === null
        ? ['never leads', '–']
        : [shareFigure(confidence, samples), errorFigure(confidence, samples)]),
    ]),
  );
  const wins = await rowsOf(page, 'Pairwise winning shares');
  expect(wins.map(([, ...cells]) => cells)).toEqual(
    acceptability.sites.map((site) =>
      site.wins.map((share) => (share === null ? '–' : shareCell(share, samples))),
    ),
  );
  const central = await rowsOf(page, 'Central weights');
  expect(central).toHaveLength(acceptability.sites.filter(({ centralWeights }) => centralWeights).length);
  for (const [name, ...cells] of central) {
    const site = acceptability.sites.find(({ siteId }) => nameOf.get(siteId) === name);
    Object.values(site?.centralWeights ?? {}).forEach((weight, place) =>
      expect(Math.abs(Number(cells[place]) - weight)).toBeLessThan(0.001),
    );
    expect(cells.reduce((sum, cell) => sum + Math.round(Number(cell) * 1000), 0)).toBe(1000);
  }

  await test.step('another seed and weight model are in the address, and the server’s again', async () => {
    await page.getByText('Any at all').click();
    await page.getByLabel('Seed').fill('42');
    await page.getByLabel('Seed').press('Enter');
    await expect(page).toHaveURL(/model=simplex.*seed=42/);
    const other = await sensitivityOf(page.request, study, '?model=simplex&seed=42');
    const first = other.acceptability?.sites[0]?.shares[0] ?? 0;
    await expect
      .poll(async () => (await rowsOf(page, 'Rank acceptability of every site'))[0]?.[1])
      .toBe(shareCell(first, samples));
  });

  await test.step('a wrong number is refused where it stands', async () => {
    await page.getByLabel('Samples').fill('0');
    await page.getByLabel('Samples').press('Enter');
    await expect(page.getByText('Samples run from 1 to 100,000.')).toBeVisible();
  });
});

test('long draws show how far they are and can be cancelled; the page stays', async ({ open, baseURL }) => {
  const page = await open({ person: 'lead' });
  const study = await uncertainStudy(page.request, baseURL, 'Draws to cancel');
  await addSites(page.request, baseURL, study, 90);
  await page.goto(`/studies/${study}/ranking?view=acceptability&samples=100000`);
  const cancel = page.getByRole('button', { name: 'Cancel the draws' });
  await cancel.click({ timeout: 30_000 });
  await expect(page.getByText('Cancelled.')).toBeVisible();
  await expect(page.getByText('Nothing has been drawn yet.')).toBeVisible();
  await page.getByLabel('Samples').fill('1000');
  await page.getByLabel('Samples').press('Enter');
  await expect(page.getByRole('heading', { name: /of 1,000 draws\./ })).toBeVisible({ timeout: 30_000 });
});

test('the weights at which the leader changes, and the figures that cost the lead, are the server’s', async ({
  open,
  baseURL,
}) => {
  const page = await open({ person: 'engineer' });
  const study = await uncertainStudy(page.request, baseURL, 'What would change the leader');
  await page.goto(`/studies/${study}/ranking?view=holds`);
  const chart = page.getByRole('region', { name: /^Chart: / });
  await expect(chart.first()).toBeVisible();
  const answer = await sensitivityOf(page.request, study);
  const names = namesOf(
    answer.sites,
    answer.criteria.map(({ criterionId, name }) => ({ id: criterionId, name })),
  );
  const tables = page.getByText('As a table');
  await tables.nth(0).click();
  const said = (await rowsOf(page, 'The weight at which the leader changes')).map((cells) => cells.at(-1));
  expect(said).toEqual(answer.leaderChanges?.map((change) => leaderChangeInWords(change, names)));
  await tables.nth(1).click();
  const moved = await rowsOf(page, 'Margin with each uncertain figure at its low and high');
  expect(moved).toHaveLength(answer.tornado?.bars.length ?? -1);
  expect(moved.filter((cells) => cells.at(-1) === 'lost')).toHaveLength(
    answer.tornado?.bars.filter(({ atLow, atHigh }) => Math.min(atLow, atHigh) < 0).length ?? -1,
  );
  await picture(page, 'sensitivity-holds');
});

test('head to head: the terms add up, and the differences come out of them', async ({ open, baseURL }) => {
  const page = await open({ person: 'reader' });
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, 'Head to head');
  const member = await lead.request.post(`/api/v1/studies/${study}/members`, {
    headers: fromApp(baseURL),
    data: { email: 'reader@spinward.test', role: 'reader' },
  });
  expect(member.status(), await member.text()).toBe(201);
  await page.goto(`/studies/${study}/ranking?view=compare`);
  await page.getByRole('button', { name: 'Add a site' }).click();
  await expect(page).toHaveURL(/sites=\w+%2C\w+%2C\w+/);
  const table = page.getByRole('region', { name: /^Head to head: / });
  const figures = await table
    .locator('tbody tr, tfoot tr')
    .evaluateAll((rows) =>
      rows.map((row) =>
        [...row.querySelectorAll('td')].map((cell) =>
          Number((cell.textContent ?? '').replace('−', '-').replace('–', '0').replaceAll(',', '')),
        ),
      ),
    );
  const totals = figures.at(-1) ?? [];
  const terms = figures.slice(0, -1);
  const close = (parts: number[], total: number): void =>
    expect(parts.reduce((sum, part) => sum + part, 0)).toBeCloseTo(total, 9);
  // Weight; figure and term of three sites; two differences.
  [2, 4, 6].forEach((column, site) =>
    close(
      terms.map((row) => row[column] ?? NaN),
      totals[site] ?? NaN,
    ),
  );
  [7, 8].forEach((column, at) => {
    close(
      terms.map((row) => row[column] ?? NaN),
      totals[3 + at] ?? NaN,
    );
    for (const row of terms) close([row[2] ?? NaN, -(row[4 + 2 * at] ?? NaN)], row[column] ?? NaN);
  });
  const greatest = terms.map((row) => Math.max(Math.abs(row[7] ?? 0), Math.abs(row[8] ?? 0)));
  expect(greatest).toEqual([...greatest].sort((a, b) => b - a));
  await expect(page.getByText(`stands ${formatNumber(totals[3] ?? 0, 4)} above`)).toBeVisible();
  await picture(page, 'sensitivity-compare');
});
