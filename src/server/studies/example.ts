import type { Db } from '#db/client.ts';
import type { StudyContents } from '#db/queries/contents.ts';
import { findLibraryVehicleByCode } from '#db/queries/vehicle.ts';
import { scenario } from '#seed/demo/scenario.ts';
import { LIBRARY_VEHICLES } from '#seed/library.ts';
import { scenarioContents } from './scenario-contents.ts';

/** The library's vehicle of that code as it is now, or as it was published where an administrator took it away. */
export async function scenarioVehicle(tx: Db, code: string): Promise<StudyContents['vehicle']> {
  const row = await findLibraryVehicleByCode(tx, { code });
  if (row && !row.archivedAt) return { spec: row.spec, libraryVehicleId: row.id };
  const published = LIBRARY_VEHICLES.find((entry) => entry.code === code);
  return published ? { spec: published.spec, libraryVehicleId: null } : null;
}

/** The contents of the example: the demo's first study. */
export async function exampleContents(tx: Db): Promise<StudyContents> {
  const [example] = scenario.studies;
  return scenarioContents(example, await scenarioVehicle(tx, example.vehicleCode)).contents;
}
