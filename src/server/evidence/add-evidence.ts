import { createHash } from 'node:crypto';
import { MOST_FILES, type SavedEvidence } from '#contract/evidence.ts';
import { formatNumber } from '#contract/format.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { findCriterion } from '#db/queries/criterion.ts';
import { countFilesOf, insertEvidence } from '#db/queries/evidence.ts';
import { findSite } from '#db/queries/site.ts';
import { changeStudy } from '#server/change-study.ts';
import { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentEvidence, recordedEvidence } from './present.ts';
import type { PostedEvidence } from './read-form.ts';

/**
 * Keeps a file beside an entered figure of the study.
 * @throws AppError 'invalid' where there is no such figure, or it has as many files as one may have
 */
export async function addEvidence(
  db: PooledDb,
  { member, posted }: { member: Member; posted: PostedEvidence },
): Promise<SavedEvidence> {
  const { studyId, userId, name } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    await requireFigure(tx, studyId, posted);
    const sha256 = createHash('sha256').update(posted.bytes).digest('hex');
    const values = { ...posted, bytes: Buffer.from(posted.bytes), sha256, createdBy: userId };
    const row = await insertEvidence(tx, { studyId, values });
    const made = presentEvidence({ ...row, by: name });
    const entry = { object: 'evidence', objectId: made.id, action: 'add', to: recordedEvidence(made) };
    return { result: made, entries: [entry] };
  });
}

async function requireFigure(
  tx: Db,
  studyId: string,
  { siteId, criterionId }: PostedEvidence,
): Promise<void> {
  const refuse = (path: string, message: string): never => {
    throw new AppError('invalid', `${message} Nothing was kept.`, { errors: [{ path, message }] });
  };
  const site = await findSite(tx, { studyId, siteId });
  if (!site) return refuse('siteId', 'There is no such site in this study.');
  const criterion = await findCriterion(tx, { studyId, criterionId });
  if (!criterion) return refuse('criterionId', 'There is no such criterion in this study.');
  if (criterion.source !== 'entered' && criterion.source !== 'rating')
    return refuse('criterionId', `${criterion.name} takes no entered figure, so no evidence for one.`);
  if (typeof site.values[criterionId] !== 'number')
    return refuse('criterionId', `${site.name} has no figure under ${criterion.name} yet.`);
  if ((await countFilesOf(tx, { studyId, siteId, criterionId })) >= MOST_FILES)
    return refuse('file', `A figure has up to ${formatNumber(MOST_FILES)} files.`);
}
