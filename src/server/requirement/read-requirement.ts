import type { ListQuery } from '#contract/list.ts';
import type {
  LibraryVehicle,
  LibraryVehicleList,
  OrbitList,
  StudyOrbit,
  StudySettings,
  StudyVehicle,
} from '#contract/requirement.ts';
import type { Db } from '#db/client.ts';
import { findOrbit, listOrbits as listAllOrbits, searchOrbits } from '#db/queries/orbit.ts';
import { findStudy } from '#db/queries/study.ts';
import { findLibraryVehicle, findStudyVehicle, listLibraryVehicles } from '#db/queries/vehicle.ts';
import { notFound } from '#server/errors.ts';
import { presentLibraryVehicle, presentOrbit, presentSettings, presentVehicle } from './present.ts';

interface InStudy {
  studyId: string;
}

/** A page of the manifest, in its own order. */
export async function listOrbits(db: Db, query: InStudy & ListQuery): Promise<OrbitList> {
  const { rows, total } = await searchOrbits(db, query);
  return { items: rows.map(presentOrbit), total };
}

/** The whole manifest, in its own order. */
export async function readManifest(db: Db, { studyId }: InStudy): Promise<StudyOrbit[]> {
  return (await listAllOrbits(db, { studyId })).map(presentOrbit);
}

/** @throws AppError 'not-found' */
export async function readOrbit(db: Db, which: InStudy & { orbitId: string }): Promise<StudyOrbit> {
  const row = await findOrbit(db, which);
  if (!row) throw notFound('There is no such orbit in this study.');
  return presentOrbit(row);
}

/** The study's vehicle, or that there is none yet. */
export async function readVehicle(db: Db, { studyId }: InStudy): Promise<StudyVehicle> {
  return presentVehicle(await findStudyVehicle(db, { studyId }));
}

/** @throws AppError 'not-found' */
export async function readSettings(db: Db, { studyId }: InStudy): Promise<StudySettings> {
  const row = await findStudy(db, { studyId });
  if (!row) throw notFound();
  return presentSettings(row);
}

/** A page of the vehicles anyone may choose from. */
export async function listVehicles(db: Db, query: ListQuery): Promise<LibraryVehicleList> {
  const { rows, total } = await listLibraryVehicles(db, { ...query, archived: false });
  return { items: rows.map(presentLibraryVehicle), total };
}

/** A vehicle of the library that may still be chosen. @throws AppError 'not-found' */
export async function readLibraryVehicle(db: Db, vehicleId: string): Promise<LibraryVehicle> {
  const row = await findLibraryVehicle(db, { vehicleId });
  if (!row || row.archivedAt) throw notFound('There is no such vehicle in the library.');
  return presentLibraryVehicle(row);
}
