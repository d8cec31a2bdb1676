import fc from 'fast-check';
import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, test } from 'vitest';
import { compare } from '#core/decision/pairwise.ts';
import { reference } from '#tests/support/reference.ts';

/** The whole matrix from its upper triangle by rows. */
function squareOf(upper: readonly number[]): number[][] {
  const n = (1 + Math.sqrt(1 + 8 * upper.length)) / 2;
  const matrix = Array.from({ length: n }, () => Array<number>(n).fill(1));
  let at = 0;
  for (let i = 0; i < n; i++) {
    for (let j = i + 1; j < n; j++, at++) {
      const a = upper[at] ?? NaN;
      matrix[i]![j] = a;
      matrix[j]![i] = 1 / a;
    }
  }
  return matrix;
}

const fraction = (text: string): number => {
  const [top = NaN, bottom = 1] = text.split('/').map(Number);
  return top / bottom;
};

const judgement = fc.integer({ min: 2, max: 9 }).chain((a) => fc.constantFrom(a, 1 / a, 1));
const judgements = fc
  .integer({ min: 2, max: 10 })
  .chain((n) => fc.array(judgement, { minLength: (n * (n - 1)) / 2, maxLength: (n * (n - 1)) / 2 }));

describe('pairwise comparison', () => {
  test.each(reference('decision-pairwise'))('$id', (row) => {
    const result = compare(squareOf(row.judgements.split(';').map(fraction)));
    const figures: Record<string, number | undefined> = {
      weight: result.weights[Number(row.place)],
      lambda: result.lambdaMax,
      index: result.consistencyIndex,
      ratio: result.consistencyRatio,
    };
    expect(figures[row.quantity]).toBeWithin(row.expected, row.tolerance);
  });

  test('agrees with the eigenvalues of a general-purpose library', () => {
    fc.assert(
      fc.property(judgements, (upper) => {
        const matrix = squareOf(upper);
        const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(new Matrix(matrix));
        const principal = realEigenvalues.indexOf(Math.max(...realEigenvalues));
        const vector = eigenvectorMatrix.getColumn(principal);
        const sum = vector.reduce((total, x) => total + x, 0);
        const { weights, lambdaMax } = compare(matrix);
        expect(lambdaMax).toBeWithin(realEigenvalues[principal] ?? NaN, 1e-9);
        vector.forEach((x, i) => expect(weights[i]).toBeWithin(x / sum, 1e-9));
      }),
    );
  });

  test('consistent judgements give back the weights they come from', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 9 }), { minLength: 2, maxLength: 10 }), (points) => {
        const { weights, consistencyRatio } = compare(points.map((p) => points.map((q) => p / q)));
        const sum = points.reduce((total, p) => total + p, 0);
        points.forEach((p, i) => expect(weights[i]).toBeWithin(p / sum, 1e-12));
        expect(consistencyRatio).toBeWithin(0, 1e-12);
      }),
    );
  });

  test('names the one judgement that was spoilt', () => {
    // Weights 8 4 2 1 but for the second against the fourth: 4 becomes 1/4.
    const matrix = [8, 4, 2, 1].map((p) => [8, 4, 2, 1].map((q) => p / q));
    matrix[1]![3] = 1 / 4;
    matrix[3]![1] = 4;
    const { worst, consistencyRatio } = compare(matrix);
    expect(worst).toEqual([1, 3]);
    expect(consistencyRatio).toBeGreaterThan(0.1);
  });

  test.each<[string, number[][]]>([
    ['one criterion', [[1]]],
    ['a ragged matrix', [[1, 2], [0.5]]],
    [
      'a judgement of 0',
      [
        [1, 0],
        [0, 1],
      ],
    ],
    ['eleven criteria', Array.from({ length: 11 }, () => Array<number>(11).fill(1))],
  ])('refuses %s', (_, matrix) => {
    expect(() => compare(matrix)).toThrow(RangeError);
  });
});
