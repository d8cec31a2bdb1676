import { confidenceRun, type ConfidenceRun } from './confidence.ts';
import { completeValues, overallValue, type ValueTable } from './overall.ts';
import type { Prepared } from './prepare.ts';
import { streamFrom, type RandomStream } from './random.ts';
import { centralWeightsOf, count, tallyOf, type Tally } from './tally.ts';
import { highestValues, valueSampler, type DrawValues, type UncertainFigure } from './uncertain.ts';
import { criterionCountOf, weightSampler, type DrawWeights, type WeightModel } from './weight-model.ts';

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
  /** Pairwise winning share: of draws in which site a stands above site b, at a × siteCount + b; a tie counts a half. */
  wins: Float64Array;
  /** Mean of the weights under which a site leads, one a criterion; null where it never does. */
  centralWeights: (Float64Array | null)[];
  /** Share of draws of the figures in which a site leads under its central weights; null where it never leads. */
  confidence: (number | null)[];
}

/** An analysis done a few draws at a time; however it is cut, it gives the same to the last digit. */
export interface AcceptabilityRun {
  /** All draws: first those of weights and figures, then those of figures alone for the confidence factors. */
  readonly total: number;
  readonly done: number;
  /** Makes at most so many draws, at least 1. @returns whether all are done */
  step(draws: number): boolean;
  /** @throws RangeError while draws are left */
  result(): Acceptability;
}

/**
 * Stochastic multicriteria acceptability analysis, SMAA-2: weights and uncertain figures are drawn, sites ranked by
 * additive value each time.
 * @throws RangeError when a site misses a figure, the weights are not one a criterion, or there are no samples.
 * @see references.ts `lahdelmaSalminen`; checked by tests/reference/decision-acceptability.csv
 */
export function acceptabilityRun(question: AcceptabilityQuestion): AcceptabilityRun {
  const { prepared, uncertain, weights: model, samples, seed } = question;
  const table = completeValues(prepared);
  if (criterionCountOf(model) !== table.criterionCount)
    throw new RangeError(
      `acceptability: ${criterionCountOf(model)} weights for ${table.criterionCount} criteria`,
    );
  if (!Number.isSafeInteger(samples) || samples < 1)
    throw new RangeError(`acceptability: ${samples} samples`);
  const random = streamFrom(seed);
  const drawValues = valueSampler(prepared, uncertain);
  const tally = tallyOf(table.siteCount, table.criterionCount);
  const drawRanks = ranksDrawer(table, tally, weightSampler(model), drawValues, random);
  const afterwards = uncertain.length > 0 ? samples : 1;
  let done = 0;
  let confidence: ConfidenceRun | null = null;
  return {
    total: samples + afterwards,
    get done() {
      return done;
    },
    step(draws) {
      if (!(draws >= 1)) throw new RangeError(`acceptability: a step of ${draws} draws`);
      const until = Math.min(done + draws, samples + afterwards);
      for (; done < until && done < samples; done++) drawRanks();
      if (done < samples) return false;
      // The central weights are known only now.
      confidence ??= confidenceRun(table, highestValues(prepared, uncertain), centralWeightsOf(tally));
      for (; done < until; done++) confidence.draw(drawValues, random);
      return done === samples + afterwards;
    },
    result() {
      if (confidence === null || done < samples + afterwards)
        throw new RangeError(`acceptability: ${done} of ${samples + afterwards} draws are done`);
      return {
        shares: tally.ranks.map((times) => times / samples),
        wins: Float64Array.from(tally.wins, (halves) => halves / (2 * samples)),
        centralWeights: centralWeightsOf(tally),
        confidence: confidence.factors(afterwards),
      };
    },
  };
}

/** The whole analysis at once. @throws RangeError as `acceptabilityRun` */
export function acceptability(question: AcceptabilityQuestion): Acceptability {
  const run = acceptabilityRun(question);
  run.step(run.total);
  return run.result();
}

/**
 * Standard error of a share p of N draws, √(p(1 − p)/N).
 * @param share 0…1.
 * @param samples N.
 */
export const standardError = (share: number, samples: number): number =>
  Math.sqrt((share * (1 - share)) / samples);

/** Makes what draws weights and figures once and counts the ranks they give. */
function ranksDrawer(
  table: ValueTable,
  tally: Tally,
  drawWeights: DrawWeights,
  drawValues: DrawValues,
  random: RandomStream,
): () => void {
  const { siteCount, criterionCount } = table;
  const weights = new Float64Array(criterionCount);
  const values = table.values.slice();
  const totals = new Float64Array(siteCount);
  return () => {
    drawWeights(weights, random);
    drawValues(values, random);
    for (let site = 0; site < siteCount; site++) {
      totals[site] = overallValue(weights, values, site * criterionCount);
    }
    count(tally, totals, weights);
  };
}
