import { figureText } from '#contract/rating.ts';
import { valueDecimals } from '#contract/ranking-words.ts';
import {
  recommendationInWords,
  type RecommendationFacts,
  type RecommendationWords,
} from '#contract/recommendation-words.ts';
import type { Sensitivity } from '#contract/sensitivity.ts';
import { drawnInWords, nearestChange } from '#contract/sensitivity-words.ts';
import type { MemoFacts } from './facts.ts';
import { memoNames, type MemoNames } from './names.ts';

function weightChange({ leaderChanges }: Sensitivity, names: MemoNames): RecommendationFacts['weightChange'] {
  if (leaderChanges === null) return undefined;
  const nearest = nearestChange(leaderChanges);
  if (nearest === null) return null;
  const { criterionId, now, at, siteId } = nearest;
  return { criterion: names.criterion(criterionId), now, at, leader: names.site(siteId) };
}

/** Figures that alone cost the lead, each at the end where they do. */
function uncertain(facts: MemoFacts, names: MemoNames): RecommendationFacts['uncertain'] {
  const bars = facts.sensitivity.tornado?.bars ?? [];
  const losing = bars.flatMap(({ siteId, criterionId, low, high, atLow, atHigh }) => {
    if (atLow >= 0 && atHigh >= 0) return [];
    const place = facts.ranking.criteria.findIndex(({ id }) => id === criterionId);
    const criterion = facts.ranking.criteria[place];
    if (!criterion) return [];
    const figure = figureText(criterion, atLow < atHigh ? low : high, facts.decimals[place] ?? 0);
    return [
      `${criterion.name} of ${names.site(siteId)} at ${[figure, criterion.unit].filter(Boolean).join(' ')}`,
    ];
  });
  return { count: bars.length, losing };
}

function acceptability(
  { acceptability: answer }: Sensitivity,
  names: MemoNames,
): RecommendationFacts['acceptability'] {
  const [first, ...others] = answer?.sites ?? [];
  if (!answer || !first) return null;
  const of = ({ siteId, shares }: typeof first) => ({ name: names.site(siteId), share: shares[0] ?? 0 });
  const [rival] = others.map(of).sort((a, b) => b.share - a.share);
  return { leader: of(first), rival: rival ?? null, samples: answer.samples, drawn: drawnInWords(answer) };
}

function recommendationFacts(facts: MemoFacts): RecommendationFacts {
  const { ranking, sensitivity } = facts;
  const names = memoNames(facts);
  const leaders = ranking.ranked.filter(({ rank }) => rank === 1);
  const [leader] = leaders;
  const next = ranking.ranked[leaders.length];
  const dominator = sensitivity.dominance?.dominated.find(({ siteId }) => siteId === leader?.siteId);
  return {
    leaders: leaders.map(({ name }) => name),
    ranked: ranking.counts.ranked,
    value: leader?.value ?? 0,
    decimals: valueDecimals(ranking),
    next: leader && next ? { name: next.name, margin: leader.value - next.value } : null,
    dominatedBy: dominator ? names.site(dominator.by) : null,
    weightChange: weightChange(sensitivity, names),
    uncertain: uncertain(facts, names),
    acceptability: acceptability(sensitivity, names),
    couldLead: ranking.incomplete.filter(({ bestRank }) => bestRank === 1).map(({ name }) => name),
  };
}

/** What is recommended, by how much, and what would change it. */
export const recommendation = (facts: MemoFacts): RecommendationWords =>
  recommendationInWords(recommendationFacts(facts));
