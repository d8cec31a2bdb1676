import type { SitesRemoval, SitesRemoved } from '#contract/site.ts';
import type { PooledDb } from '#db/client.ts';
import { findSites, markSites } from '#db/queries/site.ts';
import { changeStudy } from '#server/change-study.ts';
import { notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentSite, recordedSite } from './present.ts';

/**
 * Removes sites, all or none. They are kept, so that they can be brought back, and count nowhere.
 * @throws AppError 'not-found' · 'stale' with the sites that were changed meanwhile
 */
export async function removeSites(
  db: PooledDb,
  { member, removal }: { member: Member; removal: SitesRemoval },
): Promise<SitesRemoved> {
  const { studyId } = member;
  const versions = new Map(removal.sites.map(({ id, version }) => [id, version]));
  const siteIds = [...versions.keys()];
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const found = (await findSites(tx, { studyId, siteIds })).map(presentSite);
    if (found.length < siteIds.length)
      throw notFound('Some of these sites are no longer in the study. Nothing was removed.');
    const moved = found.filter(({ id, version }) => versions.get(id) !== version);
    if (moved.length > 0) throw stale(moved);
    await markSites(tx, { studyId, siteIds, removed: true });
    const entries = found.map((site) => ({
      object: 'site',
      objectId: site.id,
      action: 'remove',
      from: recordedSite(site),
    }));
    return { result: { siteIds }, entries };
  });
}
