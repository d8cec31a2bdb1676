import { overallValue } from './overall.ts';
import type { RandomStream } from './random.ts';
import { TIE } from './ties.ts';
import type { DrawValues } from './uncertain.ts';

interface Draws {
  drawValues: DrawValues;
  random: RandomStream;
  /** Values of all sites, row by row, drawn anew each time. */
  values: Float64Array;
  samples: number;
}

/**
 * Confidence factor of every site that can lead: the share of draws of the figures in which it leads while the weights
 * stay at its central ones; where it ties for the lead it counts as its share of the tie.
 * @param centralWeights by site; null where it never leads, which gives null.
 * @param shares rank acceptabilities, site by site; they say which rivals to try first.
 * @see references.ts `lahdelmaSalminen`
 */
export function confidenceFactors(
  centralWeights: readonly (Float64Array | null)[],
  shares: Float64Array,
  { drawValues, random, values, samples }: Draws,
): (number | null)[] {
  const siteCount = centralWeights.length;
  const firstShare = (site: number): number => shares[site * siteCount] ?? 0;
  // The likeliest leader first: a site that does not lead is mostly found out by its first rival.
  const rivals = Uint32Array.from({ length: siteCount }, (_, site) => site).sort(
    (a, b) => firstShare(b) - firstShare(a),
  );
  const led = new Float64Array(siteCount);
  for (let sample = 0; sample < samples; sample++) {
    drawValues(values, random);
    for (let site = 0; site < siteCount; site++) {
      const weights = centralWeights[site];
      if (weights) led[site] = (led[site] ?? 0) + shareOfLead(site, weights, values, rivals);
    }
  }
  return centralWeights.map((weights, site) => (weights ? (led[site] ?? 0) / samples : null));
}

/** 1 where a site leads alone, its share of a tie, 0 where another stands above it. */
function shareOfLead(site: number, weights: Float64Array, values: Float64Array, rivals: Uint32Array): number {
  const own = overallValue(weights, values, site * weights.length);
  let tied = 0;
  for (let k = 0; k < rivals.length; k++) {
    const above = overallValue(weights, values, (rivals[k] ?? 0) * weights.length) - own;
    if (above > TIE) return 0;
    if (above >= -TIE) tied++;
  }
  return 1 / tied;
}
