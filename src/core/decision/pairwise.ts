import { ConvergenceError } from '../convergence-error.ts';

/** Most criteria that may be compared with one another. */
export const MOST_COMPARED = 10;

/** Published random indices by the number of criteria: mean consistency index of random judgements. */
const RANDOM_INDEX: Readonly<Record<number, number>> = {
  3: 0.58,
  4: 0.9,
  5: 1.12,
  6: 1.24,
  7: 1.32,
  8: 1.41,
  9: 1.45,
  10: 1.49,
};

const PRECISION = 1e-15;
const MOST_STEPS = 5_000;

export interface Comparison {
  /** Summing to 1. */
  weights: Float64Array;
  /** Principal eigenvalue, the number of criteria where judgements are consistent and more where not. */
  lambdaMax: number;
  /** (λ_max − n)/(n − 1). */
  consistencyIndex: number;
  /** Consistency index over the random index; 0 for two criteria, which cannot disagree. Above 0.10 judge again. */
  consistencyRatio: number;
  /** Row and column, from 0 and above the diagonal, of the judgement that disagrees most with the weights. */
  worst: [row: number, column: number];
}

/**
 * Weights from pairwise comparison: the principal right eigenvector of the judgements, by power iteration.
 * @param matrix a_ij says how many times criterion i matters as criterion j; positive, a_ii = 1, a_ji = 1/a_ij.
 * @throws RangeError when the matrix is not 2 to 10 rows of as many positive figures.
 * @throws ConvergenceError when judgements lie so far apart that the iteration does not settle; never within 1/9 to 9.
 * @see references.ts `saaty`; checked by tests/reference/decision-pairwise.csv
 */
export function compare(matrix: readonly (readonly number[])[]): Comparison {
  const n = matrix.length;
  if (n < 2 || n > MOST_COMPARED || matrix.some((row) => row.length !== n || row.some((a) => !(a > 0))))
    throw new RangeError(`compare: ${n} rows are no square of positive judgements`);
  const { weights, lambdaMax } = principalVector(matrix);
  // λ_max is never below n; what lies under it is rounding.
  const consistencyIndex = Math.max(0, (lambdaMax - n) / (n - 1));
  const randomIndex = RANDOM_INDEX[n];
  return {
    weights,
    lambdaMax,
    consistencyIndex,
    consistencyRatio: randomIndex === undefined ? 0 : consistencyIndex / randomIndex,
    worst: worstJudgement(matrix, weights),
  };
}

function principalVector(matrix: readonly (readonly number[])[]) {
  let weights = new Float64Array(matrix.length).fill(1 / matrix.length);
  let change = Infinity;
  for (let step = 0; step < MOST_STEPS; step++) {
    const image = Float64Array.from(matrix, (row) =>
      row.reduce((sum, a, j) => sum + a * (weights[j] ?? 0), 0),
    );
    // The weights sum to 1, so the sum of their image is the eigenvalue once they have settled.
    const lambdaMax = image.reduce((sum, x) => sum + x, 0);
    const next = image.map((x) => x / lambdaMax);
    change = next.reduce((most, w, i) => Math.max(most, Math.abs(w - (weights[i] ?? 0))), 0);
    weights = next;
    if (change <= PRECISION) return { weights, lambdaMax };
  }
  throw new ConvergenceError('compare', MOST_STEPS, change);
}

/** The judgement with the greatest |ln(a_ij w_j/w_i)|; the first of those that disagree equally. */
function worstJudgement(
  matrix: readonly (readonly number[])[],
  weights: Float64Array,
): [row: number, column: number] {
  let worst: [number, number] = [0, 1];
  let greatest = 0;
  matrix.forEach((row, i) => {
    for (let j = i + 1; j < row.length; j++) {
      const gap = Math.abs(Math.log(((row[j] ?? 1) * (weights[j] ?? 1)) / (weights[i] ?? 1)));
      if (gap <= greatest + 1e-12) continue;
      greatest = gap;
      worst = [i, j];
    }
  });
  return worst;
}
