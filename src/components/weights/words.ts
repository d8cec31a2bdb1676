import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import { meanShares, weighing } from '#contract/weighing.ts';
import type { MemberWeights, WeightLevel, WeightMethod, WeightOrigin, Weights } from '#contract/weights.ts';
import type { WeighItem } from '#core/decision/statement.ts';
import { ratioInFigures, ratioOf } from './judgement.ts';

export const METHOD_NAMES: Readonly<Record<WeightMethod, string>> = {
  points: 'Points',
  swing: 'Swing',
  pairwise: 'Pairwise',
  centroid: 'Order',
};

/** "set by …" */
export const METHOD_WAYS: Readonly<Record<WeightMethod, string>> = {
  points: 'direct points',
  swing: 'swings from worst to best',
  pairwise: 'pairwise comparison',
  centroid: 'an agreed order',
};

/** What each way asks, in one line. */
export const METHOD_HINTS: Readonly<Record<WeightMethod, string>> = {
  points: 'Give points as you like; each weight is its share of them.',
  swing:
    'Judge the swing from worst to best of each: the one that matters most has 100, every other a share of it.',
  pairwise: 'Judge two at a time how many times one outweighs the other.',
  centroid: 'Only the order is said; each weight is the middle of all weights that keep it.',
};

export type Names = ReadonlyMap<string, string>;

export const nameIn = (names: Names, id: string): string => names.get(id) ?? 'a group';

/** "Groups and single criteria", "Within Business", or "Criteria" where there are no groups. */
export function levelInWords(groupId: string | null, names: Names, grouped: boolean): string {
  if (groupId !== null) return `Within ${nameIn(names, groupId)}`;
  return grouped ? 'Groups and single criteria' : 'Criteria';
}

/** What was not judged when the set was made; empty where all was. */
export function unjudgedInWords(levels: readonly WeightLevel[], names: Names): string {
  const ids = levels.filter(({ weights }) => weights !== null).flatMap(({ unjudged }) => unjudged);
  if (ids.length === 0) return '';
  const has = ids.length === 1 ? 'has weight 0 until it is judged' : 'have weight 0 until they are judged';
  return `${listInWords(ids.map((id) => nameIn(names, id)))} ${has}.`;
}

/** Saaty's threshold: above it, judge again. */
export const MOST_RATIO_OF_CONSISTENCY = 0.1;

/** What the others imply: 1.5, or 1/2.5 where they turn the judgement round. */
const impliedInFigures = (implied: number): string =>
  implied >= 1 ? formatNumber(implied, 1) : `1/${formatNumber(1 / implied, 1)}`;

export function consistencyInWords(
  { consistency }: WeightLevel,
  judgements: Weights['judgements'],
  names: Names,
  /** Whether whoever reads it wrote it. */
  own = true,
): string | null {
  if (!consistency) return null;
  const ratio = consistency.ratio ?? 0;
  if (ratio <= MOST_RATIO_OF_CONSISTENCY)
    return `Judgements agree: consistency ratio ${formatNumber(ratio, 2)}, not above 0.10.`;
  const [a, b] = consistency.worst;
  const wrote = ratioInFigures(ratioOf(judgements, a, b) ?? 1);
  // 0.1004 must not be printed as "0.10, above 0.10".
  const decimals = ratio < 0.105 ? 4 : 2;
  return `Judgements disagree: consistency ratio ${formatNumber(ratio, decimals)}, above 0.10. Start with ${nameIn(names, a)} against ${nameIn(names, b)}: ${own ? 'you wrote' : 'it says'} ${wrote}, the others imply about ${impliedInFigures(consistency.implied)}.`;
}

const COUNTS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten'];
const countInWords = (count: number): string => COUNTS[count] ?? formatNumber(count);

/** "The mean of three members’ sets, chosen by Ada Quill" */
export function originInWords(origin: WeightOrigin | null): string {
  if (!origin) return 'Not set yet';
  const by = origin.by?.name;
  if (origin.kind === 'apart') return by ? `Set apart by ${by}` : 'Set apart by a lead';
  const chosen = `chosen by ${by ?? 'a lead'}`;
  if (origin.kind === 'member') return `${origin.name}’s set, ${chosen}`;
  const { length } = origin.members;
  const sets = length === 1 ? 'one member’s set' : `${countInWords(length)} members’ sets`;
  return `The mean of ${sets}, ${chosen}`;
}

const SAME = 1e-9;
const differ = (items: readonly WeighItem[], a: Shares, b: Shares): boolean =>
  items.some(({ id }) => Math.abs((a?.[id] ?? 0) - (b?.[id] ?? 0)) > SAME);
type Shares = Readonly<Record<string, number>> | null;

/** What has become of the sets that the study's weights were taken from; empty where they are as they were. */
export function changedSince(
  study: Weights,
  items: readonly WeighItem[],
  members: readonly MemberWeights[],
): string {
  const { origin } = study;
  if (!origin || origin.kind === 'apart') return '';
  const { shares } = weighing(items, study);
  const sharesOf = (userId: string): Shares =>
    members.find((one) => one.userId === userId && one.state === 'shared')?.set?.shares ?? null;
  if (origin.kind === 'member') {
    const now = sharesOf(origin.userId);
    if (!now) return `${origin.name} no longer shares a set.`;
    return differ(items, now, shares) ? `${origin.name} has changed that set since.` : '';
  }
  const gone = origin.members.filter(({ userId }) => !sharesOf(userId));
  if (gone.length > 0)
    return `${listInWords(gone.map(({ name }) => name))} no longer ${gone.length === 1 ? 'shares' : 'share'} a set.`;
  const now = meanShares(
    items,
    origin.members.map(({ userId }) => sharesOf(userId) ?? {}),
  );
  if (differ(items, now, shares)) return 'At least one of these sets has changed since.';
  const others = members.filter(
    ({ userId, state }) => state === 'shared' && !origin.members.some((one) => one.userId === userId),
  );
  return others.length > 0 ? `${formatCount(others.length, 'more set')} shared since.` : '';
}
