import { useCallback, useMemo } from 'react';
import type { Entry } from '#components/figures/figure.ts';
import { withEntry } from '#components/figures/known.ts';
import type { ApiError } from '#components/live/api.ts';
import { useApi } from '#components/live/hooks.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import { prepareFigures, rankFigures, type RankingModel } from '#contract/ranking-model.ts';
import { presentRanking } from '#contract/ranking-rows.ts';
import type { Ranking, RankingFigures, RankingStart } from '#contract/ranking.ts';
import type { WeightsOf } from '#contract/weights.ts';
import { useWeightSet, type WeightSet } from './use-weight-set.ts';

/** Changes that move no figure: who is a member, weights, which are read on their own, and what-ifs. */
const APART = new Set(['weights', 'own-weights', 'what-if', 'member', 'study']);

/** What weights are said of. */
const WEIGHED = new Set(['criterion', 'criterion-group']);

/** Rows drawn as plain HTML; the same number the page drew. */
const DRAWN_ROWS = 50;

export interface LiveRanking {
  /** Null until the figures have been read. */
  model: RankingModel | null;
  /** The first rows; what the page drew until the figures have been read. */
  ranking: Ranking;
  weights: WeightSet;
  /** Other figures are on their way; those shown are of this revision. */
  staleRevision: number | null;
  error: ApiError | undefined;
  again: () => void;
  /** Shows a figure as it was just saved, until all figures have been read again. */
  enter: (at: { siteId: string; criterionId: string }, entry: Entry) => void;
}

/** A study's ranking, weighed on this screen and kept up with everyone's changes. */
export function useRanking(studyId: string, start: RankingStart, whose: WeightsOf): LiveRanking {
  const { data, error, isValidating, mutate } = useApi<RankingFigures>(
    `/api/v1/studies/${studyId}/ranking?form=figures`,
  );
  const study = useWeightSet(studyId, start.study);
  const mine = useWeightSet(studyId, start.mine);
  const weights = whose === 'mine' ? mine : study;

  const { refresh: refreshStudy } = study;
  const { refresh: refreshMine } = mine;
  const hear = useCallback(
    (event: LiveEvent) => {
      const objects = event.kind === 'gap' ? null : event.change.objects;
      if (!objects || objects.some((object) => !APART.has(object))) void mutate();
      const reweighed = !objects || objects.some((object) => WEIGHED.has(object));
      if (reweighed || objects.includes('weights')) refreshStudy();
      if (reweighed || objects.includes('weights') || objects.includes('own-weights')) refreshMine();
    },
    [mutate, refreshStudy, refreshMine],
  );
  useStudyEvents(studyId, hear);

  const ready = useMemo(() => (data ? prepareFigures(data) : null), [data]);
  const { statement } = weights;
  const model = useMemo(() => (ready ? rankFigures(ready, statement) : null), [ready, statement]);
  const ranking = useMemo(
    () => (model ? presentRanking(model, whose, DRAWN_ROWS) : start.ranking),
    [model, whose, start.ranking],
  );
  const enter = useCallback<LiveRanking['enter']>(
    (at, entry) => void mutate((figures) => figures && withEntry(figures, at, entry), { revalidate: true }),
    [mutate],
  );
  return {
    enter,
    model,
    ranking,
    weights,
    staleRevision: isValidating && data ? data.revision : null,
    error,
    again: () => void mutate(),
  };
}
