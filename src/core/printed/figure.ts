/**
 * The fewest decimals that print every figure in full, up to a most: 12.5 and 3 need one.
 * @param figures the column's figures; none need none.
 * @param most where the search ends.
 */
export function decimalsNeeded(figures: readonly number[], most = 3): number {
  for (let decimals = 0; decimals < most; decimals++) {
    if (figures.every((figure) => Number(figure.toFixed(decimals)) === figure)) return decimals;
  }
  return most;
}
