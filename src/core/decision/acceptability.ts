import { confidenceFactors } from './confidence.ts';
import { completeValues, overallValue } from './overall.ts';
import type { Prepared } from './prepare.ts';
import { streamFrom } from './random.ts';
import { fallingOrder } from './falling-order.ts';
import { endOfTie } from './ties.ts';
import { highestValues, valueSampler, type UncertainFigure } from './uncertain.ts';
import { criterionCountOf, weightSampler, type WeightModel } from './weight-model.ts';

export interface AcceptabilityQuestion {
  prepared: Prepared;
  /** Figures known as low, likely and high; all others stay as prepared. */
  uncertain: readonly UncertainFigure[];
  weights: WeightModel;
  /** How many draws, at least 1. */
  samples: number;
  /** Whole, 0 to 2^53 − 1: the same seed gives the same answer to the last digit. */
  seed: number;
}

/** What the draws say of every site; sites and criteria are places in the table. */
export interface Acceptability {
  /** Share of draws in which site s has rank r + 1, at s × siteCount + r; tied sites share the tied ranks equally. */
  shares: Float64Array;
  /** Mean of the weights under which a site leads, one a criterion; null where it never does. */
  centralWeights: (Float64Array | null)[];
  /** Share of draws of the figures in which a site leads under its central weights; null where it never leads. */
  confidence: (number | null)[];
}

/**
 * Stochastic multicriteria acceptability analysis, SMAA-2: weights and uncertain figures are drawn, sites ranked by
 * additive value each time. The standard error of a share p of N draws is √(p(1 − p)/N).
 * @throws RangeError when a site misses a figure, the weights are not one a criterion, or there are no samples.
 * @see references.ts `lahdelmaSalminen`; checked by tests/reference/decision-acceptability.csv
 */
export function acceptability(question: AcceptabilityQuestion): Acceptability {
  const { prepared, uncertain, weights: model, samples, seed } = question;
  const table = completeValues(prepared);
  const { siteCount, criterionCount } = table;
  if (criterionCountOf(model) !== criterionCount)
    throw new RangeError(`acceptability: ${criterionCountOf(model)} weights for ${criterionCount} criteria`);
  if (!Number.isSafeInteger(samples) || samples < 1)
    throw new RangeError(`acceptability: ${samples} samples`);
  const random = streamFrom(seed);
  const drawWeights = weightSampler(model);
  const drawValues = valueSampler(prepared, uncertain);
  const tally = tallyOf(siteCount, criterionCount);
  const weights = new Float64Array(criterionCount);
  const values = table.values.slice();
  const totals = new Float64Array(siteCount);
  for (let sample = 0; sample < samples; sample++) {
    drawWeights(weights, random);
    drawValues(values, random);
    for (let site = 0; site < siteCount; site++) {
      totals[site] = overallValue(weights, values, site * criterionCount);
    }
    count(tally, totals, weights);
  }
  const shares = tally.ranks.map((times) => times / samples);
  const centralWeights = centralWeightsOf(tally, siteCount, criterionCount);
  const draws = { drawValues, random, samples: uncertain.length > 0 ? samples : 1 };
  const highest = highestValues(prepared, uncertain);
  return { shares, centralWeights, confidence: confidenceFactors(table, highest, centralWeights, draws) };
}

interface Tally {
  /** Times site s had rank r + 1, at s × siteCount + r. */
  ranks: Float64Array;
  /** Sum of the weights under which site s led, at s × criterionCount. */
  leading: Float64Array;
  order: Uint32Array;
}

const tallyOf = (siteCount: number, criterionCount: number): Tally => ({
  ranks: new Float64Array(siteCount * siteCount),
  leading: new Float64Array(siteCount * criterionCount),
  order: Uint32Array.from({ length: siteCount }, (_, site) => site),
});

/** Adds one draw. @param totals overall values by site; left sorted */
function count({ ranks, leading, order }: Tally, totals: Float64Array, weights: Float64Array): void {
  const siteCount = order.length;
  for (let site = 0; site < siteCount; site++) order[site] = site;
  fallingOrder(totals, order);
  for (let first = 0, end = 0; first < siteCount; first = end) {
    end = endOfTie(totals, first);
    const share = 1 / (end - first);
    for (let place = first; place < end; place++) {
      const row = (order[place] ?? 0) * siteCount;
      for (let rank = first; rank < end; rank++) ranks[row + rank] = (ranks[row + rank] ?? 0) + share;
      if (first === 0) addTo(leading, (order[place] ?? 0) * weights.length, weights, share);
    }
  }
}

function addTo(sums: Float64Array, from: number, weights: Float64Array, share: number): void {
  for (let j = 0; j < weights.length; j++) sums[from + j] = (sums[from + j] ?? 0) + share * (weights[j] ?? 0);
}

function centralWeightsOf({ ranks, leading }: Tally, siteCount: number, criterionCount: number) {
  return Array.from({ length: siteCount }, (_, site) => {
    const led = ranks[site * siteCount] ?? 0;
    if (led === 0) return null;
    return leading.subarray(site * criterionCount, (site + 1) * criterionCount).map((sum) => sum / led);
  });
}
