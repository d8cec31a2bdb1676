import type { CriterionGroup } from '#contract/criterion.ts';
import type { PooledDb } from '#db/client.ts';
import { deleteGroup, findGroup, updateGroup } from '#db/queries/criterion-group.ts';
import { changeStudy, type Saved } from '#server/change-study.ts';
import { notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { freeGroupName } from './name.ts';
import { presentGroup } from './read-groups.ts';

interface OneGroup {
  member: Member;
  groupId: string;
  /** The version the change is based on. */
  version: number;
}

const NO_GROUP = 'There is no such group of criteria in this study.';

/** Gives a group another name. @throws AppError 'not-found' · 'stale' · 'invalid' */
export async function renameGroup(
  db: PooledDb,
  { member, groupId, version, name }: OneGroup & { name: string },
): Promise<CriterionGroup & Saved> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const row = await findGroup(tx, { studyId, groupId });
    if (!row) throw notFound(NO_GROUP);
    const from = presentGroup(row);
    if (row.version !== version) throw stale(from);
    if (row.name === name) return { result: from, entries: [] };
    const values = await freeGroupName(tx, { studyId, name, except: groupId });
    const to = presentGroup((await updateGroup(tx, { studyId, groupId, values })) ?? row);
    return {
      result: to,
      entries: [{ object: 'criterion-group', objectId: groupId, action: 'change', from, to }],
    };
  });
}

/**
 * Takes a group away. Its criteria stay and stand by themselves; points and judgements given to the group in sets of
 * weights count for nothing from here on. @throws AppError 'not-found' · 'stale'
 */
export async function removeGroup(
  db: PooledDb,
  { member, groupId, version }: OneGroup,
): Promise<{ revision: number }> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const row = await findGroup(tx, { studyId, groupId });
    if (!row) throw notFound(NO_GROUP);
    const group = presentGroup(row);
    if (row.version !== version) throw stale(group);
    const from = { ...group, criterionIds: await deleteGroup(tx, { studyId, groupId }) };
    return {
      result: {},
      entries: [{ object: 'criterion-group', objectId: groupId, action: 'remove', from }],
    };
  });
}
