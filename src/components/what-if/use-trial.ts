import { useMemo } from 'react';
import { sheetOf, type Sheet } from '#components/ranking/columns.ts';
import { prepareFigures, rankFigures, type RankingModel } from '#contract/ranking-model.ts';
import { presentRanking } from '#contract/ranking-rows.ts';
import type { WeightStatement } from '#contract/weights.ts';
import {
  changedFigures,
  changedWeights,
  rankMoves,
  type Ignored,
  type RankMove,
} from '#contract/what-if-model.ts';
import type { WhatIfChanges } from '#contract/what-if.ts';

/** Rows of either ranking that the sentences are made of. */
const ROWS = 50;

export interface Trial {
  /** The study's ranking under its own weights, and the what-if's. */
  study: Sheet;
  here: Sheet;
  moves: RankMove[];
  ignored: Ignored;
  /** Criteria and groups that the what-if's weights say nothing of. */
  unweighed: string[];
}

/**
 * Both rankings, side by side. Figures are valued anew only where a limit, a figure or a site changes, so that a weight
 * moves a long list at once.
 * @param model the study's figures, made ready
 */
export function useTrial(model: RankingModel, statement: WeightStatement, changes: WhatIfChanges): Trial {
  const { figures } = model;
  const { weights, limits, figures: tried, leftOut } = changes;
  const before = useMemo(() => rankFigures(model, statement), [model, statement]);
  const changed = useMemo(
    () => changedFigures(figures, { limits, figures: tried, leftOut }),
    [figures, limits, tried, leftOut],
  );
  const ready = useMemo(() => prepareFigures(changed.figures), [changed]);
  const weighed = useMemo(
    () => changedWeights(figures.criteria, statement, weights),
    [figures, statement, weights],
  );
  const after = useMemo(() => rankFigures(ready, weighed.statement), [ready, weighed]);
  return useMemo(
    () => ({
      study: sheetOf(presentRanking(before, 'study', ROWS), before),
      here: sheetOf(presentRanking(after, 'study', ROWS), after),
      moves: rankMoves(before, after),
      ignored: { ...changed.ignored, weights: weighed.gone },
      unweighed: weighed.unweighed,
    }),
    [before, after, changed, weighed],
  );
}
