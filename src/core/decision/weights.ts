/** Weights that sum to 1, or `unset` where every criterion has 0 points and nothing can be weighed. */
export type Weights = { kind: 'set'; weights: Float64Array } | { kind: 'unset' };

/**
 * Direct points made into weights: w_j = p_j / Σ p.
 * @param points one a criterion, non-negative, on any common scale.
 * @returns weights summing to 1, or `unset` when all points are 0 or there are none.
 * @throws RangeError when a point is negative or not finite.
 * @see references.ts `goodwinWright`; checked by tests/reference/decision-weights.csv
 */
export function weightsFromPoints(points: ArrayLike<number>): Weights {
  let largest = 0;
  for (let j = 0; j < points.length; j++) {
    const p = points[j] ?? 0;
    if (!Number.isFinite(p) || p < 0)
      throw new RangeError(`points: ${p} is not a non-negative finite number`);
    if (p > largest) largest = p;
  }
  if (largest === 0) return { kind: 'unset' };
  // By the largest first: a sum of points near the greatest double would overflow, and tiny ones would lose digits.
  const weights = Float64Array.from({ length: points.length }, (_, j) => (points[j] ?? 0) / largest);
  const sum = weights.reduce((total, w) => total + w, 0);
  return { kind: 'set', weights: weights.map((w) => w / sum) };
}
