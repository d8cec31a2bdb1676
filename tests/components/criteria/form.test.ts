import { describe, expect, test } from 'vitest';
import { changesOf, fieldsOf, readCriterion, settingsNow } from '#components/criteria/criterion-form.ts';
import {
  criteriaFinding,
  criteriaWhy,
  levelsInWords,
  limitInWords,
  shapeInWords,
  sourceInWords,
} from '#components/criteria/words.ts';
import { presentRanking } from '#contract/ranking-rows.ts';
import type { Criterion } from '#contract/criterion.ts';
import { COST, criteria, DAYS, four, trialModel } from '../ranking/trial.ts';

const [cost, days] = criteria;
if (!cost || !days) throw new Error('the trial has two criteria');
const fields = fieldsOf(cost);
const rating: Criterion = {
  ...days,
  id: '00000000-0000-7000-8000-0000000000c3',
  name: 'Road',
  unit: '',
  source: 'rating',
  steps: ['Track', 'Gravel', 'Two lanes', 'Trunk road', 'Motorway'],
  levels: { mode: 'fixed', worst: 0, best: 4 },
};

describe('a criterion’s form', () => {
  test('reads back what it was filled with, and changes nothing', () => {
    const read = readCriterion(fields);
    expect(read.ok && changesOf(cost, read.settings)).toEqual({});
  });

  test('sends only what changed', () => {
    const read = readCriterion({ ...fields, limitValue: 380, name: ' Cost ' });
    expect(read.ok && changesOf(cost, read.settings)).toEqual({ limit: { kind: 'at-most', value: 380 } });
    const open = readCriterion({ ...fields, levelMode: 'candidates', limitKind: 'none' });
    expect(open.ok && changesOf(cost, open.settings)).toEqual({
      levels: { mode: 'candidates' },
      limit: null,
    });
  });

  test('a rating’s form holds its steps, and sends them whole when one is renamed', () => {
    const form = fieldsOf(rating);
    const read = readCriterion(form);
    expect(read.ok && changesOf(rating, read.settings)).toEqual({});
    const renamed = readCriterion({ ...form, steps: form.steps.with(1, 'Broken gravel'), unit: 'x' });
    expect(renamed.ok && changesOf(rating, renamed.settings)).toEqual({
      steps: ['Track', 'Broken gravel', 'Two lanes', 'Trunk road', 'Motorway'],
    });
  });

  test('shape and group are sent, and what stood there is kept to go back to', () => {
    const groupId = '00000000-0000-7000-8000-0000000000d1';
    const shape = { kind: 'exponential', curvature: 2 } as const;
    const read = readCriterion({ ...fields, group: groupId, shape });
    const change = read.ok ? changesOf(cost, read.settings) : {};
    expect(change).toEqual({ groupId, shape });
    expect(settingsNow(cost, change)).toEqual({ groupId: null, shape: { kind: 'straight' } });
    const out = readCriterion({ ...fieldsOf({ ...cost, groupId }), group: '' });
    expect(out.ok && changesOf({ ...cost, groupId }, out.settings)).toEqual({ groupId: null });
  });

  test('a computed criterion keeps its unit whatever the field says', () => {
    const read = readCriterion({ ...fields, unit: '€' });
    expect(read.ok && changesOf({ ...cost, source: 'computed' }, read.settings)).toEqual({});
  });

  test.each([
    ['levels against the direction', { worst: 100, best: 200 }, 'best', /smaller/],
    ['text for a level', { worst: 'dear' }, 'worst', /number/],
    ['no figure for a limit', { limitValue: undefined }, 'limitValue', /number/],
    ['no name', { name: '  ' }, 'name', /name/],
  ])('says beside its field: %s', (_, change, field, words) => {
    const read = readCriterion({ ...fields, ...change });
    expect(read.ok).toBe(false);
    const error = read.ok ? undefined : read.errors.find((one) => one.field === field);
    expect(error?.message).toMatch(words);
  });
});

describe('in words', () => {
  const ranking = presentRanking(trialModel(), 'study');

  test('what weighs most, and what there is', () => {
    expect(criteriaFinding(ranking)).toBe('Cost weighs most: 0.60 of 1.');
    const even = presentRanking(trialModel(four, { [COST]: 1, [DAYS]: 1 }), 'study');
    expect(criteriaFinding(even)).toBe('Cost and Launch days weigh most: 0.50 each.');
    expect(criteriaFinding(presentRanking(trialModel(four, {}), 'study'))).toBe(
      '2 criteria and no weights yet.',
    );
    expect(criteriaFinding({ criteria: [] })).toBe('No criteria yet.');
    expect(criteriaWhy(criteria)).toBe('2 criteria: 0 computed and 2 entered. 1 carries a must-meet limit.');
  });

  test('levels and limits, and that equal candidates count nothing', () => {
    const span = { kind: 'span', worst: 400, best: 200 } as const;
    expect(levelsInWords({ ...cost, span })).toBe('fixed, 400 to 200');
    expect(levelsInWords({ ...cost, span, shape: { kind: 'exponential', curvature: -1.5 } })).toBe(
      'fixed, 400 to 200, bent with curvature −1.5',
    );
    expect(
      levelsInWords({ ...cost, levels: { mode: 'candidates' }, span: { kind: 'flat', figure: 3 } }),
    ).toBe('candidates, all equal: value 0 for all');
    expect(limitInWords(cost)).toBe('≤ 390 M€');
    expect(limitInWords(days)).toBe('none');
  });

  test('a rating’s levels, limit and source by its steps', () => {
    const fit = { ...rating, limit: { kind: 'at-least', value: 2 } as const };
    expect(limitInWords(fit)).toBe('≥ Two lanes (2)');
    expect(levelsInWords({ ...fit, span: { kind: 'span', worst: 0, best: 4 } })).toBe(
      'fixed, Track (0) to Motorway (4)',
    );
    expect(sourceInWords(fit)).toBe('rating, Track to Motorway');
    expect(criteriaWhy([...criteria, rating])).toMatch('2 entered and 1 rated');
  });

  test('where a computed criterion comes from: for the manifest how it comes to one figure, for an orbit no more', () => {
    const turn: Criterion = { ...cost, source: 'computed', quantity: 'turn', unit: '°' };
    expect(sourceInWords(turn)).toBe('computed: greatest of the orbits; dogleg or plane change');
    expect(sourceInWords({ ...turn, orbitId: days.id })).toBe('computed');
  });

  test('a shape by where its points lie in the criterion’s unit', () => {
    const levels = { span: { worst: 400, best: 200 }, unit: 'M€' };
    expect(shapeInWords({ kind: 'straight' }, levels)).toBe('straight between');
    expect(shapeInWords({ kind: 'exponential', curvature: 2 }, levels)).toBe('bent with curvature 2');
    const knots = (...inner: [number, number][]) =>
      ({ kind: 'piecewise', knots: [[0, 0], ...inner, [1, 1]] as [number, number][] }) as const;
    expect(shapeInWords(knots([0.25, 0.5], [0.75, 0.9]), levels)).toBe(
      'through 0.500 at 350 M€ and 0.900 at 250 M€',
    );
    expect(shapeInWords(knots([0.25, 0.5]))).toBe('through 3 points');
    expect(shapeInWords(knots(), levels)).toBe('through 2 points');
  });
});

test.each([
  ['a step without a name', 'steps.3', { steps: ['a', 'b', 'c', '', 'e'] }],
  ['two steps of one name', 'steps.3', { steps: ['a', 'b', 'c', 'A', 'e'] }],
])('says beside its field: %s', (_, field, change) => {
  const read = readCriterion({ ...fieldsOf(rating), ...change });
  expect(read.ok ? [] : read.errors.map((error) => error.field)).toEqual([field]);
});
