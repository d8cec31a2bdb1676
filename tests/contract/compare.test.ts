import { describe, expect, test } from 'vitest';
import { ConcordanceInput, ConcordanceOutput, PairwiseInput, PairwiseOutput } from '#contract/compare.ts';
import { compareCriteria } from '#server/decide/compare-criteria.ts';
import { compareRankings } from '#server/decide/compare-rankings.ts';

const pathsOf = (result: { error?: { issues: { path: PropertyKey[] }[] } }): string[] =>
  (result.error?.issues ?? []).map(({ path }) => path.join('.'));

describe('pairwise', () => {
  const square = (a: number, b: number, c: number): number[][] => [
    [1, a, b],
    [1 / a, 1, c],
    [1 / b, 1 / c, 1],
  ];

  test('weights and consistency; a cycle is told by its ratio', () => {
    const fair = PairwiseOutput.parse(compareCriteria(PairwiseInput.parse({ matrix: square(3, 5, 2) })));
    // [derived] row geometric means, which for three are the eigenvector.
    expect(fair.weights[0]).toBeCloseTo(0.648329, 6);
    expect(fair.consistencyRatio).toBeLessThan(0.1);
    const cycle = compareCriteria(PairwiseInput.parse({ matrix: square(9, 1 / 9, 9) }));
    expect(cycle.consistencyRatio).toBeGreaterThan(0.1);
  });

  test('two criteria cannot disagree', () => {
    const answer = compareCriteria({
      matrix: [
        [1, 4],
        [0.25, 1],
      ],
    });
    expect(answer).toMatchObject({ consistencyIndex: 0, consistencyRatio: 0, worst: [0, 1] });
    expect(answer.weights[0]).toBeCloseTo(0.8, 12);
  });

  test('reciprocals may be written with two or three digits', () => {
    expect(
      pathsOf(
        PairwiseInput.safeParse({
          matrix: [
            [1, 3],
            [0.333, 1],
          ],
        }),
      ),
    ).toEqual([]);
    expect(
      pathsOf(
        PairwiseInput.safeParse({
          matrix: [
            [1, 9],
            [0.1111, 1],
          ],
        }),
      ),
    ).toEqual([]);
  });

  test.each<[string, unknown, string]>([
    [
      'no reciprocal',
      [
        [1, 3],
        [0.5, 1],
      ],
      'matrix.0.1',
    ],
    [
      'a diagonal that is not 1',
      [
        [2, 3],
        [1 / 3, 1],
      ],
      'matrix.0.0',
    ],
    ['a ragged matrix', [[1, 3], [1 / 3]], 'matrix.1'],
    [
      'a judgement beyond 9',
      [
        [1, 10],
        [0.1, 1],
      ],
      'matrix.0.1',
    ],
    [
      'a judgement of 0',
      [
        [1, 0],
        [1, 1],
      ],
      'matrix.0.1',
    ],
    ['one criterion', [[1]], 'matrix'],
    ['eleven criteria', Array.from({ length: 11 }, () => Array<number>(11).fill(1)), 'matrix'],
    ['nothing', undefined, 'matrix'],
  ])('refuses %s', (_, matrix, path) => {
    expect(pathsOf(PairwiseInput.safeParse({ matrix }))).toContain(path);
  });
});

describe('concordance', () => {
  test('agreement, or null where it is undefined', () => {
    // [derived] R = 4, 6, 8; S = 8; 12·8/(9·24) = 4/9.
    const rankings = [
      [1, 2, 3],
      [1, 3, 2],
      [2, 1, 3],
    ];
    expect(compareRankings({ rankings }).w).toBeCloseTo(4 / 9, 12);
    const level = compareRankings({
      rankings: [
        [1, 1],
        [1, 1],
      ],
    });
    expect(ConcordanceOutput.parse(level)).toEqual({ w: null });
  });

  test.each<[string, unknown, string]>([
    ['one judge', [[1, 2]], 'rankings'],
    [
      'judges of different things',
      [
        [1, 2],
        [1, 2, 3],
      ],
      'rankings.1',
    ],
    ['nothing to rank', [[], []], 'rankings.0'],
    [
      'a rank that is text',
      [
        ['1', 2],
        [1, 2],
      ],
      'rankings.0.0',
    ],
  ])('refuses %s', (_, rankings, path) => {
    expect(pathsOf(ConcordanceInput.safeParse({ rankings }))).toContain(path);
  });
});
