/* Does the ranking hold? The one way from a ranking to the answer, for the screens, the server and the memo. */
import {
  acceptability,
  standardError,
  type Acceptability,
  type AcceptabilityQuestion,
} from '#core/decision/acceptability.ts';
import { firstDominators } from '#core/decision/dominance.ts';
import { leaderChanges, type Change } from '#core/decision/leader-change.ts';
import { endOfTie } from '#core/decision/ties.ts';
import { closeness } from '#core/decision/topsis.ts';
import { tornado } from '#core/decision/tornado.ts';
import type { WeightModel } from '#core/decision/weight-model.ts';
import { prepareFigures, rankFigures, type RankingModel } from './ranking-model.ts';
import type { RankingFigures } from './ranking.ts';
import type {
  AcceptabilityOf,
  Dominance,
  DrawQuery,
  LeaderChangeOf,
  SecondOpinion,
  Sensitivity,
  SiteAcceptability,
  TornadoOf,
} from './sensitivity.ts';
import { MOST_DRAWN_SITES } from './sensitivity.ts';
import { subjectOf, type Subject } from './sensitivity-subject.ts';
import type { WeightsOf, WeightStatement } from './weights.ts';

/** The site ranked first, or the first of those that tie. */
const LEADER = 0;

const siteIdAt = ({ sites }: Subject, site: number): string => sites[site]?.siteId ?? '';
const criterionIdAt = ({ criteria }: Subject, criterion: number): string => criteria[criterion]?.id ?? '';
const byCriterion = ({ criteria }: Subject, figures: ArrayLike<number>): Record<string, number> =>
  Object.fromEntries(criteria.map(({ id }, place) => [id, figures[place] ?? 0]));

/** For each criterion the weight at which the leader changes, the other weights keeping their proportions. */
export function leaderChangesOf(subject: Subject): LeaderChangeOf[] {
  const { table, weights } = subject;
  const named = (change: Change | null) =>
    change && { weight: change.weight, siteId: siteIdAt(subject, change.leader) };
  return leaderChanges(table, weights, LEADER).map(({ below, above }, j) => ({
    criterionId: criterionIdAt(subject, j),
    weight: weights[j] ?? 0,
    below: named(below),
    above: named(above),
  }));
}

/** The leader's margin with every uncertain figure at its low and at its high, one at a time; null for one site. */
export function tornadoOf(subject: Subject): TornadoOf | null {
  const { prepared, weights, uncertain } = subject;
  const answer = tornado({ prepared, weights, leader: LEADER, uncertain });
  return (
    answer && {
      margin: answer.margin,
      bars: answer.bars.map(({ site, criterion, ...bar }) => ({
        siteId: siteIdAt(subject, site),
        criterionId: criterionIdAt(subject, criterion),
        likely: prepared.table.figures[site * prepared.table.criterionCount + criterion] ?? 0,
        ...bar,
      })),
    }
  );
}

/** TOPSIS on the same values and weights: closeness and the rank it gives, best first; ties share a rank. */
export function secondOpinionOf(subject: Subject): SecondOpinion {
  const close = closeness(subject.table, subject.weights);
  const order = [...close.keys()].sort((a, b) => (close[b] ?? 0) - (close[a] ?? 0) || a - b);
  const sorted = order.map((site) => close[site] ?? 0);
  const answer: SecondOpinion = [];
  for (let first = 0, end = 0; first < order.length; first = end) {
    end = endOfTie(sorted, first);
    for (const site of order.slice(first, end))
      answer.push({ siteId: siteIdAt(subject, site), closeness: close[site] ?? 0, rank: first + 1 });
  }
  return answer;
}

/** Sites that another is at least as good as on every criterion and better on one, each with the best ranked such that none dominates. */
export function dominanceOf(subject: Subject): Dominance {
  const best = subject.sites.map((_, site) => site);
  const dominated = firstDominators(subject.table, best).flatMap((by, site) =>
    by === null ? [] : [{ siteId: siteIdAt(subject, site), by: siteIdAt(subject, by) }],
  );
  return { nonDominated: subject.sites.length - dominated.length, dominated };
}

/** Criteria from the heaviest to the lightest, equal ones in the study's order. */
export const orderOf = ({ weights }: Subject): number[] =>
  [...weights.keys()].sort((a, b) => (weights[b] ?? 0) - (weights[a] ?? 0) || a - b);

function weightModelOf(subject: Subject, { model, band }: DrawQuery): WeightModel {
  if (model === 'simplex') return { kind: 'simplex', criterionCount: subject.criteria.length };
  return model === 'order'
    ? { kind: 'order', order: orderOf(subject) }
    : { kind: 'band', weights: subject.weights, band };
}

/**
 * What to draw: for `acceptability` of core, in a worker or a thread.
 * @param subject of the best hundred sites at most: `subjectOf(model, MOST_DRAWN_SITES)`
 */
export function acceptabilityQuestionOf(subject: Subject, query: DrawQuery): AcceptabilityQuestion {
  const { prepared, uncertain } = subject;
  const { samples, seed } = query;
  return { prepared, uncertain, weights: weightModelOf(subject, query), samples, seed };
}

/** The draws as they cross the wire. @param sitesLeftOut ranked sites that were not drawn */
export function presentAcceptability(
  subject: Subject,
  { model, band, samples, seed }: DrawQuery,
  answer: Acceptability,
  sitesLeftOut: number,
): AcceptabilityOf {
  return {
    model,
    band: model === 'band' ? band : null,
    order: model === 'order' ? orderOf(subject).map((j) => criterionIdAt(subject, j)) : null,
    samples,
    seed,
    uncertainFigures: subject.uncertain.length,
    sitesLeftOut,
    sites: subject.sites.map((_, site) => presentSite(subject, answer, site, samples)),
  };
}

function presentSite(
  subject: Subject,
  { shares, wins, centralWeights, confidence }: Acceptability,
  site: number,
  samples: number,
): SiteAcceptability {
  const count = subject.sites.length;
  const row = (figures: Float64Array): number[] => [...figures.subarray(site * count, (site + 1) * count)];
  const own = row(shares);
  const central = centralWeights[site] ?? null;
  const sure = confidence[site] ?? null;
  // Without uncertain figures the confidence factor is no estimate: there is nothing to draw.
  const draws = subject.uncertain.length > 0 ? samples : Infinity;
  return {
    siteId: siteIdAt(subject, site),
    shares: own,
    errors: own.map((share) => standardError(share, samples)),
    centralWeights: central && byCriterion(subject, central),
    confidence: sure,
    confidenceError: sure === null ? null : standardError(sure, draws),
    wins: row(wins).map((share, other) => (other === site ? null : share)),
  };
}

/** Draws the best hundred ranked sites; null where fewer than two are ranked. */
export function acceptabilityOf(model: RankingModel, query: DrawQuery): AcceptabilityOf | null {
  const subject = subjectOf(model, MOST_DRAWN_SITES);
  if (!subject || subject.sites.length < 2) return null;
  const answer = acceptability(acceptabilityQuestionOf(subject, query));
  return presentAcceptability(subject, query, answer, model.table.ranked.length - subject.sites.length);
}

const NOTHING = { leaderChanges: null, tornado: null, topsis: null, dominance: null, acceptability: null };

/**
 * All that says whether a ranking holds, as the interface answers it, the screens draw it and the memo prints it: the
 * same model, query and seed give the same to the last digit, wherever it runs. The draws take some tenths of a second.
 * @param model ranked under the weights in question
 * @param weights whose they are
 */
export function sensitivityOf(model: RankingModel, weights: WeightsOf, query: DrawQuery): Sensitivity {
  const subject = subjectOf(model);
  const compared = subject !== null && subject.sites.length > 1;
  return {
    revision: model.figures.revision,
    weights,
    state: model.state,
    sites: rankedSites(subject),
    criteria: (subject?.criteria ?? []).map(({ id, name }, j) => ({
      criterionId: id,
      name,
      weight: subject?.weights[j] ?? 0,
    })),
    criteriaLeftOut: (subject?.leftOut ?? []).map(({ id }) => id),
    ...(compared
      ? {
          leaderChanges: leaderChangesOf(subject),
          tornado: tornadoOf(subject),
          topsis: secondOpinionOf(subject),
          dominance: dominanceOf(subject),
          acceptability: acceptabilityOf(model, query),
        }
      : NOTHING),
  };
}

function rankedSites(subject: Subject | null): Sensitivity['sites'] {
  if (!subject) return [];
  const { sites, ranks, totals } = subject;
  return sites.map(({ siteId, code, name }, site) => ({
    siteId,
    code,
    name,
    rank: ranks[site] ?? 0,
    value: totals[site] ?? 0,
  }));
}

/** A study's figures, the weights in question, and how to draw about them: what a thread is given. */
export interface SensitivityTask {
  figures: RankingFigures;
  statement: WeightStatement;
  weights: WeightsOf;
  query: DrawQuery;
}

/** A sensitivity as JSON text in bytes. */
export function sensitivityBytes({
  figures,
  statement,
  weights,
  query,
}: SensitivityTask): Uint8Array<ArrayBuffer> {
  const model = rankFigures(prepareFigures(figures), statement);
  return new TextEncoder().encode(JSON.stringify(sensitivityOf(model, weights, query)));
}
