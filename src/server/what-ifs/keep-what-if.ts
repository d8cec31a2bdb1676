import type { WhatIf, WhatIfInput } from '#contract/what-if.ts';
import type { PooledDb } from '#db/client.ts';
import { countOwnWhatIfs, insertWhatIf } from '#db/queries/what-if.ts';
import { changeStudy } from '#server/change-study.ts';
import { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { checkChanges } from './check-changes.ts';
import { presentWhatIf } from './present.ts';
import { entriesFor } from './record.ts';

const MOST_OF_ONE_PERSON = 100;

/** Keeps a new what-if; it touches nothing of the study's, in review neither. @throws AppError 'invalid' */
export async function keepWhatIf(
  db: PooledDb,
  { member, input }: { member: Member; input: WhatIfInput },
): Promise<WhatIf & { revision: number }> {
  const { studyId, userId } = member;
  return changeStudy(db, { member, kind: 'apart' }, async (tx) => {
    if ((await countOwnWhatIfs(tx, { studyId, userId })) >= MOST_OF_ONE_PERSON)
      throw new AppError(
        'invalid',
        `You keep ${MOST_OF_ONE_PERSON} what-ifs of this study. Let one go first. Nothing was saved.`,
      );
    await checkChanges(tx, { studyId, changes: input.changes, before: null });
    const row = await insertWhatIf(tx, { studyId, userId, values: input });
    const made = presentWhatIf({ ...row, by: member.name }, member);
    return { result: made, entries: entriesFor(null, made) };
  });
}
