import type { MemberWeights, MemberWeightsList } from '#contract/weights.ts';
import type { WeighItem } from '#core/decision/statement.ts';
import type { Db } from '#db/client.ts';
import { listMemberSets, listWeighed } from '#db/queries/weights.ts';
import { presentStatement } from './read-weights.ts';

interface Asked {
  studyId: string;
  userId: string;
}

type MemberSet = Awaited<ReturnType<typeof listMemberSets>>[number];

/** Everyone who may weigh. A set is seen when it is shared, one's own always. */
export async function readMemberWeights(db: Db, { studyId, userId }: Asked): Promise<MemberWeightsList> {
  const items = await listWeighed(db, { studyId });
  const rows = await listMemberSets(db, { studyId });
  return { items: rows.map((row) => presentMember(items, row, userId)), total: rows.length };
}

function presentMember(
  items: readonly WeighItem[],
  { userId, name, role, set }: MemberSet,
  reader: string,
): MemberWeights {
  const mine = userId === reader;
  const seen = set && (set.shared || mine);
  return {
    userId,
    name,
    role: role === 'reader' ? 'reviewer' : role,
    mine,
    state: set === null ? 'none' : set.shared ? 'shared' : 'kept',
    set: seen ? seenSet(items, set) : null,
  };
}

function seenSet(items: readonly WeighItem[], set: NonNullable<MemberSet['set']>): MemberWeights['set'] {
  const { method, points, order, judgements, shares } = presentStatement(items, set);
  return { method, points, order, judgements, shares, updatedAt: set.updatedAt.toISOString() };
}
