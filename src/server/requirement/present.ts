import type { LibraryVehicle, StudyOrbit, StudySettings, StudyVehicle } from '#contract/requirement.ts';
import { VehicleInput } from '#contract/vehicle.ts';
import type { OrbitRow } from '#db/queries/orbit.ts';
import type { StudyRow } from '#server/change-study.ts';
import type { findStudyVehicle, LibraryVehicleRow } from '#db/queries/vehicle.ts';

/** An orbit as the interface names it: altitudes in kilometres over the equatorial radius. */
export function presentOrbit(row: OrbitRow): StudyOrbit {
  return {
    id: row.id,
    position: row.position,
    code: row.code,
    name: row.name,
    perigeeKm: row.perigeeM / 1000,
    apogeeKm: row.apogeeM / 1000,
    inclinationDeg: row.inclinationDeg,
    sunSynchronous: row.sunSynchronous,
    profile: row.profile,
    parkingKm: row.parkingM / 1000,
    flightsPerYear: row.flightsPerYear,
    version: row.version,
  };
}

/** A study's vehicle; version 0 where none was chosen yet. Parsing fills in what a newer schema made optional. */
export function presentVehicle(row: Awaited<ReturnType<typeof findStudyVehicle>>): StudyVehicle {
  if (!row) return { vehicle: null, libraryVehicleId: null, version: 0 };
  return {
    vehicle: VehicleInput.parse(row.spec),
    libraryVehicleId: row.libraryVehicleId,
    version: row.version,
  };
}

/** A study's settings, with the version of the settings. */
export function presentSettings(
  row: Pick<StudyRow, 'turnSpeedFraction' | 'losses' | 'settingsVersion'>,
): StudySettings {
  return { turnSpeedFraction: row.turnSpeedFraction, losses: row.losses, version: row.settingsVersion };
}

export function presentLibraryVehicle(row: LibraryVehicleRow): LibraryVehicle {
  return {
    id: row.id,
    code: row.code,
    name: row.name,
    vehicle: VehicleInput.parse(row.spec),
    archived: row.archivedAt !== null,
    version: row.version,
    updatedAt: row.updatedAt.toISOString(),
  };
}
