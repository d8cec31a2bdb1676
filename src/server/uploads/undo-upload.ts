import type { UploadUndone } from '#contract/upload.ts';
import { foldCode, foldName } from '#core/csv/codes.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { deleteCriterion, findCriterion } from '#db/queries/criterion.ts';
import { listSiteKeys, markSites } from '#db/queries/site.ts';
import { findUpload, holdsFigures, markUndone, updateSites, versionsOfSites } from '#db/queries/upload.ts';
import { changeStudy, type RecordEntry } from '#server/change-study.ts';
import { presentCriterion } from '#server/criteria/present.ts';
import { AppError, notFound } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentSite, recordedSite } from '#server/sites/present.ts';
import { Effect } from './kept.ts';

const NOTHING: Effect = { added: [], updated: [], criteria: [] };

/**
 * Undoes an upload: the sites it added are removed, those it updated are as they were before, and criteria that it
 * made and nobody has used since are gone. One that was never committed is only marked. The file stays.
 * @throws AppError 'not-found' · 'conflict' where a site of it was edited since, or it was undone before
 */
export async function undoUpload(
  db: PooledDb,
  { member, uploadId }: { member: Member; uploadId: string },
): Promise<UploadUndone> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const kept = await findUpload(tx, { studyId, uploadId });
    if (!kept) throw notFound('There is no such upload in this study.');
    if (kept.state === 'undone') throw new AppError('conflict', 'This upload was undone before.');
    const effect = kept.effect === null ? NOTHING : Effect.parse(kept.effect);
    await refuseEdited(tx, studyId, effect);
    await refuseTaken(tx, studyId, effect);
    const removed = await removeAdded(tx, studyId, effect);
    const restored = await restoreUpdated(tx, studyId, effect);
    const criteria = await removeUnused(tx, studyId, effect);
    await markUndone(tx, { studyId, uploadId });
    return {
      result: { uploadId, removed: effect.added.length, restored: effect.updated.length },
      entries: [...removed, ...restored, ...criteria],
    };
  });
}

/** A site that was edited or removed since has another version, or none. */
async function refuseEdited(tx: Db, studyId: string, { added, updated }: Effect): Promise<void> {
  const touched = [...added, ...updated];
  const now = await versionsOfSites(tx, { studyId, siteIds: touched.map(({ id }) => id) });
  const edited = touched.filter(({ id, version }) => now.get(id) !== version);
  if (edited.length === 0) return;
  const sites = edited.length === 1 ? 'One of its sites has' : `${edited.length} of its sites have`;
  throw new AppError(
    'conflict',
    `${sites} been edited since. Nothing was undone; remove the sites you do not want one by one.`,
    { current: { siteIds: edited.map(({ id }) => id) } },
  );
}

/** A code or name that an update took away may have been given to another site meanwhile. */
async function refuseTaken(tx: Db, studyId: string, { added, updated }: Effect): Promise<void> {
  const own = new Set([...added, ...updated].map(({ id }) => id));
  const others = (await listSiteKeys(tx, { studyId })).filter(({ id }) => !own.has(id));
  const codes = new Map(others.map((other) => [foldCode(other.code), other.name]));
  const names = new Map(others.map((other) => [other.nameKey, other.name]));
  for (const { before } of updated) {
    const holder = codes.get(foldCode(before.code)) ?? names.get(foldName(before.name));
    if (holder === undefined) continue;
    const message = `${before.name} (${before.code}) cannot be restored: ${holder} has its code or name now. Nothing was undone.`;
    throw new AppError('conflict', message);
  }
}

async function removeAdded(tx: Db, studyId: string, { added }: Effect): Promise<RecordEntry[]> {
  const rows = await markSites(tx, { studyId, siteIds: added.map(({ id }) => id), removed: true });
  return rows.map((row) => ({
    object: 'site',
    objectId: row.id,
    action: 'remove',
    from: recordedSite(presentSite(row)),
  }));
}

async function restoreUpdated(tx: Db, studyId: string, { updated }: Effect): Promise<RecordEntry[]> {
  await updateSites(tx, { studyId, sites: updated.map(({ id, before }) => ({ ...before, id })) });
  return updated.map(({ id, before: { nameKey: _nameKey, ...to } }) => ({
    object: 'site',
    objectId: id,
    action: 'change',
    to,
  }));
}

/** A criterion that was changed, or holds a figure of another site, has a life of its own. */
async function removeUnused(tx: Db, studyId: string, { criteria }: Effect): Promise<RecordEntry[]> {
  const entries: RecordEntry[] = [];
  for (const { id: criterionId, version } of criteria) {
    const row = await findCriterion(tx, { studyId, criterionId });
    if (row?.version !== version) continue;
    if (await holdsFigures(tx, { studyId, criterionId })) continue;
    await deleteCriterion(tx, { studyId, criterionId });
    entries.push({
      object: 'criterion',
      objectId: criterionId,
      action: 'remove',
      from: presentCriterion(row),
    });
  }
  return entries;
}
