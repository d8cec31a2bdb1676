/** Points of the most important swing, worst level to best, against which all others are judged. */
export const FULL_SWING = 100;

/**
 * Swing weights: the swing from worst level to best that matters most has 100 points, every other a share of it, and
 * w_j = s_j / Σ s.
 * @param points one a criterion, 0 to 100, the largest exactly 100.
 * @returns weights summing to 1.
 * @throws RangeError when a point is outside 0 to 100 or none is 100.
 * @see references.ts `edwardsBarron`; checked by tests/reference/decision-swing.csv
 */
export function weightsFromSwing(points: ArrayLike<number>): Float64Array {
  let [largest, sum] = [-1, 0];
  for (let j = 0; j < points.length; j++) {
    const swing = points[j] ?? NaN;
    if (!(swing >= 0 && swing <= FULL_SWING)) throw new RangeError(`swing: ${swing} is not 0 to 100`);
    if (swing > largest) largest = swing;
    sum += swing;
  }
  if (largest !== FULL_SWING)
    throw new RangeError(`swing: the largest of ${points.length} is ${largest} where 100 is asked for`);
  return Float64Array.from(points, (swing) => swing / sum);
}
