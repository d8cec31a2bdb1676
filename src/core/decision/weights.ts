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
  let sum = 0;
  for (let j = 0; j < points.length; j++) {
    const p = points[j] ?? 0;
    if (!Number.isFinite(p) || p < 0)
      throw new RangeError(`points: ${p} is not a non-negative finite number`);
    if (p > largest) largest = p;
    sum += p;
  }
  if (largest === 0) return { kind: 'unset' };
  // Points near the greatest double overflow in a sum; over the largest of them they do not.
  if (!Number.isFinite(sum)) return weightsFromPoints(Float64Array.from(points, (p) => p / largest));
  return { kind: 'set', weights: Float64Array.from(points, (p) => p / sum) };
}
