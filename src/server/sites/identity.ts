import { CodeMaker, foldCode, foldName } from '#core/csv/codes.ts';
import type { Db } from '#db/client.ts';
import { listSiteKeys } from '#db/queries/site.ts';
import { AppError, type FieldError } from '#server/errors.ts';

interface Wanted {
  code?: string | undefined;
  name?: string | undefined;
}

/**
 * Checks a wanted code and name against the other sites of the study, whose row is locked, so no one else can take
 * them meanwhile.
 * @returns a maker of free codes
 * @throws AppError 'invalid' naming the site that has the code or the name
 */
export async function claimIdentity(
  tx: Db,
  { studyId, wanted, except }: { studyId: string; wanted: Wanted; except?: string },
): Promise<CodeMaker> {
  const others = (await listSiteKeys(tx, { studyId })).filter(({ id }) => id !== except);
  const errors: FieldError[] = [];
  const code = wanted.code === undefined ? undefined : foldCode(wanted.code);
  const codeHolder = code && others.find((other) => foldCode(other.code) === code);
  if (codeHolder)
    errors.push({
      path: 'code',
      message: `Code ${code} is taken by ${codeHolder.name}. Give this site another code.`,
    });
  const nameKey = wanted.name === undefined ? undefined : foldName(wanted.name);
  const nameHolder = nameKey && others.find((other) => other.nameKey === nameKey);
  if (nameHolder)
    errors.push({
      path: 'name',
      message: `The study already has a site named ${nameHolder.name}. Give this one another name.`,
    });
  const first = errors[0];
  if (first) throw new AppError('invalid', `${first.message} Nothing was saved.`, { errors });
  return new CodeMaker(others.map((other) => other.code));
}
