import type { WhatIf, WhatIfPatch } from '#contract/what-if.ts';
import type { PooledDb } from '#db/client.ts';
import { updateWhatIf } from '#db/queries/what-if.ts';
import { changeStudy } from '#server/change-study.ts';
import { notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { checkChanges } from './check-changes.ts';
import { presentWhatIf } from './present.ts';
import { readOwnWhatIf } from './read-what-ifs.ts';
import { entriesFor } from './record.ts';

interface ChangeRequest {
  member: Member;
  whatIfId: string;
  /** The version the change is based on. */
  version: number;
  patch: Omit<WhatIfPatch, 'version'>;
}

/**
 * Changes what is sent; its maker's alone. Entries kept of a site or criterion that has gone may stay.
 * @throws AppError 'not-found' · 'forbidden' · 'stale' with the what-if as it is now · 'invalid'
 */
export async function changeWhatIf(
  db: PooledDb,
  { member, whatIfId, version, patch }: ChangeRequest,
): Promise<WhatIf & { revision: number }> {
  const { studyId, userId } = member;
  return changeStudy(db, { member, kind: 'apart' }, async (tx) => {
    const before = await readOwnWhatIf(tx, { studyId, userId, whatIfId });
    if (before.version !== version) throw stale(before);
    if (patch.changes) await checkChanges(tx, { studyId, changes: patch.changes, before: before.changes });
    const values = {
      ...(patch.name === undefined ? {} : { name: patch.name }),
      ...(patch.shared === undefined ? {} : { shared: patch.shared }),
      ...(patch.changes === undefined ? {} : { changes: patch.changes }),
    };
    const row = await updateWhatIf(tx, { studyId, userId, whatIfId, values });
    if (!row) throw notFound('There is no such what-if in this study.');
    const after = presentWhatIf({ ...row, by: before.by.name }, member);
    return { result: after, entries: entriesFor(before, after) };
  });
}
