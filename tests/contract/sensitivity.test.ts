import { describe, expect, test } from 'vitest';
import { DrawQuery, Sensitivity, type SensitivityQuery } from '#contract/sensitivity.ts';
import { sensitivityOf } from '#contract/sensitivity-model.ts';
import { subjectOf } from '#contract/sensitivity-subject.ts';
import type { RankingModel } from '#contract/ranking-model.ts';
import { COST, DAYS, four, trialFigures, trialModel } from '#tests/components/ranking/trial.ts';

/* Near and Far lie between fixed levels, so that everything here can be worked by hand: with the weight w on cost,
   Near is worth 0.5 + 0.25 w and Far 1 − 0.5 w; they are level at w = 2/3. */

const ask = (model: RankingModel, query: Partial<SensitivityQuery> = {}) =>
  sensitivityOf(model, 'study', { ...DrawQuery.parse({}), ...query });
const idOf = (name: string): string => four.sites.find((site) => site.name === name)?.siteId ?? '';
const near = idOf('Near');
const far = idOf('Far');

describe('the answer', () => {
  const answer = ask(trialModel());

  test('is what the contract says, of ranked sites alone', () => {
    expect(Sensitivity.safeParse(answer).error).toBeUndefined();
    expect(answer.sites.map(({ name, rank }) => [name, rank])).toEqual([
      ['Far', 1],
      ['Near', 2],
    ]);
  });

  test('tells the weight at which the lead changes, and to whom', () => {
    const [cost, days] = answer.leaderChanges ?? [];
    expect(cost).toMatchObject({ criterionId: COST, weight: 0.6, below: null, above: { siteId: near } });
    expect(cost?.above?.weight).toBeCloseTo(2 / 3, 12);
    expect(days).toMatchObject({ criterionId: DAYS, above: null, below: { siteId: near } });
    expect(days?.below?.weight).toBeCloseTo(1 / 3, 12);
  });

  test('neither site dominates the other', () => {
    expect(answer.dominance).toEqual({ nonDominated: 2, dominated: [] });
  });

  test('closeness to the ideal of two sites: r = v/√Σv², times w, worked by hand', () => {
    // Cost: Near .75, Far .5; days: Near .5, Far 1. Each site has the ideal in one column, the anti-ideal in the other.
    const cost = (0.6 * 0.25) / Math.hypot(0.75, 0.5);
    const days = (0.4 * 0.5) / Math.hypot(0.5, 1);
    expect(answer.topsis?.map(({ siteId, rank }) => [siteId, rank])).toEqual([
      [far, 1],
      [near, 2],
    ]);
    expect(answer.topsis?.[0]?.closeness).toBeCloseTo(days / (cost + days), 12);
    expect(answer.topsis?.[1]?.closeness).toBeCloseTo(cost / (cost + days), 12);
  });
});

describe('the share of draws in which Far is first, by the three weight models', () => {
  test.each([
    // w uniform on 0…1.
    ['simplex', 2 / 3],
    // The weight of days is drawn in 0.2…0.6; cost, the largest, takes the rest: Far is first above 1/3.
    ['band', 2 / 3],
    // w uniform on 0.5…1.
    ['order', 1 / 3],
  ] as const)('%s', (model, share) => {
    const { acceptability } = ask(trialModel(), { model });
    const [first] = acceptability?.sites ?? [];
    expect(first?.siteId).toBe(far);
    const error = Math.sqrt((share * (1 - share)) / 10_000);
    expect(Math.abs((first?.shares[0] ?? 0) - share)).toBeLessThan(4 * error);
    expect(first?.errors[0]).toBeCloseTo(error, 3);
    expect(first?.wins[1]).toBe(first?.shares[0]);
    expect(first?.wins[0]).toBeNull();
    expect(first?.confidence).toBe(1);
    expect(first?.confidenceError).toBe(0);
  });

  test('the order is that of the weights', () => {
    expect(ask(trialModel(four, { [COST]: 1, [DAYS]: 3 }), { model: 'order' }).acceptability?.order).toEqual([
      DAYS,
      COST,
    ]);
  });
});

describe('uncertain figures', () => {
  const uncertain = trialFigures(
    [
      { name: 'Near', cells: [250, 200] },
      { name: 'Far', cells: [300, 300] },
      { name: 'Dear', cells: [395.5, 300] },
      { name: '=Unknown', cells: [null, 260] },
    ],
    {
      particulars: [
        [0, 0, { low: 230, high: 270, source: 'Quote' }],
        [1, 1, { low: 280 }],
        [0, 1, { source: 'Almanac', confidence: 'low' }],
        [2, 0, { low: 391, high: 399 }],
      ],
    },
  );
  const { tornado, acceptability } = ask(trialModel(uncertain));

  test('the margin at either end: Near is worth 0.71 at 230, 0.59 at 270; a side that is not said is the likely figure', () => {
    expect(tornado?.margin).toBeCloseTo(0.05, 12);
    expect(tornado?.bars).toHaveLength(2);
    const [widest, other] = tornado?.bars ?? [];
    expect(widest).toMatchObject({ siteId: near, criterionId: COST, low: 230, likely: 250, high: 270 });
    expect([widest?.atLow, widest?.atHigh].map((m) => Number(m?.toFixed(12)))).toEqual([-0.01, 0.11]);
    expect(other).toMatchObject({ siteId: far, criterionId: DAYS, low: 280, likely: 300, high: 300 });
    // Far at 280 days: 0.4 × 0.9 in place of 0.4.
    expect(other?.atLow).toBeCloseTo(0.01, 12);
    expect(other?.atHigh).toBeCloseTo(0.05, 12);
  });

  test('only those of ranked sites count', () => {
    expect(acceptability?.uncertainFigures).toBe(2);
  });

  test('a low that the figure has since fallen under is no low', () => {
    const moved = { ...uncertain, cells: [[225, 200], ...uncertain.cells.slice(1)] };
    expect(ask(trialModel(moved)).tornado?.bars[0]).toMatchObject({ low: 225, likely: 225, high: 270 });
  });
});

test('a criterion without weight that a ranked site has no figure for plays no part, and is named', () => {
  const gap = trialFigures([
    { name: 'Near', cells: [250, null] },
    { name: 'Far', cells: [300, 300] },
  ]);
  const model = trialModel(gap, { [COST]: 1, [DAYS]: 0 });
  const answer = ask(model, { model: 'simplex' });
  expect(answer.criteriaLeftOut).toEqual([DAYS]);
  expect(answer.criteria.map(({ criterionId }) => criterionId)).toEqual([COST]);
  expect(answer.acceptability?.sites[0]?.shares).toEqual([1, 0]);
});

test('fewer than two ranked sites have nothing to compare', () => {
  const one = ask(trialModel(trialFigures([{ name: 'Near', cells: [250, 200] }])));
  expect(one).toMatchObject({ leaderChanges: null, tornado: null, topsis: null, dominance: null });
  expect(one.acceptability).toBeNull();
  expect(one.sites).toHaveLength(1);
  expect(ask(trialModel(four, {}))).toMatchObject({ state: 'no-weights', sites: [], acceptability: null });
});

test('of more than a hundred ranked sites the best hundred are drawn, and how many are not is said', () => {
  const many = trialFigures(
    Array.from({ length: 103 }, (_, at) => ({ name: `S${at} site`, cells: [200 + at, 150 + at] })),
  );
  const answer = ask(trialModel(many), { samples: 20 });
  expect(answer.acceptability?.sites).toHaveLength(100);
  expect(answer.acceptability?.sitesLeftOut).toBe(3);
  expect(answer.acceptability?.sites.map(({ siteId }) => siteId)).toEqual(
    answer.sites.slice(0, 100).map(({ siteId }) => siteId),
  );
  expect(subjectOf(trialModel(many))?.sites).toHaveLength(103);
});
