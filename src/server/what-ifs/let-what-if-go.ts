import type { PooledDb } from '#db/client.ts';
import { deleteWhatIf } from '#db/queries/what-if.ts';
import { changeStudy } from '#server/change-study.ts';
import { stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { readOwnWhatIf } from './read-what-ifs.ts';
import { entriesFor } from './record.ts';

/** Lets a what-if go; its maker's alone. @throws AppError 'not-found' · 'forbidden' · 'stale' */
export async function letWhatIfGo(
  db: PooledDb,
  { member, whatIfId, version }: { member: Member; whatIfId: string; version: number },
): Promise<void> {
  const { studyId, userId } = member;
  await changeStudy(db, { member, kind: 'apart' }, async (tx) => {
    const before = await readOwnWhatIf(tx, { studyId, userId, whatIfId });
    if (before.version !== version) throw stale(before);
    await deleteWhatIf(tx, { studyId, userId, whatIfId });
    return { result: {}, entries: entriesFor(before, null) };
  });
}
