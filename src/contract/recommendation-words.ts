/** The recommendation in plain words, made from the figures: what is recommended, by how much, what would change it. */
import { formatCount, formatNumber, listInWords } from './format.ts';
import { errorFigure, shareInWords } from './share-words.ts';

/** A change of one weight that changes the leader. */
export interface WeightChange {
  criterion: string;
  now: number;
  at: number;
  leader: string;
}

/** What the draws say of a site. */
export interface FirstShare {
  name: string;
  share: number;
}

export interface RecommendationFacts {
  /** The sites at rank 1; none where no site is ranked. */
  leaders: readonly string[];
  ranked: number;
  /** Overall value of the leaders, and decimals at which values and margin are printed. */
  value: number;
  decimals: number;
  /** The best site below them, and how far below. */
  next: { name: string; margin: number } | null;
  /** A site at least as good as the leader on every criterion and better on one. */
  dominatedBy: string | null;
  /** The nearest change of one weight; null where none changes the leader, undefined where it cannot be asked. */
  weightChange: WeightChange | null | undefined;
  /** Figures with a low and a high, and those that alone cost the lead: "Cost at Essery Bank at 271". */
  uncertain: { count: number; losing: readonly string[] };
  /** Shares of first rank, the leader's and the greatest of the others'. */
  acceptability: {
    leader: FirstShare;
    rival: FirstShare | null;
    samples: number;
    /** How the weights were drawn: "each weight within ± 50 % of its own". */
    drawn: string;
  } | null;
  /** Incomplete sites that could still come first. */
  couldLead: readonly string[];
}

export interface RecommendationWords {
  what: string;
  /** What it rests on and what would change it, a sentence or two each. */
  holds: string[];
}

/** From this share of draws on a recommendation is called robust, below the other fragile; the bounds are our own. */
export const ROBUST_FROM = 0.9;
export const FRAGILE_BELOW = 0.5;

const NAMED = 3;
const named = (names: readonly string[]): string =>
  names.length <= NAMED
    ? listInWords(names)
    : `${names.slice(0, NAMED - 1).join(', ')} and ${formatNumber(names.length - NAMED + 1)} others`;

function whatInWords({ leaders, ranked, value, decimals, next }: RecommendationFacts): string {
  const at = formatNumber(value, decimals);
  const [leader] = leaders;
  if (leader === undefined) return 'No site is recommended: none can be ranked.';
  if (leaders.length > 1)
    return `No single site is recommended: ${named(leaders)} tie at an overall value of ${at}.`;
  if (next === null) return `${leader} is the only site ranked, with an overall value of ${at}.`;
  return `${leader} is recommended: of ${formatCount(ranked, 'ranked site')} it has the greatest overall value, ${at}, ${formatNumber(next.margin, decimals)} above ${next.name}.`;
}

function dominanceInWords({ leaders, dominatedBy }: RecommendationFacts): string[] {
  const [leader] = leaders;
  if (leader === undefined || dominatedBy === null) return [];
  return [
    `${dominatedBy} is at least as good as ${leader} on every criterion and better on one or more: only a weight of 0 or a tie keeps ${leader} level with it. Prefer ${dominatedBy}, or give weight to what parts them.`,
  ];
}

const WEIGHT_DECIMALS = 3;

function weightInWords({ leaders, weightChange }: RecommendationFacts): string[] {
  if (weightChange === undefined || leaders.length === 0) return [];
  if (weightChange === null)
    return ['No change of one weight alone, the others in proportion, changes the leader.'];
  const { criterion, now, at, leader } = weightChange;
  if (now === at)
    return [
      `At the weights as they are the lead is shared; the least change of the weight on ${criterion} can give it to ${leader}.`,
    ];
  const from = formatNumber(now, WEIGHT_DECIMALS);
  const to = formatNumber(at, WEIGHT_DECIMALS);
  return [
    `The nearest change of one weight that changes the leader: ${criterion} from ${from} ${at > now ? 'up' : 'down'} to ${to}, where ${leader} takes the lead.`,
  ];
}

function uncertaintyInWords({ leaders, uncertain: { count, losing } }: RecommendationFacts): string[] {
  if (leaders.length !== 1) return [];
  if (count === 0) return ['No figure is entered with a low and a high, so none was moved.'];
  const moved = `${formatCount(count, 'uncertain figure')}, moved alone between ${count === 1 ? 'its' : 'their'} low and high`;
  if (losing.length === 0) return [`None of ${moved}, costs the lead.`];
  return [
    `Of ${moved}, ${formatNumber(losing.length)} ${losing.length === 1 ? 'costs' : 'cost'} the lead: ${named(losing)}.`,
  ];
}

function verdictOf(share: number): string {
  if (share >= ROBUST_FROM) return 'The recommendation is robust';
  return share >= FRAGILE_BELOW ? 'The recommendation holds in most draws' : 'The recommendation is fragile';
}

function acceptabilityInWords({ leaders, acceptability }: RecommendationFacts): string[] {
  if (acceptability === null || leaders.length === 0) return [];
  const { leader, rival, samples, drawn } = acceptability;
  const error = `standard error ${errorFigure(leader.share, samples)}${leader.share > 0 && leader.share < 1 ? ' percentage points' : ''}`;
  const others =
    rival && rival.share > 0 ? `; next is ${rival.name}, first in ${shareInWords(rival.share, samples)}` : '';
  return [
    `${verdictOf(leader.share)}: with ${drawn}, ${leader.name} is first in ${shareInWords(leader.share, samples)} of ${formatNumber(samples)} draws (${error})${others}.`,
  ];
}

function incompleteInWords({ couldLead }: RecommendationFacts): string[] {
  if (couldLead.length === 0) return [];
  const one = couldLead.length === 1;
  return [
    `${named(couldLead)} ${one ? 'lacks' : 'lack'} figures and could still come first: enter them before deciding.`,
  ];
}

/** The words follow the numbers alone; a reader finds each of them beside the text. */
export function recommendationInWords(facts: RecommendationFacts): RecommendationWords {
  return {
    what: whatInWords(facts),
    holds: [
      ...dominanceInWords(facts),
      ...acceptabilityInWords(facts),
      ...weightInWords(facts),
      ...uncertaintyInWords(facts),
      ...incompleteInWords(facts),
    ],
  };
}
