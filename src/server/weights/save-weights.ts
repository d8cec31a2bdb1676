import type { WeightOrigin, Weights, WeightsDraft, WeightsOf, WeightStatement } from '#contract/weights.ts';
import type { PooledDb } from '#db/client.ts';
import { findWeights, writeWeights } from '#db/queries/weights.ts';
import { changeStudy } from '#server/change-study.ts';
import { AppError, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { checkStatement } from './check-statement.ts';
import { presentWeights, readWeights } from './read-weights.ts';
import { readWeighed } from './read-weighed.ts';

interface SaveRequest {
  member: Member;
  weights: WeightsOf;
  /** The version the set is based on; 0 where it has never been saved. */
  version: number;
  input: WeightsDraft;
}

/**
 * Writes a set of weights whole. The study's set is a lead's to write and moves the revision; a member's own moves
 * nothing of the study's and goes on in review. @throws AppError 'forbidden' · 'stale' · 'invalid'
 */
export async function saveWeights(
  db: PooledDb,
  { member, weights, version, input }: SaveRequest,
): Promise<Weights & { revision: number }> {
  if (weights === 'study' && member.role !== 'lead')
    throw new AppError('forbidden', 'A lead sets the study’s weights. Keep a set of your own instead.');
  const { studyId, userId } = member;
  const mine = weights === 'mine';
  return changeStudy(db, { member, kind: mine ? 'apart' : 'weights' }, async (tx) => {
    const set = { studyId, userId: mine ? userId : null };
    const kept = await findWeights(tx, set);
    const before = await readWeights(tx, { studyId, userId, weights });
    if ((kept?.version ?? 0) !== version) throw stale(before);
    const { items, names } = await readWeighed(tx, { studyId });
    const statement = statementOf(input);
    const restated = !same(statement, statementOf(before));
    if (restated) checkStatement(statement, { items, names, before });
    const particulars = mine
      ? ownParticulars(before, input)
      : studyParticulars(before, input, restated ? member : null);
    const unchanged = kept && !restated && same(particulars, particularsOf(before));
    if (unchanged) return { result: before, entries: [] };
    const values = { ...(restated || !kept ? statement : statementOf(kept)), ...particulars };
    const row = await writeWeights(tx, { ...set, id: kept?.id ?? null, values });
    const after = presentWeights({ weights, items, set: row, version: row.version });
    return { result: after, entries: [{ ...recorded(before, after), objectId: row.id }] };
  });
}

const same = (a: unknown, b: unknown): boolean => canonical(a) === canonical(b);

/** JSON with its keys in order: the database keeps objects without one. */
const canonical = (value: unknown): string =>
  JSON.stringify(value, (_, one: unknown) =>
    one !== null && typeof one === 'object' && !Array.isArray(one)
      ? Object.fromEntries(Object.entries(one).sort(([a], [b]) => (a < b ? -1 : 1)))
      : one,
  );

const statementOf = ({ method, points, order, judgements }: WeightsDraft): WeightStatement => ({
  method: method ?? 'points',
  points: points ?? {},
  order: order ?? [],
  judgements: judgements ?? [],
});

interface Particulars {
  shared: boolean;
  origin: WeightOrigin | null;
  reason: string;
}

const particularsOf = ({ shared, origin, reason }: Weights): Particulars => ({ shared, origin, reason });

const ownParticulars = (before: Weights, { shared }: WeightsDraft): Particulars => ({
  shared: shared ?? before.shared,
  origin: null,
  reason: '',
});

/**
 * Weights moved by hand stand apart, and the reason for an earlier choice is none for these.
 * @param by who states them anew; null where they stay as they are.
 */
function studyParticulars(before: Weights, { reason }: WeightsDraft, by: Member | null): Particulars {
  const kept = before.origin ?? { kind: 'apart' };
  if (!by) return { shared: false, origin: kept, reason: reason ?? before.reason };
  return {
    shared: false,
    origin: { kind: 'apart', by: { userId: by.userId, name: by.name } },
    reason: reason ?? (kept.kind === 'apart' ? before.reason : ''),
  };
}

/**
 * The record's line of a set. What a member keeps to themselves stands in no record: of an own set only how it was
 * set and whether it was shared.
 */
export function recorded(before: Weights, after: Weights) {
  if (after.weights === 'study')
    return { object: 'weights', action: 'change', from: wholeOf(before), to: wholeOf(after) };
  const shownOf = (set: Weights) => (set.shared ? wholeOf(set) : { method: set.method, shared: false });
  return { object: 'own-weights', action: 'change', from: shownOf(before), to: shownOf(after) };
}

const wholeOf = (set: Weights) => ({
  ...statementOf(set),
  ...(set.weights === 'study' ? { origin: set.origin, reason: set.reason } : { shared: set.shared }),
});
