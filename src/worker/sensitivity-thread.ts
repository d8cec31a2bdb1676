import { move } from 'piscina';
import { prepareFigures, rankFigures } from '#contract/ranking-model.ts';
import type { RankingFigures } from '#contract/ranking.ts';
import type { DrawQuery } from '#contract/sensitivity.ts';
import { sensitivityOf } from '#contract/sensitivity-model.ts';
import type { WeightStatement, WeightsOf } from '#contract/weights.ts';

/** A study's figures, the weights in question, and how to draw about them. */
export interface SensitivityTask {
  figures: RankingFigures;
  statement: WeightStatement;
  weights: WeightsOf;
  query: DrawQuery;
}

/** Entry of a worker thread: whether a ranking holds, as JSON text in bytes, handed over without a copy. */
export default function sensitivityThread({
  figures,
  statement,
  weights,
  query,
}: SensitivityTask): Uint8Array {
  const model = rankFigures(prepareFigures(figures), statement);
  const answer = sensitivityOf(model, weights, query);
  return move(new TextEncoder().encode(JSON.stringify(answer))) as Uint8Array;
}
