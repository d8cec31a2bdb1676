import { isDeepStrictEqual } from 'node:util';
import type { ChangedSite, SavedSite, Site, SitePatch } from '#contract/site.ts';
import { foldName } from '#core/csv/codes.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { findSite, lastChangeOfSite, updateSite, type SiteFields } from '#db/queries/site.ts';
import { changeStudy, type RecordEntry } from '#server/change-study.ts';
import { notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { checkFigures, patchedFigures } from './entered-figures.ts';
import { claimIdentity } from './identity.ts';
import { presentSite } from './present.ts';

interface ChangeRequest {
  member: Member;
  siteId: string;
  /** The version the change is based on. */
  version: number;
  patch: SitePatch;
}

/** Changes what is sent. @throws AppError 'not-found' · 'stale' with the site as it is now · 'invalid' */
export async function changeSite(
  db: PooledDb,
  { member, siteId, version, patch }: ChangeRequest,
): Promise<SavedSite> {
  const { studyId } = member;
  const scope = { studyId, siteId };
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const row = await findSite(tx, scope);
    if (!row) throw notFound('There is no such site in this study.');
    const before = presentSite(row);
    if (before.version !== version) throw stale(await withLastChange(tx, studyId, before));
    await claimIdentity(tx, { studyId, wanted: patch, except: siteId });
    const figures = patchedFigures(before, patch);
    await checkFigures(tx, { studyId, after: figures, patch });
    const values = { ...columnsToWrite(patch), ...figures };
    const changes = differences(before, values);
    if (!changes) return { result: before, entries: [] };
    const written = await updateSite(tx, { ...scope, values });
    if (!written) throw notFound('There is no such site in this study.');
    const entry: RecordEntry = { object: 'site', objectId: siteId, action: 'change', ...changes };
    return { result: presentSite(written), entries: [entry] };
  });
}

async function withLastChange(tx: Db, studyId: string, site: Site): Promise<ChangedSite> {
  const last = await lastChangeOfSite(tx, { studyId, siteId: site.id });
  return { ...site, changedBy: last?.by ?? null, changedAt: last?.at.toISOString() ?? null };
}

/** The columns that are sent, without the figures. */
function columnsToWrite(patch: SitePatch): Partial<SiteFields> {
  const { version: _version, values: _values, particulars: _particulars, name, ...rest } = patch;
  const given = Object.fromEntries(Object.entries(rest).filter(([, value]) => value !== undefined));
  return { ...given, ...(name === undefined ? {} : { name, nameKey: foldName(name) }) };
}

/** The fields that differ, before and after; undefined where none does. The database keeps its own order of keys. */
function differences(before: Site, values: Partial<SiteFields>): { from: object; to: object } | undefined {
  const was = before as Record<string, unknown>;
  const changed = Object.entries(values).filter(
    ([key, value]) => key !== 'nameKey' && !isDeepStrictEqual(value, was[key]),
  );
  if (changed.length === 0) return undefined;
  return {
    from: Object.fromEntries(changed.map(([key]) => [key, was[key]])),
    to: Object.fromEntries(changed),
  };
}
