import { describe, expect, test } from 'vitest';
import { presentRanking, rowsOf } from '#contract/ranking-rows.ts';
import {
  countsInWords,
  decimalsOf,
  findingText,
  letterOf,
  missingInWords,
  rankingWhy,
  rankRange,
  valueDecimals,
} from '#contract/ranking-words.ts';
import type { Criterion } from '#contract/criterion.ts';
import { COST, criteria, DAYS, four, trialFigures, trialModel } from '#tests/components/ranking/trial.ts';

const rankingOf = (...args: Parameters<typeof trialModel>) => presentRanking(trialModel(...args), 'study');
const sites = (...cells: [number | null, number | null][]) =>
  trialFigures(cells.map((row, at) => ({ name: `Site ${'ABCDEF'[at]}`, cells: row })));

describe('a ranking as it is answered', () => {
  const ranking = rankingOf();

  test('terms add up to the value, and rows come ranked, incomplete, set aside', () => {
    const [first] = ranking.ranked;
    const sum = first?.contributions.reduce((total, { term }) => total + (term ?? 0), 0);
    expect(sum).toBeCloseTo(first?.value ?? NaN, 12);
    expect(rowsOf(ranking).map(({ kind, name }) => `${kind} ${name}`)).toEqual([
      'ranked Far',
      'ranked Near',
      'incomplete =Unknown',
      'set-aside Dear',
    ]);
  });

  test('says why a site is set aside with as many decimals as its column has', () => {
    expect(ranking.setAside[0]?.reasons).toEqual([
      { criterionId: COST, message: 'Cost 395.5 M€, limit ≤ 390' },
    ]);
    expect(missingInWords(ranking, ranking.incomplete[0]?.missing ?? [])).toBe('no figure for Cost');
    expect(ranking.incomplete.map(rankRange)).toEqual(['1 to 3']);
  });

  test('says by its steps which rating fails a limit', () => {
    const [cost] = criteria;
    if (!cost) throw new Error('the trial has a criterion');
    const road: Criterion = {
      ...cost,
      name: 'Road',
      unit: '',
      direction: 'more',
      source: 'rating',
      steps: ['Track', 'Gravel', 'Two lanes', 'Trunk road', 'Motorway'],
      levels: { mode: 'fixed', worst: 0, best: 4 },
      limit: { kind: 'at-least', value: 2 },
    };
    const rated = rankingOf(trialFigures([{ name: 'Far', cells: [1] }], { criteria: [road] }));
    expect(rated.setAside[0]?.reasons).toEqual([
      { criterionId: COST, message: 'Road Gravel (1), limit ≥ Two lanes (2)' },
    ]);
  });

  test('draws no more rows than asked for and counts them all', () => {
    const cut = presentRanking(trialModel(), 'mine', 1);
    expect(rowsOf(cut)).toHaveLength(1);
    expect(cut.counts).toEqual({ ranked: 2, incomplete: 1, setAside: 1 });
    expect(countsInWords(cut.counts)).toBe('2 ranked, 1 incomplete, 1 set aside');
  });
});

describe('the finding', () => {
  test.each([
    ['a leader', four, 'Far leads by 0.05.', 3],
    [
      'two who share first place',
      sites([300, 200], [300, 200], [350, 150]),
      'Site A and Site B share first place.',
      3,
    ],
    [
      'four who do',
      sites([300, 200], [300, 200], [300, 200], [300, 200]),
      'Site A, Site B and 2 others share first place.',
      3,
    ],
    ['one alone', sites([300, 200]), 'Site A is the only site ranked.', 3],
    ['limits failed by all', sites([395, 200]), 'The one site fails a must-meet limit.', 3],
    ['figures missing in all', sites([null, 200], [300, null]), 'No site has every figure yet.', 3],
    ['both', sites([null, 200], [395, 200]), 'No site meets every limit with every figure known.', 3],
    ['no sites', sites(), 'No sites to rank yet.', 3],
  ])('for %s', (_, figures, words) => {
    const text = findingText(rankingOf(figures));
    expect(text.replace('0.050', '0.05')).toBe(words);
  });

  test('without points there is none, and nobody is ranked', () => {
    const ranking = rankingOf(four, {});
    expect(findingText(ranking)).toBe('No weights to rank sites by yet.');
    expect(rowsOf(ranking).map(({ kind }) => kind)).toEqual(['set-aside']);
  });

  test('the margin comes out from the two printed values: one more digit until it does', () => {
    // 0.7004 and 0.6996 print as 0.700 and 0.700 with a margin of 0.001; at four digits the difference closes.
    const ranking = rankingOf(sites([259.92, 300], [260.08, 300]), { [COST]: 1, [DAYS]: 0 });
    const decimals = valueDecimals(ranking);
    const [first, second] = ranking.ranked.map(({ value }) => Number(value.toFixed(decimals)));
    expect(decimals).toBe(4);
    expect(((first ?? 0) - (second ?? 0)).toFixed(decimals)).toBe(ranking.margin?.toFixed(decimals));
    expect(rankingWhy(ranking)).toBe(
      '0.7004 against 0.6996 for Site B. It stands furthest ahead of Site B in Cost: 0.7004 against 0.6996.',
    );
  });

  test('a lead too small for three digits is still printed as a lead', () => {
    const ranking = rankingOf(sites([260, 300], [260.00002, 300]), { [COST]: 1, [DAYS]: 0 });
    expect(findingText(ranking)).toMatch(/^Site A leads by 0\.0*[1-9]/);
  });
});

test('letters go on past Z, and entered columns print as many decimals as they need', () => {
  expect([0, 6, 25, 26, 27, 51, 52].map(letterOf)).toEqual(['A', 'G', 'Z', 'AA', 'AB', 'AZ', 'BA']);
  expect([decimalsOf(four, 0), decimalsOf(four, 1)]).toEqual([1, 0]);
});
