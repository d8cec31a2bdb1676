import type { Study, StudyPatch } from '#contract/study.ts';
import type { PooledDb } from '#db/client.ts';
import { updateStudy } from '#db/queries/study.ts';
import { changeStudy, type RecordEntry, type StudyRow } from '#server/change-study.ts';
import { AppError, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentStudy } from './present.ts';
import { readStudy } from './read-studies.ts';

interface EditRequest {
  member: Member;
  /** The version the change is based on. */
  version: number;
  patch: StudyPatch;
}

const FIELDS = ['title', 'organisation', 'question', 'decideBy'] as const;
type Values = Partial<Pick<StudyRow, (typeof FIELDS)[number]>>;

/** What of the patch differs from what is kept, before and after. */
function differences(row: StudyRow, patch: StudyPatch): { from: Values; to: Values } {
  const changed = FIELDS.filter((field) => patch[field] !== undefined && patch[field] !== row[field]);
  const pick = (source: StudyPatch | StudyRow): Values =>
    Object.fromEntries(changed.map((field) => [field, source[field]]));
  return { from: pick(row), to: pick(patch) };
}

/** Changes title, organisation, question and decision date. @throws AppError 'stale' and those of changeStudy */
async function editFields(db: PooledDb, { member, version, patch }: EditRequest): Promise<void> {
  await changeStudy(db, { member, kind: 'inputs' }, async (tx, row) => {
    if (row.version !== version) throw stale(presentStudy(row, member.role));
    const { from, to } = differences(row, patch);
    if (Object.keys(to).length === 0) return { result: {}, entries: [] };
    await updateStudy(tx, { studyId: row.id, values: to });
    return { result: {}, entries: [{ object: 'study', objectId: row.id, action: 'change', from, to }] };
  });
}

/** Archives or restores: the lead's, at any state of the study. @throws AppError 'forbidden' · 'stale' */
async function setArchived(
  db: PooledDb,
  { member, version, archived }: { member: Member; version: number; archived: boolean },
): Promise<void> {
  if (member.role !== 'lead')
    throw new AppError('forbidden', 'A lead archives and restores a study. Nothing was changed.');
  await changeStudy(db, { member, kind: 'apart', allowArchived: true }, async (tx, row) => {
    if (row.version !== version) throw stale(presentStudy(row, member.role));
    if ((row.archivedAt !== null) === archived) return { result: {}, entries: [] };
    await updateStudy(tx, { studyId: row.id, values: { archivedAt: archived ? new Date() : null } });
    const entry: RecordEntry = {
      object: 'study',
      objectId: row.id,
      action: archived ? 'archive' : 'restore',
      from: { archived: !archived },
      to: { archived },
    };
    return { result: {}, entries: [entry] };
  });
}

/** Changes what is sent and gives the study as it then is. @throws AppError 'stale' · 'forbidden' · 'study-locked' */
export async function editStudy(db: PooledDb, { member, version, patch }: EditRequest): Promise<Study> {
  const { archived } = patch;
  if (archived === undefined) await editFields(db, { member, version, patch });
  else await setArchived(db, { member, version, archived });
  return readStudy(db, member);
}
