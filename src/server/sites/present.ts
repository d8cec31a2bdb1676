import type { Site } from '#contract/site.ts';
import type { SiteRow } from '#db/queries/site.ts';

export function presentSite({ studyId: _study, ...row }: SiteRow): Site {
  return row;
}

/** A site as the record keeps it: without its counter, which every line of the record moves. */
export function recordedSite({ version: _version, ...site }: Site): Omit<Site, 'version'> {
  return site;
}
