import { useDeferredValue, useMemo } from 'react';
import { namesOf, type Names } from '#contract/sensitivity-words.ts';
import { subjectOf, type Subject } from '#contract/sensitivity-subject.ts';
import type { RankingModel } from '#contract/ranking-model.ts';

/** The ranked sites as the methods look at them, a moment after the weights moved; null without any. */
export function useSubject(model: RankingModel): { subject: Subject | null; names: Names } {
  const settled = useDeferredValue(model);
  return useMemo(
    () => ({
      subject: subjectOf(settled),
      names: namesOf(settled.figures.sites, settled.figures.criteria),
    }),
    [settled],
  );
}
