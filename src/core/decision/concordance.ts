import { endOfTie } from './ties.ts';

/** Agreement among judges, 0 (none) to 1 (all alike), or `undefined` where every judge ties everything. */
export type Concordance = { kind: 'agreement'; w: number } | { kind: 'undefined' };

/**
 * Kendall's coefficient of concordance with ties corrected: W = 12 S/(m²(n³ − n) − m Σ(t³ − t)), S the sum of squared
 * deviations of the rank sums of n things from their mean over m judges, t the length of each tie.
 * @param rankings a row a judge, a figure a thing, lowest is first; any figures that order will do, ties take the mean
 * of their ranks (1, 2.5, 2.5, 4).
 * @throws RangeError when there is no judge, or rows differ in length.
 * @see references.ts `kendall`; checked by tests/reference/decision-concordance.csv
 */
export function concordance(rankings: readonly (readonly number[])[]): Concordance {
  const judges = rankings.length;
  const things = rankings[0]?.length ?? 0;
  if (judges === 0 || rankings.some((row) => row.length !== things))
    throw new RangeError(`concordance: ${judges} rows that are no table`);
  const sums = new Float64Array(things);
  let ties = 0;
  for (const row of rankings) ties += addMeanRanks(sums, row);
  const mean = (judges * (things + 1)) / 2;
  const deviation = sums.reduce((total, sum) => total + (sum - mean) ** 2, 0);
  const most = judges * judges * (things ** 3 - things) - judges * ties;
  return most === 0 ? { kind: 'undefined' } : { kind: 'agreement', w: (12 * deviation) / most };
}

/**
 * Mean ranks 1, 2.5, 2.5, 4: tied things share the mean of the ranks they take up.
 * @param row a figure a thing, lowest is first.
 */
export function meanRanks(row: readonly number[]): Float64Array {
  const ranks = new Float64Array(row.length);
  for (const tied of tiesOf(row)) for (const thing of tied.things) ranks[thing] = tied.rank;
  return ranks;
}

/** Adds one judge's mean ranks. @returns Σ(t³ − t) over the ties */
function addMeanRanks(sums: Float64Array, row: readonly number[]): number {
  let ties = 0;
  for (const { things, rank } of tiesOf(row)) {
    ties += things.length ** 3 - things.length;
    for (const thing of things) sums[thing] = (sums[thing] ?? 0) + rank;
  }
  return ties;
}

/** Things in order, tied ones together with their mean rank. */
function tiesOf(row: readonly number[]): { things: number[]; rank: number }[] {
  const order = row.map((_, thing) => thing).sort((a, b) => (row[a] ?? 0) - (row[b] ?? 0));
  const sorted = order.map((thing) => row[thing] ?? 0);
  const tied: { things: number[]; rank: number }[] = [];
  for (let first = 0, end = 0; first < order.length; first = end) {
    end = endOfTie(sorted, first);
    tied.push({ things: order.slice(first, end), rank: (first + 1 + end) / 2 });
  }
  return tied;
}
