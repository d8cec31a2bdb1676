import { QUANTITIES } from '#contract/quantity.ts';
import { letterOf, valueDecimals } from '#contract/ranking-words.ts';
import type { RankingModel } from '#contract/ranking-model.ts';
import type { Ranking, WeighedCriterion } from '#contract/ranking.ts';
import { closedSums } from '#core/printed/closing.ts';
import { decimalsNeeded } from '#core/printed/figure.ts';

/** A criterion as a column: its letter, its decimals and its printed weight. */
export interface CriterionColumn {
  criterion: WeighedCriterion;
  place: number;
  letter: string;
  decimals: number;
  /** Rounded so that the printed weights add up to 1. */
  weight: number;
  weightDecimals: number;
}

const WEIGHT_DECIMALS = 2;

function printedWeights(criteria: readonly WeighedCriterion[]): { weights: number[]; decimals: number } {
  const weights = criteria.map(({ weight }) => weight);
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const closed = closedSums([{ parts: weights, total }], WEIGHT_DECIMALS);
  return { weights: closed.sums[0]?.parts ?? weights, decimals: closed.decimals };
}

/** Decimals of a column: of all its figures where they are known, of the drawn rows before. */
function columnDecimals(model: RankingModel | null, ranking: Ranking, place: number): number {
  if (model) return model.decimals[place] ?? 0;
  const quantity = ranking.criteria[place]?.quantity;
  if (quantity) return QUANTITIES[quantity].decimals;
  const rows = [...ranking.ranked, ...ranking.incomplete, ...ranking.setAside];
  return decimalsNeeded(rows.map((row) => row.contributions[place]?.figure ?? 0));
}

export function criterionColumns(ranking: Ranking, model: RankingModel | null): CriterionColumn[] {
  const { weights, decimals } = printedWeights(ranking.criteria);
  return ranking.criteria.map((criterion, place) => ({
    criterion,
    place,
    letter: letterOf(place),
    decimals: columnDecimals(model, ranking, place),
    weight: weights[place] ?? 0,
    weightDecimals: decimals,
  }));
}

/** What every view of a ranking draws by. */
export interface Sheet {
  ranking: Ranking;
  columns: CriterionColumn[];
  /** Decimals of overall values. */
  decimals: number;
  /** The leader's overall value; undefined without ranks. */
  leaderValue: number | undefined;
  names: string[];
}

export function sheetOf(ranking: Ranking, model: RankingModel | null): Sheet {
  return {
    ranking,
    columns: criterionColumns(ranking, model),
    decimals: valueDecimals(ranking),
    leaderValue: ranking.ranked[0]?.value,
    names: ranking.criteria.map(({ name }) => name),
  };
}
