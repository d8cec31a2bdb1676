import { describe, expect, test } from 'vitest';
import { changesOf, fieldsOf, readCriterion } from '#components/criteria/criterion-form.ts';
import { criteriaFinding, criteriaWhy, levelsInWords, limitInWords } from '#components/criteria/words.ts';
import { presentRanking } from '#contract/ranking-rows.ts';
import { COST, criteria, DAYS, four, trialModel } from '../ranking/trial.ts';

const [cost, days] = criteria;
if (!cost || !days) throw new Error('the trial has two criteria');
const fields = fieldsOf(cost);

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
    expect(levelsInWords({ levels: cost.levels, span: { kind: 'span', worst: 400, best: 200 } })).toBe(
      'fixed, 400 to 200',
    );
    expect(levelsInWords({ levels: { mode: 'candidates' }, span: { kind: 'flat', figure: 3 } })).toBe(
      'candidates, all equal: value 0 for all',
    );
    expect(limitInWords(cost)).toBe('≤ 390 M€');
    expect(limitInWords(days)).toBe('none');
  });
});
