import { listInWords } from '#contract/format.ts';
import type { PooledDb } from '#db/client.ts';
import { deleteOrbit, findOrbit, listCriteriaOfOrbit } from '#db/queries/orbit.ts';
import { changeStudy, type Saved } from '#server/change-study.ts';
import { AppError, notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { closeGaps } from './place.ts';
import { presentOrbit } from './present.ts';

interface RemoveRequest {
  member: Member;
  orbitId: string;
  /** The version the removal is based on. */
  version: number;
}

/**
 * Takes an orbit out of the manifest. One that a computed criterion is worked out for stays: the criterion, its limit
 * and everyone's points for it would go too, which is more than was asked for.
 * @throws AppError 'stale' · 'conflict' with the criteria that hold it
 */
export async function removeOrbit(db: PooledDb, { member, orbitId, version }: RemoveRequest): Promise<Saved> {
  const scope = { studyId: member.studyId, orbitId };
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const row = await findOrbit(tx, scope);
    if (!row) throw notFound('There is no such orbit in this study.');
    const before = presentOrbit(row);
    if (row.version !== version) throw stale(before);
    const criteria = await listCriteriaOfOrbit(tx, scope);
    if (criteria.length > 0)
      throw new AppError(
        'conflict',
        `${row.name || row.code} stays: ${listInWords(criteria)} ${criteria.length === 1 ? 'is' : 'are'} ` +
          'worked out for it. Remove that from the criteria first.',
        { current: { criteria } },
      );
    await deleteOrbit(tx, scope);
    await closeGaps(tx, scope);
    return {
      result: {},
      entries: [{ object: 'orbit', objectId: orbitId, action: 'remove', from: before }],
    };
  });
}
