import type { APIRequestContext, Page } from '@playwright/test';
import type { Criterion, CriterionList } from '#contract/criterion.ts';
import type { Weights, WeightsDraft } from '#contract/weights.ts';
import { DEMO_DOMAIN, type DEMO_PEOPLE } from '#scripts/demo.ts';
import { readPdf } from '#tests/memo/poppler.ts';
import { readTable } from './support/printed.ts';
import { fromApp, newStudy } from './support/studies.ts';
import { expect, test } from './support/test.ts';

type Person = (typeof DEMO_PEOPLE)[number];

async function answered<T>(asked: ReturnType<APIRequestContext['get']>): Promise<T> {
  const answer = await asked;
  expect(answer.status(), await answer.text()).toBeLessThan(300);
  return (await answer.json()) as T;
}

const captioned = (caption: string): string => `table:has(caption:text("${caption}"))`;

/** Every row under its first cell, so that two tables can be laid side by side. */
const byName = (rows: readonly string[][]): Map<string, string[]> =>
  new Map(rows.map(([name = '', ...cells]) => [name, cells]));

/** The tables of the acceptability view, site by site. */
async function readView(page: Page, study: string) {
  await page.goto(`/studies/${study}/ranking?view=acceptability`);
  const table = (label: string) => `[aria-label="${label}"] table`;
  await expect(page.locator(table('Rank acceptability of every site'))).toBeVisible({ timeout: 30_000 });
  await expect(page.locator('[aria-busy="true"]')).toHaveCount(0);
  const ranks = await readTable(page, table('Rank acceptability of every site'));
  const sure = await readTable(page, table('First rank and confidence factors'));
  const central = await readTable(page, table('Central weights'));
  const wins = await readTable(page, table('Pairwise winning shares'), '.sr-only, .sv-error, .rk-unit');
  return { ranks, sure, central, wins, headline: await page.locator('.sv-headline h2').innerText() };
}

test('three members weigh three ways, the lead chooses, and page, memo and PDF agree in every figure', async ({
  open,
  baseURL,
}) => {
  const lead = await open({ person: 'lead' });
  const study = await newStudy(lead.request, baseURL, 'Three ways to weigh');
  const address = `/api/v1/studies/${study}`;
  const headers = fromApp(baseURL);
  const members = { engineer: 'engineer', reviewer: 'reviewer' } as const;
  for (const person of Object.keys(members) as Person[])
    await answered(
      lead.request.post(`${address}/members`, {
        headers,
        data: { email: `${person}@${DEMO_DOMAIN}`, role: person },
      }),
    );
  const { items } = await answered<CriterionList>(lead.request.get(`${address}/criteria?pageSize=500`));
  const ids = items.filter(({ source }) => source !== 'text').map(({ id }: Criterion) => id);
  const pairs = ids.flatMap((a, at) => ids.slice(at + 1).map((b): [string, string] => [a, b]));
  const ways: [Person, WeightsDraft][] = [
    ['lead', { method: 'swing', points: Object.fromEntries(ids.map((id, at) => [id, 100 - 12 * at])) }],
    ['engineer', { method: 'centroid', order: [...ids.slice(3), ...ids.slice(0, 3)] }],
    ['reviewer', { method: 'pairwise', judgements: pairs.map(([a, b]) => [a, b, 2]) }],
  ];
  for (const [person, set] of ways) {
    const page = person === 'lead' ? lead : await open({ person });
    const own = await answered<Weights>(page.request.get(`${address}/weights?weights=mine`));
    await answered(
      page.request.put(`${address}/weights?weights=mine`, {
        headers,
        data: { ...set, shared: true, version: own.version },
      }),
    );
  }
  const before = await answered<Weights>(lead.request.get(`${address}/weights`));
  const chosen = await answered<Weights>(
    lead.request.post(`${address}/weights/choice`, {
      headers,
      data: { from: { kind: 'mean' }, reason: 'No member’s set is better founded.', version: before.version },
    }),
  );
  expect(chosen.origin).toMatchObject({ kind: 'mean', members: [{}, {}, {}] });

  const view = await readView(lead, study);
  expect(view.ranks.length).toBeGreaterThan(5);
  await lead.goto(`/studies/${study}/memo`);
  const printed = {
    ranks: byName(await readTable(lead, captioned('Rank acceptability:'))),
    sure: byName(await readTable(lead, captioned('First rank, confidence'))),
    central: byName(await readTable(lead, captioned('Central weights:'))),
  };

  // Ranks: as many columns as the memo has, for each of its sites.
  expect(printed.ranks.size).toBe(view.ranks.length);
  for (const [name = '', ...cells] of view.ranks) {
    const memo = printed.ranks.get(name) ?? [];
    expect(memo.length).toBeGreaterThan(5);
    expect(memo, name).toEqual(cells.slice(0, memo.length));
  }
  // Shares of first rank, confidence factors and how often the leader stands above each site.
  const above = view.wins[0]?.slice(1) ?? [];
  view.sure.forEach(([name = '', first, error, confidence, confidenceError], at) => {
    const [share, shareError, factor, factorError, leaderAbove] = printed.sure.get(name) ?? [];
    const dot = (text: string | undefined) => (text?.startsWith('under 1/') ? '·' : text);
    expect([share, shareError, factor, factorError], name).toEqual(
      [first, error, confidence, confidenceError].map(dot),
    );
    expect(leaderAbove, name).toBe(above[at]);
  });
  // Central weights of every site that is ever first.
  expect(printed.central.size).toBe(view.central.length);
  for (const [name = '', ...cells] of view.central) expect(printed.central.get(name), name).toEqual(cells);

  // What is printed is what the preview shows, and the sentence is the view's.
  const pdf = readPdf(await (await lead.request.get(`${address}/memo.pdf`)).body());
  for (const rows of Object.values(printed))
    for (const [name, cells] of rows) expect(pdf.text).toContain([name, ...cells].join(' '));
  expect(pdf.text).toContain(view.headline);
  expect(pdf.text).toContain('The set is the mean of 3 members’ sets');
  expect(pdf.text).toContain('No member’s set is better founded.');
  expect(pdf.text).toMatch(/Kendall’s W is [01]\.\d{2}/);
});
