import { closingDecimals } from '#core/printed/closing.ts';
import { decimalsNeeded } from '#core/printed/figure.ts';
import { formatCount, formatNumber, listInWords } from './format.ts';
import { QUANTITIES } from './quantity.ts';
import type { Ranking, RankingFigures } from './ranking.ts';

const LETTERS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZ';

/** A criterion's letter by its place: A to Z, then AA, AB, … */
export function letterOf(place: number): string {
  const before = Math.floor(place / LETTERS.length) - 1;
  return (before >= 0 ? letterOf(before) : '') + (LETTERS[place % LETTERS.length] ?? '');
}

/** One count of decimals a column: the quantity's, or the fewest that print the entered figures, up to three. */
export function decimalsOf({ criteria, cells }: RankingFigures, place: number): number {
  const quantity = criteria[place]?.quantity;
  if (quantity) return QUANTITIES[quantity].decimals;
  return decimalsNeeded(cells.flatMap((row) => (typeof row[place] === 'number' ? [row[place]] : [])));
}

const LEAST_DECIMALS = 3;
const MOST_DECIMALS = 9;

/**
 * Decimals at which overall values are printed: the margin must come out from the two printed values beside it, so
 * one more digit is printed until it does.
 */
export function valueDecimals({ ranked, margin }: Pick<Ranking, 'ranked' | 'margin'>): number {
  const [first, second] = ranked;
  if (!first || !second || margin === null) return LEAST_DECIMALS;
  const sums = [{ parts: [second.value, first.value - second.value], total: first.value }];
  const closes = closingDecimals(sums, LEAST_DECIMALS, MOST_DECIMALS) ?? MOST_DECIMALS;
  // A lead that exists must not be printed as none.
  const shows = margin === 0 ? 0 : Math.ceil(-Math.log10(margin));
  return Math.max(closes, Math.min(shows, MOST_DECIMALS));
}

/** A sentence that states the result, with the part that leads apart, so that it can take the signal. */
export interface RankingFinding {
  leads: string | null;
  rest: string;
}

const sentenceOf = ({ leads, rest }: RankingFinding): string => (leads ?? '') + rest;

const BEFORE_RANKS = {
  'no-sites': 'No sites to rank yet.',
  'no-criteria': 'No criteria to rank sites by yet.',
  'no-weights': 'No weights to rank sites by yet.',
} as const;

function withoutRanks({ incomplete, setAside }: Ranking['counts']): string {
  if (incomplete === 0)
    return setAside === 1 ? 'The one site fails a must-meet limit.' : 'Every site fails a must-meet limit.';
  if (setAside === 0) return 'No site has every figure yet.';
  return 'No site meets every limit with every figure known.';
}

/** The finding of a ranking: the page's first sentence and its title. */
export function rankingFinding(ranking: Ranking): RankingFinding {
  const { state, counts, ranked } = ranking;
  if (state !== 'ranked') return { leads: null, rest: BEFORE_RANKS[state] };
  const leaders = ranked.filter(({ rank }) => rank === 1).map(({ name }) => name);
  const [leader] = leaders;
  if (leader === undefined) return { leads: null, rest: withoutRanks(counts) };
  if (leaders.length > 1) return { leads: sharing(leaders), rest: ' share first place.' };
  if (ranking.margin === null) return { leads: leader, rest: ' is the only site ranked.' };
  return { leads: leader, rest: ` leads by ${formatNumber(ranking.margin, valueDecimals(ranking))}.` };
}

const NAMED_LEADERS = 3;

function sharing(leaders: readonly string[]): string {
  if (leaders.length <= NAMED_LEADERS) return listInWords(leaders);
  return listInWords([...leaders.slice(0, 2), `${formatNumber(leaders.length - 2)} others`]);
}

export const findingText = (ranking: Ranking): string => sentenceOf(rankingFinding(ranking));

/** Why, in a sentence or two: the values behind the margin, and the criterion that parts the first two most. */
export function rankingWhy(ranking: Ranking): string {
  const { ranked, criteria } = ranking;
  const [first, second, third] = ranked;
  if (!first || !second) return '';
  const decimals = valueDecimals(ranking);
  const figure = (value: number): string => formatNumber(value, decimals);
  const others = [second, third].filter((row) => row !== undefined);
  const against = listInWords(others.map(({ name, value }) => `${figure(value)} for ${name}`));
  const apart = criteria
    .map(({ name }, j) => ({
      name,
      own: first.contributions[j]?.term ?? 0,
      other: second.contributions[j]?.term ?? 0,
    }))
    .sort((a, b) => b.own - b.other - (a.own - a.other))[0];
  const ahead =
    apart && apart.own > apart.other
      ? ` It stands furthest ahead of ${second.name} in ${apart.name}: ${figure(apart.own)} against ${figure(apart.other)}.`
      : '';
  return `${figure(first.value)} against ${against}.${ahead}`;
}

/** "6 ranked, 1 incomplete, 2 set aside" */
export function countsInWords({ ranked, incomplete, setAside }: Ranking['counts']): string {
  return [
    `${formatNumber(ranked)} ranked`,
    ...(incomplete > 0 ? [`${formatNumber(incomplete)} incomplete`] : []),
    ...(setAside > 0 ? [`${formatNumber(setAside)} set aside`] : []),
  ].join(', ');
}

/** "Incomplete: no figure for People in corridor" */
export function missingInWords(ranking: Pick<Ranking, 'criteria'>, missing: readonly string[]): string {
  const names = ranking.criteria.filter(({ id }) => missing.includes(id)).map(({ name }) => name);
  return names.length > NAMED_LEADERS
    ? `no figure for ${formatCount(names.length, 'criterion', 'criteria')}`
    : `no figure for ${listInWords(names, 'or')}`;
}

/** "6 to 7", or "6" where the range is one rank. */
export function rankRange({ bestRank, worstRank }: { bestRank: number; worstRank: number }): string {
  return bestRank === worstRank
    ? formatNumber(bestRank)
    : `${formatNumber(bestRank)} to ${formatNumber(worstRank)}`;
}
