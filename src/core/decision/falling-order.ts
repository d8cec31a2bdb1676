/** Gaps of Shell's sort after Ciura (2001), then by the factor 2.25: enough for any number of sites. */
const GAPS = [1, 4, 10, 23, 57, 132, 301, 701, 1577, 3548, 7983];

/**
 * Sorts figures, highest first, and carries the places of their owners along; equal ones in no certain order.
 * In place and without a comparison function: it runs once a draw.
 * @param figures sorted on return.
 * @param owners as many, moved with the figures.
 */
export function fallingOrder(figures: Float64Array, owners: Uint32Array): void {
  for (let g = GAPS.length - 1; g >= 0; g--) {
    const gap = GAPS[g] ?? 1;
    for (let k = gap; k < figures.length; k++) {
      const figure = figures[k] ?? 0;
      const owner = owners[k] ?? 0;
      let at = k;
      for (; at >= gap && (figures[at - gap] ?? 0) < figure; at -= gap) {
        figures[at] = figures[at - gap] ?? 0;
        owners[at] = owners[at - gap] ?? 0;
      }
      figures[at] = figure;
      owners[at] = owner;
    }
  }
}
