import type { CriterionGroup } from '#contract/criterion.ts';
import type { PooledDb } from '#db/client.ts';
import { insertGroup, listGroups } from '#db/queries/criterion-group.ts';
import { changeStudy, type Saved } from '#server/change-study.ts';
import { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { freeGroupName } from './name.ts';
import { presentGroup } from './read-groups.ts';

/** As many as a study has criteria at most: more could never be filled. */
const MOST_GROUPS = 100;

/** Makes a group of criteria, empty at first. @throws AppError 'invalid' and those of changeStudy */
export async function addGroup(
  db: PooledDb,
  { member, name }: { member: Member; name: string },
): Promise<CriterionGroup & Saved> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    if ((await listGroups(tx, { studyId })).length >= MOST_GROUPS)
      throw new AppError(
        'invalid',
        `A study has up to ${MOST_GROUPS} groups of criteria. Nothing was added.`,
      );
    const values = await freeGroupName(tx, { studyId, name });
    const made = presentGroup(await insertGroup(tx, { studyId, values }));
    return {
      result: made,
      entries: [{ object: 'criterion-group', objectId: made.id, action: 'add', to: made }],
    };
  });
}
