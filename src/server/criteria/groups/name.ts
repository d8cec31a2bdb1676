import { foldName } from '#core/csv/codes.ts';
import type { Db } from '#db/client.ts';
import { findGroup, listGroups, type GroupRow } from '#db/queries/criterion-group.ts';
import { AppError } from '#server/errors.ts';

/**
 * A group's name with its folded form, checked against the others of the study; the study's row is locked, so no one
 * else can take it meanwhile.
 * @throws AppError 'invalid' when another group has it
 */
export async function freeGroupName(
  tx: Db,
  { studyId, name, except }: { studyId: string; name: string; except?: string },
): Promise<Pick<GroupRow, 'name' | 'nameKey'>> {
  const nameKey = foldName(name);
  const taken = (await listGroups(tx, { studyId })).find(
    (row) => row.nameKey === nameKey && row.id !== except,
  );
  if (!taken) return { name, nameKey };
  const message = `The study already has a group named ${taken.name}. Give this one another name.`;
  throw new AppError('invalid', message, { errors: [{ path: 'name', message }] });
}

/** @throws AppError 'invalid' when a criterion is put into a group that is not of its study */
export async function requireGroup(
  tx: Db,
  { studyId, groupId }: { studyId: string; groupId: string | null | undefined },
): Promise<void> {
  if (groupId === null || groupId === undefined || (await findGroup(tx, { studyId, groupId }))) return;
  const message = 'This study has no such group of criteria.';
  throw new AppError('invalid', message, { errors: [{ path: 'groupId', message }] });
}
