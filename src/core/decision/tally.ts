import { fallingOrder } from './falling-order.ts';
import { endOfTie } from './ties.ts';

/** What the draws have shown so far; sites and criteria are places in the table. */
export interface Tally {
  /** Times site s had rank r + 1, at s × siteCount + r; tied sites share the tied ranks equally. */
  ranks: Float64Array;
  /** Sum of the weights under which site s led, at s × criterionCount. */
  leading: Float64Array;
  /** Twice the times site a stood above site b, at a × siteCount + b; a tie counts one for each. */
  wins: Uint32Array;
  order: Uint32Array;
}

export const tallyOf = (siteCount: number, criterionCount: number): Tally => ({
  ranks: new Float64Array(siteCount * siteCount),
  leading: new Float64Array(siteCount * criterionCount),
  wins: new Uint32Array(siteCount * siteCount),
  order: new Uint32Array(siteCount),
});

/**
 * Adds one draw.
 * @param totals overall values by site; left sorted.
 * @param weights those drawn.
 */
export function count(
  { ranks, leading, wins, order }: Tally,
  totals: Float64Array,
  weights: Float64Array,
): void {
  const siteCount = order.length;
  for (let site = 0; site < siteCount; site++) order[site] = site;
  fallingOrder(totals, order);
  for (let first = 0, end = 0; first < siteCount; first = end) {
    end = endOfTie(totals, first);
    const share = 1 / (end - first);
    for (let place = first; place < end; place++) {
      const row = (order[place] ?? 0) * siteCount;
      for (let rank = first; rank < end; rank++) {
        ranks[row + rank] = (ranks[row + rank] ?? 0) + share;
        if (rank !== place) addWin(wins, row + (order[rank] ?? 0), 1);
      }
      for (let below = end; below < siteCount; below++) addWin(wins, row + (order[below] ?? 0), 2);
      if (first === 0) addTo(leading, (order[place] ?? 0) * weights.length, weights, share);
    }
  }
}

function addWin(wins: Uint32Array, at: number, halves: number): void {
  wins[at] = (wins[at] ?? 0) + halves;
}

function addTo(sums: Float64Array, from: number, weights: Float64Array, share: number): void {
  for (let j = 0; j < weights.length; j++) sums[from + j] = (sums[from + j] ?? 0) + share * (weights[j] ?? 0);
}

/** Mean of the weights under which a site led, by site; null where it never did. */
export function centralWeightsOf({ ranks, leading, order }: Tally): (Float64Array | null)[] {
  const siteCount = order.length;
  const criterionCount = leading.length / siteCount;
  return Array.from(order, (_, site) => {
    const led = ranks[site * siteCount] ?? 0;
    if (led === 0) return null;
    return leading.subarray(site * criterionCount, (site + 1) * criterionCount).map((sum) => sum / led);
  });
}
