import { concordance, meanRanks, type Concordance } from './concordance.ts';
import type { Ranking } from './rank.ts';
import { TIE } from './ties.ts';

/** One who weighs: a ranking of the same sites by weights of the same criteria. */
export interface Judge {
  ranking: Pick<Ranking, 'ranked' | 'ranks'>;
  weights: Float64Array;
}

/** Where judges lie furthest apart. */
export interface Dispute {
  /** Place of the site or the criterion. */
  place: number;
  /** What each judge says of it: a mean rank, or a weight. */
  said: number[];
  /** Mean square distance from their mean. */
  variance: number;
}

/** How far judges agree. */
export interface Agreement {
  /** Sites that every judge ranks, in the order of the table. */
  sites: number[];
  /** A row a judge: mean ranks of `sites` among themselves (1, 2.5, 2.5, 4). */
  ranks: Float64Array[];
  concordance: Concordance;
  /** The site whose ranks spread most; null where all rank alike. */
  site: Dispute | null;
  /** The criterion whose weights spread most; null where all weigh alike. */
  criterion: Dispute | null;
}

/**
 * Agreement among judges over the sites that all of them rank, and where they disagree most.
 * @returns null with fewer than two judges.
 * @throws RangeError when judges weigh different numbers of criteria.
 * @see references.ts `kendall`; checked by tests/reference/decision-concordance.csv
 */
export function agreement(judges: readonly Judge[]): Agreement | null {
  const [first, ...others] = judges;
  if (first === undefined || others.length === 0) return null;
  const criterionCount = first.weights.length;
  if (others.some(({ weights }) => weights.length !== criterionCount))
    throw new RangeError(`agreement: judges weigh other criteria than the first one's ${criterionCount}`);
  const ranksBySite = judges.map(({ ranking }) => rankBySite(ranking));
  const sites = [...first.ranking.ranked].sort((a, b) => a - b);
  const common = sites.filter((site) => ranksBySite.every((ranks) => ranks.has(site)));
  const rows = ranksBySite.map((ranks) => common.map((site) => ranks.get(site) ?? 0));
  const ranks = rows.map(meanRanks);
  const site = widest(ranks, common.length);
  return {
    sites: common,
    ranks,
    concordance: concordance(rows),
    site: site && { ...site, place: common[site.place] ?? 0 },
    criterion: widest(
      judges.map(({ weights }) => weights),
      criterionCount,
    ),
  };
}

const rankBySite = ({ ranked, ranks }: Judge['ranking']): Map<number, number> =>
  new Map(Array.from(ranked, (site, place) => [site, ranks[place] ?? 0]));

/** The column whose figures spread most; the first of equals. */
function widest(rows: readonly Float64Array[], columns: number): Dispute | null {
  let most: Dispute | null = null;
  for (let place = 0; place < columns; place++) {
    const said = rows.map((row) => row[place] ?? 0);
    if (Math.max(...said) - Math.min(...said) <= TIE) continue;
    const mean = said.reduce((sum, x) => sum + x, 0) / said.length;
    const variance = said.reduce((sum, x) => sum + (x - mean) ** 2, 0) / said.length;
    if (variance > (most?.variance ?? 0) + TIE) most = { place, said, variance };
  }
  return most;
}
