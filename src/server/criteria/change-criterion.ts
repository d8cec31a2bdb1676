import { levelFault, type Criterion, type CriterionPatch } from '#contract/criterion.ts';
import type { Db, PooledDb } from '#db/client.ts';
import {
  findCriterion,
  listCriteria,
  placeCriterion,
  updateCriterion,
  type CriterionRow,
  type NewCriterion,
} from '#db/queries/criterion.ts';
import { changeStudy, type RecordEntry } from '#server/change-study.ts';
import { AppError, notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { requireGroup } from './groups/name.ts';
import { freeNameKey } from './name.ts';
import { levelColumns, limitColumns, presentCriterion } from './present.ts';

interface ChangeRequest {
  member: Member;
  criterionId: string;
  /** The version the change is based on. */
  version: number;
  patch: CriterionPatch;
}

/** Changes what is sent and moves the criterion where a position is sent. @throws AppError 'stale' · 'invalid' */
export async function changeCriterion(
  db: PooledDb,
  { member, criterionId, version, patch }: ChangeRequest,
): Promise<Criterion & { revision: number }> {
  const scope = { studyId: member.studyId, criterionId };
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const row = await findCriterion(tx, scope);
    if (!row) throw notFound('There is no such criterion in this study.');
    const before = presentCriterion(row);
    if (row.version !== version) throw stale(before);
    const values = await columnsToWrite(tx, row, patch);
    if (Object.keys(values).length > 0) await updateCriterion(tx, { ...scope, values });
    if (patch.position !== undefined) await move(tx, row, patch.position);
    const after = presentCriterion((await findCriterion(tx, scope)) ?? row);
    return { result: after, entries: entriesFor(before, after) };
  });
}

/** Refuses what goes with where a criterion's figures come from. @throws AppError 'invalid' */
function refuseFixed(row: CriterionRow, { unit, source, steps }: CriterionPatch): void {
  const keeps = row.source === 'computed' || row.source === 'rating';
  if (keeps && (unit !== undefined || source !== undefined)) {
    const kind = row.source === 'rating' ? 'rating' : 'computed criterion';
    throw new AppError('invalid', `A ${kind} keeps its unit and its source.`);
  }
  if (row.source === 'rating' || steps === undefined) return;
  const message = 'Only a rating has named steps.';
  throw new AppError('invalid', message, { errors: [{ path: 'steps', message }] });
}

async function columnsToWrite(
  tx: Db,
  row: CriterionRow,
  patch: CriterionPatch,
): Promise<Partial<NewCriterion>> {
  const { name, unit, direction, source, levels, shape, groupId, steps, limit } = patch;
  refuseFixed(row, patch);
  await requireGroup(tx, { studyId: row.studyId, groupId });
  const fault = levelFault(direction ?? row.direction, levels ?? presentCriterion(row).levels);
  if (fault) throw new AppError('invalid', fault, { errors: [{ path: 'levels.best', message: fault }] });
  return {
    ...(name === undefined
      ? {}
      : { name, nameKey: await freeNameKey(tx, { studyId: row.studyId, name, except: row.id }) }),
    ...(unit === undefined ? {} : { unit }),
    ...(direction === undefined ? {} : { direction }),
    ...(source === undefined ? {} : { source }),
    ...(levels === undefined ? {} : levelColumns(levels)),
    ...(shape === undefined ? {} : { shape }),
    ...(groupId === undefined ? {} : { groupId }),
    ...(steps === undefined ? {} : { ratingSteps: steps }),
    ...(limit === undefined ? {} : limitColumns(limit)),
  };
}

/** Positions stay 0, 1, 2 … without gaps; a position past the end is the end. */
async function move(tx: Db, { id, studyId }: CriterionRow, position: number): Promise<void> {
  const others = (await listCriteria(tx, { studyId })).map((row) => row.id).filter((other) => other !== id);
  const order = [...others.slice(0, position), id, ...others.slice(position)];
  for (const [place, criterionId] of order.entries()) {
    await placeCriterion(tx, { studyId, criterionId, position: place });
  }
}

function entriesFor(from: Criterion, to: Criterion): RecordEntry[] {
  const same = JSON.stringify({ ...from, version: to.version }) === JSON.stringify(to);
  return same ? [] : [{ object: 'criterion', objectId: to.id, action: 'change', from, to }];
}
