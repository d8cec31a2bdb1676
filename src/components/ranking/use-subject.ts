import { useDeferredValue, useMemo } from 'react';
import { namesOf, type Names } from '#contract/sensitivity-words.ts';
import { subjectOf, type Subject } from '#contract/sensitivity-subject.ts';
import type { RankingModel } from '#contract/ranking-model.ts';

/**
 * The ranked sites as the methods look at them, a moment after the weights moved; null without any.
 * @param most sites taken at most, from the first
 */
export function useSubject(model: RankingModel, most = Infinity): { subject: Subject | null; names: Names } {
  const settled = useDeferredValue(model);
  return useMemo(
    () => ({
      subject: subjectOf(settled, most),
      names: namesOf(settled.figures.sites, settled.figures.criteria),
    }),
    [settled, most],
  );
}
