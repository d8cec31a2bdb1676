import { describe, expect, test } from 'vitest';
import { DecideInput, DecideOutput } from '#contract/decide.ts';
import { decide, decisionBytes } from '#contract/decision.ts';

/** Straight, bent and through points: the three value functions at once. */
const request = {
  criteria: [
    { code: 'A', worst: 0, best: 100 },
    { code: 'B', worst: 400, best: 200, curvature: 2 },
    {
      code: 'C',
      points: [
        [0, 0],
        [30, 0.7],
        [100, 1],
      ],
    },
  ],
  weights: { A: 0.5, B: 0.3, C: 0.2 },
  alternatives: [
    { code: 'X', figures: { A: 12, B: { low: 250, likely: 300, high: 360 }, C: 40 } },
    { code: 'Y', figures: { A: 90, B: 390, C: 10 } },
    { code: 'Z', figures: { A: 10, B: 395, C: 5 } },
  ],
  acceptability: { samples: 500, seed: 1, weights: 'simplex' },
};
const answerTo = (change: Record<string, unknown> = {}) =>
  decide(DecideInput.parse({ ...request, ...change }));

/** The dotted paths of what does not fit. */
function refused(change: Record<string, unknown>): string[] {
  const result = DecideInput.safeParse({ ...request, ...change });
  return result.success ? [] : result.error.issues.map(({ path }) => path.join('.'));
}

describe('what a decision answers', () => {
  test('values, terms and order, by hand', () => {
    // [derived] B: s = .5, (1 − e^−1)/(1 − e^−2) = .731059; C: .7 + .3/7 = .742857.
    const [first, second] = answerTo().ranking;
    expect(second).toMatchObject({ code: 'X', rank: 2 });
    expect(second?.terms['A']).toBeCloseTo(0.06, 12);
    expect(second?.terms['B']).toBeCloseTo(0.2193, 4);
    expect(second?.terms['C']).toBeCloseTo(0.1486, 4);
    expect(second?.value).toBeCloseTo(0.4279, 4);
    expect(first).toMatchObject({ code: 'Y', rank: 1 });
    expect(first?.terms['A']).toBeCloseTo(0.45, 12);
  });

  test('fits its own schema, and crosses the wire unchanged', () => {
    for (const weights of ['simplex', { band: 0.5 }, { order: ['B', 'A', 'C'] }]) {
      const change = { acceptability: { ...request.acceptability, weights } };
      const answer = answerTo(change);
      expect(DecideOutput.parse(answer)).toEqual(answer);
      const text = new TextDecoder().decode(decisionBytes(DecideInput.parse({ ...request, ...change })));
      expect(JSON.parse(text)).toEqual(answer);
    }
  });

  test('names dominators, and who takes the lead at which weight', () => {
    const { dominatedBy, leaderChange } = answerTo();
    expect(dominatedBy).toEqual({ X: [], Y: [], Z: ['X', 'Y'] });
    const ofA = leaderChange?.find(({ criterion }) => criterion === 'A');
    expect(ofA?.above).toBeNull();
    expect(ofA?.below?.leader).toBe('X');
    const weight = ofA?.below?.weight ?? NaN;
    const moved = answerTo({ weights: { A: weight, B: (1 - weight) * 0.6, C: (1 - weight) * 0.4 } });
    expect(moved.ranking.slice(0, 2).map(({ rank }) => rank)).toEqual([1, 1]);
  });

  test('closeness stands best first', () => {
    const close = answerTo().topsis?.map(({ closeness }) => closeness) ?? [];
    expect(close).toEqual([...close].sort((a, b) => b - a));
    expect(close).toHaveLength(3);
  });

  test('an alternative that never leads has no central weights and no confidence', () => {
    const { acceptability } = answerTo();
    expect(acceptability?.shares['Z']?.[0]).toBe(0);
    expect([acceptability?.centralWeights['Z'], acceptability?.confidence['Z']]).toEqual([null, null]);
    expect(acceptability?.confidence['Y']).toBeGreaterThan(0.9);
  });

  test('one alternative has nothing to be compared with; acceptability may be left out', () => {
    const answer = answerTo({ alternatives: request.alternatives.slice(0, 1), acceptability: undefined });
    expect(answer).toMatchObject({
      ranking: [{ code: 'X', rank: 1 }],
      topsis: null,
      dominatedBy: null,
      leaderChange: null,
      acceptability: null,
    });
  });

  test('ties share a rank', () => {
    const { figures } = request.alternatives[1]!;
    const answer = answerTo({ alternatives: ['P', 'Q'].map((code) => ({ code, figures })) });
    expect(answer.ranking.map(({ rank }) => rank)).toEqual([1, 1]);
    expect(answer.acceptability?.shares).toEqual({ P: [0.5, 0.5], Q: [0.5, 0.5] });
  });

  test('10,000 samples unless said', () => {
    const input = DecideInput.parse({ ...request, acceptability: { seed: 1, weights: 'simplex' } });
    expect(input.acceptability?.samples).toBe(10_000);
  });
});

describe('what a decision refuses', () => {
  const [a, b, c] = request.criteria;
  const [x, y] = request.alternatives;
  const withC = (change: Record<string, unknown>) => ({ criteria: [a, b, { ...c, ...change }] });
  const withX = (figures: Record<string, unknown>) => ({
    alternatives: [{ code: 'X', figures: { ...x?.figures, ...figures } }, y],
  });
  const draws = (change: Record<string, unknown>) => ({
    acceptability: { ...request.acceptability, ...change },
  });

  test.each<[string, Record<string, unknown>, string]>([
    ['an unknown key', { study: 1 }, ''],
    ['weights that sum to less', { weights: { A: 0.5, B: 0.3, C: 0.1 } }, 'weights'],
    ['weights off by 2e-9', { weights: { A: 0.5, B: 0.3, C: 0.2 + 2e-9 } }, 'weights'],
    ['a negative weight', { weights: { A: 1.5, B: -0.7, C: 0.2 } }, 'weights.B'],
    ['a weight left out', { weights: { A: 0.5, B: 0.5 } }, 'weights.C'],
    ['a weight of no criterion', { weights: { A: 0.5, B: 0.3, C: 0.2, D: 0 } }, 'weights.D'],
    ['a figure left out', withX({ C: undefined }), 'alternatives.0.figures.C'],
    ['a figure of no criterion', withX({ constructor: 3 }), 'alternatives.0.figures.constructor'],
    ['low above likely', withX({ B: { low: 2, likely: 1, high: 3 } }), 'alternatives.0.figures.B'],
    ['a figure without high', withX({ B: { low: 1, likely: 2 } }), 'alternatives.0.figures.B'],
    ['a figure that is null', withX({ B: null }), 'alternatives.0.figures.B'],
    ['equal levels', { criteria: [{ code: 'A', worst: 1, best: 1 }, b, c] }, 'criteria.0.best'],
    ['no worst level', { criteria: [{ code: 'A', best: 1 }, b, c] }, 'criteria.0.worst'],
    ['points beside a level', withC({ worst: 0 }), 'criteria.2.worst'],
    [
      'points that turn',
      withC({
        points: [
          [0, 0],
          [1, 0.8],
          [2, 0.5],
          [3, 1],
        ],
      }),
      'criteria.2.points',
    ],
    [
      'points that stand still',
      withC({
        points: [
          [0, 0],
          [0, 0.5],
          [1, 1],
        ],
      }),
      'criteria.2.points',
    ],
    [
      'points that end below 1',
      withC({
        points: [
          [0, 0],
          [1, 0.9],
        ],
      }),
      'criteria.2.points',
    ],
    ['one point', withC({ points: [[0, 0]] }), 'criteria.2.points'],
    ['no point', withC({ points: [] }), 'criteria.2.points'],
    ['six points', withC({ points: [0, 0.2, 0.4, 0.6, 0.8, 1].map((v) => [v, v]) }), 'criteria.2.points'],
    ['a criterion twice', { criteria: [a, b, c, a] }, 'criteria.3.code'],
    ['an alternative twice', { alternatives: [x, x] }, 'alternatives.1.code'],
    ['no alternative', { alternatives: [] }, 'alternatives'],
    ['a band beyond 1', draws({ weights: { band: 1.5 } }), 'acceptability.weights.band'],
    ['an order of some', draws({ weights: { order: ['A', 'B'] } }), 'acceptability.weights.order'],
    [
      'an order with one twice',
      draws({ weights: { order: ['A', 'B', 'B'] } }),
      'acceptability.weights.order',
    ],
    ['no samples', draws({ samples: 0 }), 'acceptability.samples'],
    ['half a seed', draws({ seed: 0.5 }), 'acceptability.seed'],
  ])('%s', (_, change, path) => {
    expect(refused(change)).toContain(path);
  });

  test('more draws than a call gives', () => {
    const alternatives = Array.from({ length: 200 }, (_, k) => ({ ...y, code: `N${k}` }));
    const acceptability = { ...request.acceptability, samples: 1_000_000 };
    expect(refused({ alternatives, acceptability })).toEqual(['acceptability.samples']);
  });

  test('takes weights off by half a billionth, and figures of any size that a double holds well', () => {
    expect(refused({ weights: { A: 0.5, B: 0.3, C: 0.2 + 5e-10 } })).toEqual([]);
    const wide = [{ code: 'A', worst: -1e300, best: 1e300 }];
    const figures = { A: { low: -1e300, likely: 0, high: 1e300 } };
    const { ranking, acceptability } = answerTo({
      criteria: wide,
      weights: { A: 1 },
      alternatives: [{ code: 'X', figures }],
    });
    expect(ranking[0]?.value).toBe(0.5);
    expect(acceptability?.shares['X']).toEqual([1]);
  });
});
