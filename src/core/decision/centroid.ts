/**
 * Rank-order centroid weights, the middle of all weights that keep an order: w_k = (1/n) Σ_{i=k..n} 1/i.
 * @param count n, how many are ordered, at least 1.
 * @returns weights falling from the first, the most important, summing to 1.
 * @throws RangeError when the count is no whole number from 1.
 * @see references.ts `barronBarrett`; checked by tests/reference/decision-centroid.csv
 */
export function rankOrderCentroid(count: number): Float64Array {
  if (!Number.isSafeInteger(count) || count < 1)
    throw new RangeError(`rankOrderCentroid: ${count} things to order`);
  const weights = new Float64Array(count);
  let sum = 0;
  // From the least: the small terms are added first.
  for (let k = count; k >= 1; k--) {
    sum += 1 / k;
    weights[k - 1] = sum / count;
  }
  return weights;
}

/**
 * Rank-order centroid weights of criteria put in order.
 * @param order places of the criteria, the most important first, every one once.
 * @returns weights by place, summing to 1.
 * @throws RangeError when the order is empty or does not name every place once.
 */
export function weightsFromOrder(order: readonly number[]): Float64Array {
  if ([...order].sort((a, b) => a - b).some((place, k) => place !== k))
    throw new RangeError(`weightsFromOrder: ${order.join(', ')} does not name every criterion once`);
  const falling = rankOrderCentroid(order.length);
  const weights = new Float64Array(order.length);
  order.forEach((criterion, k) => {
    weights[criterion] = falling[k] ?? 0;
  });
  return weights;
}
