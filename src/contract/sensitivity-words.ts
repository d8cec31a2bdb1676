/* What the sensitivity of a ranking comes to, in words: for the screens and the memo alike. */
import { formatCount, formatNumber, listInWords } from './format.ts';
import type { AcceptabilityOf, Dominance, LeaderChangeOf, SecondOpinion } from './sensitivity.ts';
import { errorFigure, shareInWords } from './share-words.ts';

/** The names of what the answers know by id. */
export interface Names {
  site: (siteId: string) => string;
  criterion: (criterionId: string) => string;
}

export function namesOf(
  sites: readonly { siteId: string; name: string }[],
  criteria: readonly { id: string; name: string }[],
): Names {
  const bySite = new Map(sites.map(({ siteId, name }) => [siteId, name]));
  const byCriterion = new Map(criteria.map(({ id, name }) => [id, name]));
  return { site: (id) => bySite.get(id) ?? id, criterion: (id) => byCriterion.get(id) ?? id };
}

const WEIGHT_DECIMALS = 3;
export const weightFigure = (weight: number): string => formatNumber(weight, WEIGHT_DECIMALS);

/** Weights this close are one. */
const SAME = 1e-12;

/** A change at the weight in force: the lead is shared now. */
export const isNow = (change: { weight: number }, now: number): boolean =>
  Math.abs(change.weight - now) <= SAME;

/** "Now 0.240. Below 0.120 Pointe Rovana leads; above 0.312 Essery Bank leads." */
export function leaderChangeInWords(
  { criterionId, weight, below, above }: LeaderChangeOf,
  names: Names,
): string {
  if (!below && !above) return `No weight on ${names.criterion(criterionId)} changes the leader.`;
  const side = (word: string, change: NonNullable<LeaderChangeOf['above']>): string =>
    isNow(change, weight)
      ? `${names.site(change.siteId)}, level now, leads or stays level ${word} this`
      : `${word} ${weightFigure(change.weight)} ${names.site(change.siteId)} leads`;
  const sides = [...(below ? [side('below', below)] : []), ...(above ? [side('above', above)] : [])];
  const text = sides.join('; ');
  return `Now ${weightFigure(weight)}. ${text.charAt(0).toUpperCase()}${text.slice(1)}.`;
}

/** The change that needs the least move of one weight; null where none changes the leader. */
export function nearestChange(
  changes: readonly LeaderChangeOf[],
): { criterionId: string; now: number; at: number; siteId: string } | null {
  const all = changes.flatMap(({ criterionId, weight, below, above }) =>
    [below, above].flatMap((one) =>
      one ? [{ criterionId, now: weight, at: one.weight, siteId: one.siteId }] : [],
    ),
  );
  const moveOf = ({ at, now }: (typeof all)[number]): number => Math.abs(at - now);
  // Two criteria alone change the leader at one and the same place: the first is named.
  return all.reduce<(typeof all)[number] | null>(
    (nearest, one) => (nearest && moveOf(one) >= moveOf(nearest) - SAME ? nearest : one),
    null,
  );
}

/** The least move of one weight that changes the leader, without its full stop. */
export function nearestChangeInWords(changes: readonly LeaderChangeOf[], names: Names): string {
  const nearest = nearestChange(changes);
  if (!nearest) return 'No weight alone changes the leader';
  const { criterionId, now, at, siteId } = nearest;
  const name = names.criterion(criterionId);
  return isNow({ weight: at }, now)
    ? `The lead is shared now with ${names.site(siteId)}`
    : `Nearest change: ${name} from ${weightFigure(now)} to ${weightFigure(at)}, where ${names.site(siteId)} leads`;
}

interface Ranked {
  siteId: string;
  rank: number;
}

/** A fact, without its full stop, and what stands behind it. */
export interface Finding {
  fact: string;
  behind: string;
}

const NAMED = 4;

function movesInWords(moved: readonly { name: string; rank: number; here: number }[]): string {
  const named = moved
    .slice(0, NAMED)
    .map(({ name, rank, here }) => `${name} ${formatNumber(rank)} (here ${formatNumber(here)})`);
  const rest = moved.length - named.length;
  return listInWords(rest > 0 ? [...named, `${formatNumber(rest)} more`] : named);
}

/** Sites whose rank by closeness is another than by additive value, in the order of closeness. */
export function movedBetween(
  ranked: readonly Ranked[],
  opinion: SecondOpinion,
): { siteId: string; rank: number; here: number }[] {
  const here = new Map(ranked.map(({ siteId, rank }) => [siteId, rank]));
  return opinion.flatMap(({ siteId, rank }) => {
    const own = here.get(siteId);
    return own === undefined || own === rank ? [] : [{ siteId, rank, here: own }];
  });
}

/** Where the order by closeness to the ideal differs from that by additive value. */
export function secondOpinionInWords(
  ranked: readonly Ranked[],
  opinion: SecondOpinion,
  names: Names,
): Finding {
  const [first, second] = opinion;
  const moved = movedBetween(ranked, opinion);
  const figures =
    first && second
      ? `Closeness ${formatNumber(first.closeness, 3)} against ${formatNumber(second.closeness, 3)} for ${names.site(second.siteId)}. `
      : '';
  if (moved.length === 0)
    return { fact: 'TOPSIS gives the same order', behind: `${figures}Every site keeps its rank.` };
  const leads = new Set(ranked.filter(({ rank }) => rank === 1).map(({ siteId }) => siteId));
  const agree = ranked.length - moved.length;
  const others =
    agree === 0
      ? 'no site keeps its rank'
      : `${formatCount(agree, 'site keeps its', 'sites keep their')} rank`;
  const words = moved.map(({ siteId, ...ranks }) => ({ name: names.site(siteId), ...ranks }));
  return {
    fact: first
      ? `TOPSIS ${leads.has(first.siteId) ? 'too puts' : 'puts'} ${names.site(first.siteId)} first${leads.has(first.siteId) ? ', and differs further down' : ''}`
      : '',
    behind: `${figures}It ranks ${movesInWords(words)}; ${others}.`,
  };
}

/** How many ranked sites no other outdoes everywhere. */
export function dominanceInWords({ nonDominated, dominated }: Dominance): Finding {
  if (dominated.length === 0)
    return {
      fact: 'No ranked site is dominated',
      behind: `Each of ${formatNumber(nonDominated)} is better than every other on at least one criterion, or level with it on all.`,
    };
  const total = nonDominated + dominated.length;
  return {
    fact: `${formatNumber(dominated.length)} of ${formatCount(total, 'ranked site')} ${dominated.length === 1 ? 'is' : 'are'} dominated`,
    behind: `Another site is at least as good on every criterion and better on one. ${formatNumber(nonDominated)} ${nonDominated === 1 ? 'is' : 'are'} not dominated, whatever the weights.`,
  };
}

/** How weights and figures were drawn: "each weight within ± 50 % of its own, figures as they are". */
export function drawnInWords({
  model,
  band,
  uncertainFigures,
}: Pick<AcceptabilityOf, 'model' | 'band' | 'uncertainFigures'>): string {
  const weights = {
    band: `each weight within ± ${formatNumber((band ?? 0) * 100)} % of its own`,
    simplex: 'any weights at all',
    order: 'any weights that keep the order of those in force',
  }[model];
  return uncertainFigures > 0
    ? `${weights} and every uncertain figure between its low and high`
    : `${weights}, figures as they are`;
}

/** Who is first in how many draws, and whether that is who leads now. */
export function acceptabilityInWords(answer: AcceptabilityOf, names: Names): Finding {
  const { sites, samples } = answer;
  const shareOf = (place: number): number => sites[place]?.shares[0] ?? 0;
  const best = sites.reduce((most, _, place) => (shareOf(place) > shareOf(most) ? place : most), 0);
  const name = (place: number): string => names.site(sites[place]?.siteId ?? '');
  const draws = `${formatNumber(samples)} draws`;
  const share = shareOf(best);
  const error = `standard error ${errorFigure(share, samples)}${share > 0 && share < 1 ? ' percentage points' : ''}`;
  const drawn = `With ${drawnInWords(answer)}; ${error}.`;
  if (best === 0)
    return { fact: `${name(0)} is first in ${shareInWords(share, samples)} of ${draws}`, behind: drawn };
  return {
    fact: `${name(0)} leads now, but ${name(best)} is first more often: in ${shareInWords(share, samples)} of ${draws} against ${shareInWords(shareOf(0), samples)}`,
    behind: drawn,
  };
}
