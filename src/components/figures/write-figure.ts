import { ApiError, send } from '#components/live/api.ts';
import { announceKept, announceSaved, announceSaving } from '#components/live/saved.ts';
import type { ChangedSite, SavedSite, Site } from '#contract/site.ts';
import { entryOf, entryPatch, sameEntry, type Entry } from './figure.ts';

/** What became of a write: saved, met by someone else's change of the same figure, or refused. */
export type Written =
  | { kind: 'saved'; site: SavedSite; before: Entry }
  | { kind: 'stale'; current: ChangedSite }
  | { kind: 'refused'; error: ApiError };

/**
 * Writes one figure on the site as it was when the edit began. Someone's change of another figure meanwhile stands
 * in nobody's way: the write goes onto the site as it is now. One of the same figure is for the person to decide.
 */
export async function writeFigure(
  studyId: string,
  base: Site,
  criterionId: string,
  entry: Entry,
): Promise<Written> {
  const address = `/api/v1/studies/${studyId}/sites/${base.id}`;
  announceSaving();
  try {
    const body = { ...entryPatch(criterionId, entry), version: base.version };
    const site = await send<SavedSite>('PATCH', address, body);
    announceSaved(site);
    return { kind: 'saved', site, before: entryOf(base, criterionId) };
  } catch (error) {
    announceKept();
    if (!(error instanceof ApiError)) throw error;
    if (error.code !== 'stale') return { kind: 'refused', error };
    const current = error.current as ChangedSite;
    const untouched = sameEntry(entryOf(current, criterionId), entryOf(base, criterionId));
    return untouched ? writeFigure(studyId, current, criterionId, entry) : { kind: 'stale', current };
  }
}
