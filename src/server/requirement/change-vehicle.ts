import type { StudyVehicle, StudyVehicleInput } from '#contract/requirement.ts';
import type { Db, PooledDb } from '#db/client.ts';
import {
  deleteStudyVehicle,
  findLibraryVehicle,
  findStudyVehicle,
  writeStudyVehicle,
} from '#db/queries/vehicle.ts';
import { changeStudy, type Saved } from '#server/change-study.ts';
import { AppError, notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentVehicle } from './present.ts';

type Chosen = { spec: Record<string, unknown>; libraryVehicleId: string | null };

async function chosen(tx: Db, input: StudyVehicleInput): Promise<Chosen> {
  const { vehicle, libraryVehicleId } = input;
  if (vehicle) return { spec: vehicle, libraryVehicleId: null };
  const row = libraryVehicleId && (await findLibraryVehicle(tx, { vehicleId: libraryVehicleId }));
  if (row && !row.archivedAt) return { spec: row.spec, libraryVehicleId: row.id };
  const message = 'There is no such vehicle in the library.';
  throw new AppError('invalid', message, { errors: [{ path: 'libraryVehicleId', message }] });
}

interface PutRequest {
  member: Member;
  /** The version the choice is based on; undefined where the study has no vehicle yet. */
  version: number | undefined;
  input: StudyVehicleInput;
}

/**
 * Gives the study its vehicle: a copy of one from the library, or one entered. @throws AppError 'stale' ·
 * 'version-required' where there is a vehicle already and no version was sent
 */
export async function putVehicle(
  db: PooledDb,
  { member, version, input }: PutRequest,
): Promise<StudyVehicle & Saved> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx, study) => {
    const kept = await findStudyVehicle(tx, { studyId });
    const before = presentVehicle(kept);
    if (kept && version === undefined)
      throw new AppError(
        'version-required',
        'The study has a vehicle. Say which version this change is based on.',
      );
    if (version !== undefined && version !== before.version) throw stale(before);
    // A first version is numbered after the revision, so that a removed vehicle's versions never come again.
    const next = { ...(await chosen(tx, input)), version: (kept?.version ?? study.revision) + 1 };
    if (sameVehicle(before, presentVehicle(next))) return { result: before, entries: [] };
    const after = presentVehicle(await writeStudyVehicle(tx, { studyId, ...next }));
    return {
      result: after,
      entries: [
        {
          object: 'vehicle',
          objectId: studyId,
          action: kept ? 'change' : 'add',
          from: kept ? recorded(before) : null,
          to: recorded(after),
        },
      ],
    };
  });
}

const recorded = ({ vehicle, libraryVehicleId }: StudyVehicle) => ({ vehicle, libraryVehicleId });

/** Parsed by one schema, so equal vehicles have their fields in one order. */
const sameVehicle = (a: StudyVehicle, b: StudyVehicle): boolean =>
  JSON.stringify(recorded(a)) === JSON.stringify(recorded(b));

/** Leaves the study without a vehicle, and so without payloads. @throws AppError 'stale' · 'not-found' */
export async function removeVehicle(
  db: PooledDb,
  { member, version }: { member: Member; version: number },
): Promise<StudyVehicle & Saved> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const kept = await findStudyVehicle(tx, { studyId });
    if (!kept) throw notFound('The study has no vehicle.');
    const before = presentVehicle(kept);
    if (version !== before.version) throw stale(before);
    await deleteStudyVehicle(tx, { studyId });
    return {
      result: presentVehicle(undefined),
      entries: [{ object: 'vehicle', objectId: studyId, action: 'remove', from: recorded(before) }],
    };
  });
}
