import type { SitesRestored } from '#contract/site.ts';
import { foldCode, foldName } from '#core/csv/codes.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { findRemovedSites, listSiteKeys, markSites, type SiteRow } from '#db/queries/site.ts';
import { changeStudy } from '#server/change-study.ts';
import { AppError, notFound } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentSite, recordedSite } from './present.ts';

/**
 * Brings removed sites back, all or none.
 * @throws AppError 'not-found' · 'conflict' where a code or name has been given to another site meanwhile
 */
export async function restoreSites(
  db: PooledDb,
  { member, siteIds: asked }: { member: Member; siteIds: readonly string[] },
): Promise<SitesRestored> {
  const { studyId } = member;
  const siteIds = [...new Set(asked)];
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const removed = await findRemovedSites(tx, { studyId, siteIds });
    if (removed.length < siteIds.length)
      throw notFound('Some of these sites are not among the removed ones. Nothing was brought back.');
    await refuseTaken(tx, studyId, removed);
    const items = (await markSites(tx, { studyId, siteIds, removed: false })).map(presentSite);
    const entries = items.map((site) => ({
      object: 'site',
      objectId: site.id,
      action: 'restore',
      to: recordedSite(site),
    }));
    return { result: { items }, entries };
  });
}

async function refuseTaken(tx: Db, studyId: string, removed: readonly SiteRow[]): Promise<void> {
  const keys = await listSiteKeys(tx, { studyId });
  const codes = new Map(keys.map((key) => [foldCode(key.code), key.name]));
  const names = new Map(keys.map((key) => [key.nameKey, key.name]));
  for (const { code, name } of removed) {
    const holder = codes.get(foldCode(code)) ?? names.get(foldName(name));
    if (holder !== undefined)
      throw new AppError(
        'conflict',
        `${name} (${code}) cannot come back: ${holder} has its code or its name now. Nothing was brought back.`,
      );
  }
}
