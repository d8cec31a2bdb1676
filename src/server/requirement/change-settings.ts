import type { SettingsPatch, StudySettings } from '#contract/requirement.ts';
import type { PooledDb } from '#db/client.ts';
import { updateSettings } from '#db/queries/study.ts';
import { changeStudy, type Saved } from '#server/change-study.ts';
import { stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentSettings } from './present.ts';

interface ChangeRequest {
  member: Member;
  /** The version the change is based on. */
  version: number;
  patch: SettingsPatch;
}

/** Changes the study's settings. @throws AppError 'stale' */
export async function changeSettings(
  db: PooledDb,
  { member, version, patch }: ChangeRequest,
): Promise<StudySettings & Saved> {
  return changeStudy(db, { member, kind: 'inputs' }, async (tx, row) => {
    const before = presentSettings(row);
    if (before.version !== version) throw stale(before);
    const { turnSpeedFraction = before.turnSpeedFraction, losses = before.losses } = patch;
    const values = { turnSpeedFraction, losses };
    const from = { turnSpeedFraction: before.turnSpeedFraction, losses: before.losses };
    if (turnSpeedFraction === from.turnSpeedFraction && losses === from.losses)
      return { result: before, entries: [] };
    await updateSettings(tx, { studyId: row.id, values });
    return {
      result: { ...values, version: version + 1 },
      entries: [{ object: 'settings', objectId: row.id, action: 'change', from, to: values }],
    };
  });
}
