import { CELL } from './figures.ts';
import { overallValue } from './overall.ts';
import type { Prepared } from './prepare.ts';
import { endOfTie, TIE } from './ties.ts';

/** A site that misses a figure which matters: its rank lies in a range, counted against the ranked sites alone. */
export interface Incomplete {
  site: number;
  /** Rank if every missing value were 1. */
  bestRank: number;
  /** Rank if every missing value were 0. */
  worstRank: number;
}

/** A ranking under one set of weights; sites are places in the table. */
export interface Ranking {
  /** Ranked sites, best first; tied ones in the order of the table. */
  ranked: Uint32Array;
  /** The rank of each of `ranked`: 1, 2, 2, 4. */
  ranks: Uint32Array;
  /** Overall value 0…1 of every site, counting a missing value as 0. */
  totals: Float64Array;
  /** Overall value of every site, counting a missing value as 1; the same as `totals` where nothing is missing. */
  ceilings: Float64Array;
  /** By best rank, then by ceiling. */
  incomplete: Incomplete[];
  /** In the order of the table. */
  setAside: number[];
  /** How far the first stands above the second ranked site; 0 when they tie, null with fewer than two. */
  margin: number | null;
}

/**
 * Additive overall value V = Σ w_j v_j, and the order it gives.
 * A missing figure leaves a site out of the ranked ones when it can matter: its criterion has weight or a limit.
 * @param prepared what `prepare` made of the figures.
 * @param weights one a criterion, non-negative, summing to 1.
 * @throws RangeError when the number of weights is not that of the criteria.
 * @see references.ts `keeneyRaiffa`; checked by tests/reference/decision-office.csv, decision-additive.csv
 */
export function rank(prepared: Prepared, weights: Float64Array): Ranking {
  const { table, setAside } = prepared;
  if (weights.length !== prepared.spans.length) {
    throw new RangeError(`weights: ${weights.length} for ${prepared.spans.length} criteria`);
  }
  const { totals, ceilings, open } = addUp(prepared, weights);
  const complete: number[] = [];
  const incompleteSites: number[] = [];
  const aside: number[] = [];
  for (let site = 0; site < table.siteCount; site++) {
    (setAside[site] === 1 ? aside : open[site] === 1 ? incompleteSites : complete).push(site);
  }
  const ranked = Uint32Array.from(complete).sort((a, b) => valueOf(totals, b) - valueOf(totals, a) || a - b);
  const ranks = sharedRanks(ranked, totals);
  const incomplete = incompleteSites
    .map((site) => ({
      site,
      bestRank: 1 + countAbove(ranked, totals, valueOf(ceilings, site)),
      worstRank: 1 + countAbove(ranked, totals, valueOf(totals, site)),
    }))
    .sort((a, b) => a.bestRank - b.bestRank || valueOf(ceilings, b.site) - valueOf(ceilings, a.site));
  return {
    ranked,
    ranks,
    totals,
    ceilings,
    incomplete,
    setAside: aside,
    margin: marginOf(ranked, ranks, totals),
  };
}

/** One term w_j v_j of a site's overall value; the terms of a complete site add up to its total. */
export function termOf(prepared: Prepared, weights: Float64Array, site: number, criterion: number): number {
  const { table, values } = prepared;
  return (weights[criterion] ?? 0) * (values[site * table.criterionCount + criterion] ?? 0);
}

function addUp({ table, values, gaps, limited }: Prepared, weights: Float64Array) {
  const { siteCount, criterionCount, states } = table;
  const totals = new Float64Array(siteCount);
  const ceilings = new Float64Array(siteCount);
  const open = new Uint8Array(siteCount);
  for (let site = 0; site < siteCount; site++) {
    const from = site * criterionCount;
    const total = overallValue(weights, values, from);
    let missing = 0;
    for (let j = 0; gaps[site] === 1 && j < criterionCount; j++) {
      const w = weights[j] ?? 0;
      if (states[from + j] === CELL.missing && (w > 0 || limited[j] === 1)) {
        missing += w;
        open[site] = 1;
      }
    }
    totals[site] = total;
    ceilings[site] = total + missing;
  }
  return { totals, ceilings, open };
}

function sharedRanks(ranked: Uint32Array, totals: Float64Array): Uint32Array {
  const sorted = Float64Array.from(ranked, (site) => valueOf(totals, site));
  const ranks = new Uint32Array(ranked.length);
  for (let first = 0, end = 0; first < sorted.length; first = end) {
    end = endOfTie(sorted, first);
    ranks.fill(first + 1, first, end);
  }
  return ranks;
}

/** How many ranked sites stand above a value by more than a tie. */
function countAbove(ranked: Uint32Array, totals: Float64Array, value: number): number {
  let low = 0;
  let high = ranked.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (valueOf(totals, ranked[middle]) > value + TIE) low = middle + 1;
    else high = middle;
  }
  return low;
}

function marginOf(ranked: Uint32Array, ranks: Uint32Array, totals: Float64Array): number | null {
  if (ranked.length < 2) return null;
  return ranks[1] === 1 ? 0 : valueOf(totals, ranked[0]) - valueOf(totals, ranked[1]);
}

const valueOf = (totals: Float64Array, site: number | undefined): number => totals[site ?? 0] ?? 0;
