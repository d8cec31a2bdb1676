import { levelsOf, type Criterion, type CriterionInput } from '#contract/criterion.ts';
import { QUANTITIES, quantityName } from '#contract/quantity.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { findOrbitName, insertCriterion, listCriteria, type NewCriterion } from '#db/queries/criterion.ts';
import { changeStudy } from '#server/change-study.ts';
import { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { requireGroup } from './groups/name.ts';
import { freeNameKey } from './name.ts';
import { levelColumns, limitColumns, presentCriterion } from './present.ts';

/** A ranking of more criteria than this cannot be read, and its grid cannot be drawn. */
const MOST_CRITERIA = 100;

/** Adds a criterion after the last one. @throws AppError 'invalid' and those of changeStudy */
export async function addCriterion(
  db: PooledDb,
  { member, input }: { member: Member; input: CriterionInput },
): Promise<Criterion & { revision: number }> {
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const { studyId } = member;
    if ((await listCriteria(tx, { studyId })).length >= MOST_CRITERIA)
      throw new AppError('invalid', `A study has up to ${MOST_CRITERIA} criteria. Nothing was added.`);
    await requireGroup(tx, { studyId, groupId: input.groupId });
    const described = await describe(tx, studyId, input);
    const row = await insertCriterion(tx, {
      studyId,
      values: {
        ...described,
        nameKey: await freeNameKey(tx, { studyId, name: described.name }),
        ...levelColumns(levelsOf(input)),
        shape: input.shape,
        groupId: input.groupId,
        ...limitColumns(input.limit),
      },
    });
    const made = presentCriterion(row);
    return { result: made, entries: [{ object: 'criterion', objectId: row.id, action: 'add', to: made }] };
  });
}

type Described = Pick<
  NewCriterion,
  'name' | 'unit' | 'direction' | 'source' | 'quantity' | 'orbitId' | 'ratingSteps'
>;

async function describe(tx: Db, studyId: string, input: CriterionInput): Promise<Described> {
  if (input.source === 'rating')
    return {
      name: input.name,
      unit: '',
      direction: input.direction,
      source: 'rating',
      ratingSteps: input.steps,
    };
  if (input.source !== 'computed')
    return { name: input.name, unit: input.unit, direction: input.direction, source: input.source };
  const { quantity, orbitId } = input;
  const orbitName = orbitId === null ? null : await findOrbitName(tx, { studyId, orbitId });
  if (orbitName === undefined) {
    const message = 'This study has no such target orbit.';
    throw new AppError('invalid', message, { errors: [{ path: 'orbitId', message }] });
  }
  return {
    name: input.name ?? quantityName(quantity, orbitName),
    unit: QUANTITIES[quantity].unit,
    direction: input.direction ?? QUANTITIES[quantity].direction,
    source: 'computed',
    quantity,
    orbitId,
  };
}
