import { fallingOrder } from './falling-order.ts';
import { overallValue, overallValues, type ValueTable } from './overall.ts';
import type { RandomStream } from './random.ts';
import { TIE } from './ties.ts';
import type { DrawValues } from './uncertain.ts';

/** A site that can lead, at its central weights. */
interface Contender {
  site: number;
  weights: Float64Array;
  /** The other sites, those that can reach highest first. */
  rivals: Uint32Array;
  /** The greatest overall value each of `rivals` can reach, falling: what lies below the contender need not be looked at. */
  reach: Float64Array;
}

/** Confidence factors in the making. */
export interface ConfidenceRun {
  /** Draws the figures once and counts who leads. */
  draw(drawValues: DrawValues, random: RandomStream): void;
  /** @param draws how many have been made */
  factors(draws: number): (number | null)[];
}

/**
 * Confidence factor of every site that can lead: the share of draws of the figures in which it leads while the weights
 * stay at its central ones; where it ties for the lead it counts as its share of the tie.
 * @param table values of the likely figures.
 * @param highest the greatest value each figure can take, laid out as the table.
 * @param centralWeights by site; null where it never leads, which gives null.
 * @see references.ts `lahdelmaSalminen`
 */
export function confidenceRun(
  table: ValueTable,
  highest: Float64Array,
  centralWeights: readonly (Float64Array | null)[],
): ConfidenceRun {
  const contenders = centralWeights.flatMap((weights, site) =>
    weights ? { site, weights, ...rivalsOf({ ...table, values: highest }, weights, site) } : [],
  );
  const led = new Float64Array(table.siteCount);
  const values = table.values.slice();
  return {
    draw(drawValues, random) {
      drawValues(values, random);
      for (const contender of contenders) {
        led[contender.site] = (led[contender.site] ?? 0) + shareOfLead(contender, values);
      }
    },
    factors: (draws) => centralWeights.map((weights, site) => (weights ? (led[site] ?? 0) / draws : null)),
  };
}

function rivalsOf(highest: ValueTable, weights: Float64Array, site: number) {
  const sites = Uint32Array.from({ length: highest.siteCount }, (_, other) => other);
  const reach = overallValues(highest, weights);
  fallingOrder(reach, sites);
  return {
    rivals: sites.filter((other) => other !== site),
    reach: reach.filter((_, place) => sites[place] !== site),
  };
}

/** 1 where a site leads alone, its share of a tie, 0 where another stands above it. */
function shareOfLead({ site, weights, rivals, reach }: Contender, values: Float64Array): number {
  const own = overallValue(weights, values, site * weights.length);
  let level = 1;
  // Twice a tie leaves room for rounding in what a rival can reach.
  for (let k = 0; k < rivals.length && (reach[k] ?? 0) >= own - 2 * TIE; k++) {
    const ahead = overallValue(weights, values, (rivals[k] ?? 0) * weights.length) - own;
    if (ahead > TIE) return 0;
    if (ahead >= -TIE) level++;
  }
  return 1 / level;
}
