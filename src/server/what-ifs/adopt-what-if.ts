import { isDeepStrictEqual } from 'node:util';
import { statementNow } from '#contract/weighing.ts';
import type { WhatIf, WhatIfAdopted, WhatIfAdoption } from '#contract/what-if.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { listCriteria, updateCriterion, type CriterionRow } from '#db/queries/criterion.ts';
import { findSites, markSites, updateSite, type SiteRow } from '#db/queries/site.ts';
import { findWeights, writeWeights } from '#db/queries/weights.ts';
import { changeStudy, type RecordEntry, type StudyRow } from '#server/change-study.ts';
import { limitColumns, presentCriterion } from '#server/criteria/present.ts';
import { AppError, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentSite, recordedSite } from '#server/sites/present.ts';
import { presentWeights, readWeights } from '#server/weights/read-weights.ts';
import { readWeighed, type WeighedThings } from '#server/weights/read-weighed.ts';
import { recorded } from '#server/weights/save-weights.ts';
import { countGone, figureChanges, type Done } from './adoption.ts';
import { readWhatIf } from './read-what-ifs.ts';

interface AdoptionRequest {
  member: Member;
  whatIfId: string;
  /** The what-if's version that was looked at. */
  version: number;
  adoption: WhatIfAdoption;
}

/** One adoption under way: what it writes, and the lines of the record, each of which names the what-if. */
interface Adoption {
  tx: Db;
  member: Member;
  whatIf: WhatIf;
  reason: string;
  criteria: CriterionRow[];
  /** The sites it names that are in the study. */
  sites: SiteRow[];
  weighed: WeighedThings;
  entries: RecordEntry[];
  done: Done;
}

/**
 * Makes a what-if the study's own, in one transaction: weights set apart with the reason given, limits, entered
 * figures; sites left out are removed, and can be brought back as any removed site.
 * @throws AppError 'not-found' for another's private one · 'stale' where the what-if or the study's revision has moved
 *   since the choice · 'invalid' where nothing would change · those of changeStudy
 */
export async function adoptWhatIf(
  db: PooledDb,
  { member, whatIfId, version, adoption }: AdoptionRequest,
): Promise<WhatIfAdopted> {
  const { studyId, userId } = member;
  const { changes } = await readWhatIf(db, { studyId, userId, whatIfId });
  const weightsAlone =
    Object.keys(changes.limits).length + changes.figures.length + changes.leftOut.length === 0;
  return changeStudy(db, { member, kind: weightsAlone ? 'weights' : 'inputs' }, async (tx, row) => {
    const whatIf = await readWhatIf(tx, { studyId, userId, whatIfId });
    refuseStale(whatIf, row, { version, adoption });
    const run = await begin(tx, { member, whatIf, reason: adoption.reason });
    await writeLimits(run);
    await writeFigures(run);
    await removeLeftOut(run);
    await writeStudyWeights(run);
    if (run.entries.length === 0)
      throw new AppError('invalid', 'The study already is as this what-if has it. Nothing was changed.');
    const ignored = countGone(whatIf.changes, { ...run, names: run.weighed.names });
    const { name, by } = whatIf;
    const head: RecordEntry = {
      object: 'what-if',
      objectId: whatIf.id,
      action: 'adopt',
      to: { name, by: by.name, changes: whatIf.changes, reason: adoption.reason },
    };
    return { result: { ...run.done, ignored }, entries: [head, ...run.entries] };
  });
}

function refuseStale(
  whatIf: WhatIf,
  { revision }: StudyRow,
  { version, adoption }: Pick<AdoptionRequest, 'version' | 'adoption'>,
): void {
  if (whatIf.version !== version) throw stale(whatIf);
  if (revision !== adoption.revision)
    throw new AppError(
      'stale',
      `The study has moved on to revision ${revision}. Nothing was adopted; look at the what-if against it first.`,
      { current: { revision } },
    );
}

async function begin(tx: Db, given: Pick<Adoption, 'member' | 'whatIf' | 'reason'>): Promise<Adoption> {
  const { studyId } = given.member;
  const { figures, leftOut } = given.whatIf.changes;
  const siteIds = [...new Set([...leftOut, ...figures.map(({ siteId }) => siteId)])];
  return {
    ...given,
    tx,
    criteria: await listCriteria(tx, { studyId }),
    sites: await findSites(tx, { studyId, siteIds }),
    weighed: await readWeighed(tx, { studyId }),
    entries: [],
    done: { weights: false, limits: [], figures: [], dropped: [], removed: [] },
  };
}

async function writeLimits({ tx, member, whatIf, criteria, entries, done }: Adoption): Promise<void> {
  const { studyId } = member;
  for (const row of criteria) {
    const limit = whatIf.changes.limits[row.id];
    const before = presentCriterion(row);
    if (limit === undefined || row.source === 'text' || isDeepStrictEqual(limit, before.limit)) continue;
    await updateCriterion(tx, { studyId, criterionId: row.id, values: limitColumns(limit) });
    done.limits.push(row.id);
    const change = { from: { limit: before.limit }, to: { limit, whatIf: whatIf.name } };
    entries.push({ object: 'criterion', objectId: row.id, action: 'change', ...change });
  }
}

/** Figures of a site left out stay as they are: it comes back as it went. */
async function writeFigures({ tx, member, whatIf, criteria, sites, entries, done }: Adoption): Promise<void> {
  const { figures, leftOut } = whatIf.changes;
  for (const site of sites.filter(({ id }) => !leftOut.includes(id))) {
    const changed = figureChanges(site, figures, criteria);
    if (!changed) continue;
    const { criterionIds, dropped, from, to } = changed;
    await updateSite(tx, { studyId: member.studyId, siteId: site.id, values: to });
    done.figures.push(...criterionIds.map((criterionId) => ({ siteId: site.id, criterionId })));
    done.dropped.push(...dropped);
    const change = { from, to: { ...to, whatIf: whatIf.name } };
    entries.push({ object: 'site', objectId: site.id, action: 'change', ...change });
  }
}

async function removeLeftOut({ tx, member, whatIf, sites, entries, done }: Adoption): Promise<void> {
  const out = sites.filter(({ id }) => whatIf.changes.leftOut.includes(id));
  if (out.length === 0) return;
  const siteIds = out.map(({ id }) => id);
  await markSites(tx, { studyId: member.studyId, siteIds, removed: true });
  done.removed.push(...siteIds);
  for (const row of out) {
    const change = { from: recordedSite(presentSite(row)), to: { whatIf: whatIf.name } };
    entries.push({ object: 'site', objectId: row.id, action: 'remove', ...change });
  }
}

async function writeStudyWeights({
  tx,
  member,
  whatIf,
  reason,
  weighed,
  entries,
  done,
}: Adoption): Promise<void> {
  const said = whatIf.changes.weights;
  if (!said) return;
  const { studyId, userId } = member;
  const kept = await findWeights(tx, { studyId, userId: null });
  const before = await readWeights(tx, { studyId, userId, weights: 'study' });
  const { items } = weighed;
  const statement = statementNow(items, said);
  const { method, points, order, judgements } = before;
  if (kept && isDeepStrictEqual(statement, { method, points, order, judgements })) return;
  const origin = { kind: 'apart' as const, by: { userId, name: member.name } };
  const row = await writeWeights(tx, {
    studyId,
    userId: null,
    id: kept?.id ?? null,
    values: { ...statement, shared: false, origin, reason },
  });
  done.weights = true;
  const after = presentWeights({ weights: 'study', items, set: row, version: row.version });
  const line = recorded(before, after);
  entries.push({ ...line, objectId: row.id, to: { ...line.to, whatIf: whatIf.name } });
}
