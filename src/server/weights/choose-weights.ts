import { meanShares, pointsOfShares, weighing } from '#contract/weighing.ts';
import {
  pointsStatement,
  type Weights,
  type WeightsChoice,
  type WeightOrigin,
  type WeightStatement,
} from '#contract/weights.ts';
import type { WeighItem } from '#core/decision/statement.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { findWeights, listMemberSets, writeWeights } from '#db/queries/weights.ts';
import { changeStudy } from '#server/change-study.ts';
import { AppError, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentWeights, readWeights } from './read-weights.ts';
import { readWeighed } from './read-weighed.ts';
import { recorded } from './save-weights.ts';

interface ChoiceRequest {
  member: Member;
  /** The version of the study's set that the choice replaces; 0 where it has never been saved. */
  version: number;
  choice: WeightsChoice;
}

/**
 * Takes the study's weights from its members: one's shared set as it was said, or the mean of all shared ones.
 * @throws AppError 'forbidden' · 'stale' · 'invalid'
 */
export async function chooseWeights(
  db: PooledDb,
  { member, version, choice }: ChoiceRequest,
): Promise<Weights & { revision: number }> {
  if (member.role !== 'lead') throw new AppError('forbidden', 'A lead chooses the study’s weights.');
  const { studyId, userId } = member;
  return changeStudy(db, { member, kind: 'weights' }, async (tx) => {
    const kept = await findWeights(tx, { studyId, userId: null });
    const before = await readWeights(tx, { studyId, userId, weights: 'study' });
    if (before.version !== version) throw stale(before);
    const { items } = await readWeighed(tx, { studyId });
    const by = { userId, name: member.name };
    const shared = await sharedSets(tx, items, studyId);
    const { statement, origin } =
      choice.from.kind === 'mean' ? meanOf(items, shared) : setOf(shared, choice.from.userId);
    const row = await writeWeights(tx, {
      studyId,
      userId: null,
      id: kept?.id ?? null,
      values: { ...statement, shared: false, origin: { ...origin, by }, reason: choice.reason },
    });
    const after = presentWeights({ weights: 'study', items, set: row, version: row.version });
    return { result: after, entries: [{ ...recorded(before, after), action: 'choose', objectId: row.id }] };
  });
}

interface SharedSet {
  userId: string;
  name: string;
  said: WeightStatement;
  shares: Record<string, number>;
}

interface Chosen {
  statement: WeightStatement;
  origin: WeightOrigin;
}

/** Shared sets of those who may weigh; a set that gives nothing any weight cannot be chosen. */
async function sharedSets(tx: Db, items: readonly WeighItem[], studyId: string): Promise<SharedSet[]> {
  const rows = await listMemberSets(tx, { studyId });
  return rows.flatMap(({ userId, name, set }) => {
    if (!set?.shared) return [];
    const { method, points, order, judgements } = set;
    const said = { method, points, order, judgements };
    const { shares } = weighing(items, said);
    return shares ? [{ userId, name, said, shares }] : [];
  });
}

const refused = (path: string, message: string): AppError =>
  new AppError('invalid', `${message} Nothing was changed.`, { errors: [{ path, message }] });

function setOf(shared: readonly SharedSet[], userId: string): Chosen {
  const set = shared.find((one) => one.userId === userId);
  if (!set) throw refused('from.userId', 'This member shares no weights with the study.');
  return { statement: set.said, origin: { kind: 'member', userId, name: set.name } };
}

function meanOf(items: readonly WeighItem[], shared: readonly SharedSet[]): Chosen {
  const shares = meanShares(
    items,
    shared.map((set) => set.shares),
  );
  if (!shares) throw refused('from.kind', 'No member shares weights with the study yet.');
  return {
    statement: pointsStatement(pointsOfShares(items, shares)),
    origin: { kind: 'mean', members: shared.map(({ userId, name }) => ({ userId, name })) },
  };
}
