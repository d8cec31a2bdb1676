import { describe, expect, test } from 'vitest';
import {
  RATIOS,
  ratioInFigures,
  ratioInWords,
  ratioOf,
  withJudgement,
} from '#components/weights/judgement.ts';
import {
  changedSince,
  consistencyInWords,
  originInWords,
  unjudgedInWords,
} from '#components/weights/words.ts';
import { weighing } from '#contract/weighing.ts';
import {
  pointsStatement,
  type MemberWeights,
  type WeightOrigin,
  type WeightStatement,
  type Weights,
} from '#contract/weights.ts';

const names = new Map([
  ['a', 'Cost'],
  ['b', 'Time'],
  ['c', 'Access'],
]);
const items = ['a', 'b', 'c'].map((id) => ({ id, groupId: null }));
const pairwise = (judgements: WeightStatement['judgements']): WeightStatement => ({
  ...pointsStatement({}),
  method: 'pairwise',
  judgements,
});

describe('judgements', () => {
  test('run from 9 over 1 to 1/9, and read the same from either side', () => {
    expect(RATIOS.map(ratioInFigures).join(' ')).toBe('9 8 7 6 5 4 3 2 1 1/2 1/3 1/4 1/5 1/6 1/7 1/8 1/9');
    expect(ratioInWords(5, 'Cost', 'Time')).toBe('Cost is strongly more important than Time');
    expect(ratioInWords(1 / 9, 'Cost', 'Time')).toBe('Time is extremely more important than Cost');
    expect(ratioInWords(1, 'Cost', 'Time')).toBe('Cost and Time are equally important');
  });

  test('of one pair there is one, whichever way round it is said', () => {
    const said = withJudgement([['a', 'b', 3]], 'b', 'a', 5);
    expect(said).toEqual([['b', 'a', 5]]);
    expect(ratioOf(said, 'a', 'b')).toBeCloseTo(0.2, 12);
    expect(ratioOf(said, 'a', 'c')).toBeUndefined();
  });

  test('that disagree are named, with what was written and what the others imply', () => {
    // In a circle of 5, 2 and 1/2 the geometric means are exact for three: weights in proportion to
    // (5·½)^⅓ : (⅕·2)^⅓ : (2·½)^⅓, so the others and it settle on 6.25^⅓ = 1.84 [derived].
    const statement = pairwise([
      ['a', 'b', 5],
      ['b', 'c', 2],
      ['a', 'c', 1 / 2],
    ]);
    const [level] = weighing(items, statement).levels;
    expect(level && consistencyInWords(level, statement.judgements, names)).toMatch(
      /^Judgements disagree: consistency ratio \d\.\d\d, above 0\.10\. Start with Cost against Time: you wrote 5, the others imply about 1\.8\.$/,
    );
  });

  test('that agree say so', () => {
    const statement = pairwise([
      ['a', 'b', 2],
      ['b', 'c', 2],
      ['a', 'c', 4],
    ]);
    const [level] = weighing(items, statement).levels;
    expect(level && consistencyInWords(level, statement.judgements, names)).toBe(
      'Judgements agree: consistency ratio 0.00, not above 0.10.',
    );
  });
});

test('what has not been judged is said to have weight 0', () => {
  const { levels } = weighing(items, pairwise([['a', 'b', 2]]));
  expect(unjudgedInWords(levels, names)).toBe('Access has weight 0 until it is judged.');
  expect(unjudgedInWords(weighing(items, pointsStatement({ a: 1, b: 1, c: 0 })).levels, names)).toBe('');
});

describe('where the study’s weights come from', () => {
  const by = { userId: 'l', name: 'Ada Quill' };
  const bram = { userId: 'e', name: 'Bram Oduya' };
  const cleo = { userId: 'r', name: 'Cleo Marsh' };

  test.each<[WeightOrigin | null, string]>([
    [null, 'Not set yet'],
    [{ kind: 'apart' }, 'Set apart by a lead'],
    [{ kind: 'apart', by }, 'Set apart by Ada Quill'],
    [{ kind: 'member', ...bram, by }, 'Bram Oduya’s set, chosen by Ada Quill'],
    [{ kind: 'mean', members: [bram, cleo, by], by }, 'The mean of three members’ sets, chosen by Ada Quill'],
  ])('%j', (origin, words) => {
    expect(originInWords(origin)).toBe(words);
  });

  const study = (origin: WeightOrigin, points: Record<string, number>): Weights => ({
    ...pointsStatement(points),
    weights: 'study',
    ...weighing(items, pointsStatement(points)),
    shared: false,
    origin,
    reason: 'So decided.',
    version: 3,
  });
  const member = (who: typeof bram, points: Record<string, number> | null): MemberWeights => ({
    ...who,
    role: 'engineer',
    mine: false,
    state: points ? 'shared' : 'kept',
    set: points && {
      ...pointsStatement(points),
      shares: weighing(items, pointsStatement(points)).shares,
      updatedAt: '2026-12-01T11:42:00.000Z',
    },
  });

  test('a set that has changed since, or is no longer shared, is told', () => {
    const taken = study({ kind: 'member', ...bram, by }, { a: 1, b: 1, c: 2 });
    const since = (now: Record<string, number> | null) => changedSince(taken, items, [member(bram, now)]);
    expect(since({ a: 10, b: 10, c: 20 })).toBe('');
    expect(since({ a: 10, b: 20, c: 20 })).toBe('Bram Oduya has changed that set since.');
    expect(since(null)).toBe('Bram Oduya no longer shares a set.');
  });

  test('the same for a mean, and a set shared after it', () => {
    const mean = study({ kind: 'mean', members: [bram, cleo], by }, { a: 0.5, b: 0.25, c: 0.25 });
    const since = (...now: MemberWeights[]) => changedSince(mean, items, now);
    const one = member(bram, { a: 1, b: 0, c: 0 });
    const other = member(cleo, { a: 0, b: 1, c: 1 });
    expect(since(one, other)).toBe('');
    expect(since(one, member(cleo, { a: 0, b: 1, c: 0 }))).toBe(
      'At least one of these sets has changed since.',
    );
    expect(since(one)).toBe('Cleo Marsh no longer shares a set.');
    expect(since(one, other, member(by, { a: 1, b: 1, c: 1 }))).toBe('1 more set shared since.');
  });
});
