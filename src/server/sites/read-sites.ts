import type { Site, SiteList, SiteListQuery } from '#contract/site.ts';
import type { Db } from '#db/client.ts';
import { countSites, findSite, firstSites, listSites } from '#db/queries/site.ts';
import { notFound } from '#server/errors.ts';
import { presentSite } from './present.ts';

/** One page of a study's sites, latest change first. */
export async function readSites(db: Db, request: { studyId: string } & SiteListQuery): Promise<SiteList> {
  const { items, total } = await listSites(db, request);
  return { items: items.map(presentSite), total };
}

/** @throws AppError 'not-found' */
export async function readSite(db: Db, scope: { studyId: string; siteId: string }): Promise<Site> {
  const row = await findSite(db, scope);
  if (!row) throw notFound('There is no such site in this study.');
  return presentSite(row);
}

/** What the Sites page draws before its island takes over: the first sites in the order they were added. */
export async function readFirstSites(
  db: Db,
  { studyId, limit }: { studyId: string; limit: number },
): Promise<SiteList> {
  const items = await firstSites(db, { studyId, limit });
  const total = items.length < limit ? items.length : await countSites(db, { studyId });
  return { items: items.map(presentSite), total };
}
