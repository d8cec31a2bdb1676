import { foldName } from '#core/csv/codes.ts';
import type { Db } from '#db/client.ts';
import { listCriteria } from '#db/queries/criterion.ts';
import { AppError } from '#server/errors.ts';

/**
 * The folded name of a criterion, checked against the others of the study; the study's row is locked, so no one else
 * can take it meanwhile.
 * @throws AppError 'invalid' when another criterion has it
 */
export async function freeNameKey(
  tx: Db,
  { studyId, name, except }: { studyId: string; name: string; except?: string },
): Promise<string> {
  const nameKey = foldName(name);
  const taken = (await listCriteria(tx, { studyId })).find(
    (row) => row.nameKey === nameKey && row.id !== except,
  );
  if (!taken) return nameKey;
  const message = `The study already has a criterion named ${taken.name}. Give this one another name.`;
  throw new AppError('invalid', message, { errors: [{ path: 'name', message }] });
}
