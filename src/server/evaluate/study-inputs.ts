import type { InputOrbit, StudyInputs } from '#contract/study-inputs.ts';
import { VehicleInput } from '#contract/vehicle.ts';
import type { PooledDb } from '#db/client.ts';
import { readStudyInputs, type selectStudyInputs } from '#db/queries/study-inputs.ts';
import { notFound } from '#server/errors.ts';

type Rows = NonNullable<Awaited<ReturnType<typeof selectStudyInputs>>>;

function presentOrbit(row: Rows['orbits'][number]): InputOrbit {
  return {
    orbitId: row.orbitId,
    code: row.code,
    name: row.name,
    perigeeKm: row.perigeeM / 1000,
    apogeeKm: row.apogeeM / 1000,
    parkingKm: row.parkingM / 1000,
    profile: row.profile,
    flightsPerYear: row.flightsPerYear,
    // The table's check keeps one of the two.
    ...(row.inclinationDeg === null ? { sunSynchronous: true } : { inclinationDeg: row.inclinationDeg }),
  };
}

/** Rows of a study's inputs as evaluate takes them. */
export function presentStudyInputs(rows: Rows): StudyInputs {
  return {
    revision: rows.revision,
    sites: rows.sites,
    orbits: rows.orbits.map(presentOrbit),
    // Kept as it was checked when it was saved; parsing fills in what a newer version made optional.
    vehicle: rows.vehicle ? VehicleInput.parse(rows.vehicle) : null,
    settings: { turnSpeedFraction: rows.turnSpeedFraction },
  };
}

/** What a study's flight figures follow from. @throws AppError 'not-found' */
export async function loadStudyInputs(db: PooledDb, studyId: string): Promise<StudyInputs> {
  const rows = await readStudyInputs(db, { studyId });
  if (!rows) throw notFound();
  return presentStudyInputs(rows);
}
