import { CorridorInput } from '#contract/corridor.ts';
import type { FanQuery, StudyCorridorQuery, SurroundingsQuery } from '#contract/downrange.ts';
import type { InputSite, StudyInputs } from '#contract/study-inputs.ts';
import { classOfStudyVehicle } from '#contract/vehicle-class.ts';
import { NAUTICAL_MILE, type VehicleClass } from '#core/downrange/index.ts';
import type { PooledDb } from '#db/client.ts';
import { AppError, notFound } from '#server/errors.ts';
import { loadStudyInputs } from '#server/evaluate/study-inputs.ts';
import type { DownrangeTask } from './tasks.ts';

/** A study's site and what goes with it. @throws AppError 'not-found' for a site of no or another study */
async function siteOf(
  db: PooledDb,
  { studyId, siteId }: { studyId: string; siteId: string },
): Promise<{ inputs: StudyInputs; site: InputSite }> {
  const inputs = await loadStudyInputs(db, studyId);
  const site = inputs.sites.find((one) => one.siteId === siteId);
  if (!site) throw notFound('There is no such site in this study.');
  return { inputs, site };
}

/** The class asked for, else the study's vehicle's. @throws AppError 'invalid' where there is neither */
function classOf(asked: VehicleClass | undefined, inputs: StudyInputs): VehicleClass {
  const found = asked ?? classOfStudyVehicle(inputs)?.vehicleClass;
  if (found) return found;
  const message = inputs.vehicle
    ? 'The study’s vehicle falls short of the orbits that the table asks about: name a class.'
    : 'The study has no vehicle: name a class.';
  throw new AppError('invalid', 'The vehicle class is not known. Nothing was worked out.', {
    errors: [{ path: 'vehicleClass', message }],
  });
}

const placeOf = ({ latitudeDeg, longitudeDeg }: InputSite) => ({ latitudeDeg, longitudeDeg });
const densityOf = ({ spreadPeople, placeDensityPerKm2 }: SurroundingsQuery): number | null =>
  spreadPeople === 'true' ? placeDensityPerKm2 : null;

interface Asked<Query> {
  studyId: string;
  query: Query;
}

/** @throws AppError 'not-found' · 'invalid' */
export async function fanTask(db: PooledDb, { studyId, query }: Asked<FanQuery>): Promise<DownrangeTask> {
  const { siteId, rangeKm } = query;
  const { inputs, site } = await siteOf(db, { studyId, siteId });
  return {
    kind: 'fan',
    siteId,
    start: placeOf(site),
    placeDensityPerKm2: densityOf(query),
    vehicleClass: classOf(query.vehicleClass, inputs),
    rangeKm,
  };
}

/** @throws AppError 'not-found' · 'invalid' */
export async function corridorTask(
  db: PooledDb,
  { studyId, query }: Asked<StudyCorridorQuery>,
): Promise<DownrangeTask & { kind: 'corridor' }> {
  const { siteId, azimuthDeg, rangeKm, casualtyAreasMi2 } = query;
  const { inputs, site } = await siteOf(db, { studyId, siteId });
  const input = CorridorInput.parse({
    ...placeOf(site),
    azimuthDeg,
    vehicleClass: classOf(query.vehicleClass, inputs),
    rangeNm: (rangeKm * 1000) / NAUTICAL_MILE,
    settings: {
      spreadPeople: query.spreadPeople === 'true',
      placeDensityPerKm2: query.placeDensityPerKm2,
      ...(casualtyAreasMi2 ? { casualtyAreasMi2 } : {}),
    },
  });
  return { kind: 'corridor', siteId, siteCode: site.code, input };
}

/** @throws AppError 'not-found' */
export async function surroundingsTask(
  db: PooledDb,
  { studyId, query }: Asked<SurroundingsQuery>,
): Promise<DownrangeTask> {
  const { siteId } = query;
  const { inputs, site } = await siteOf(db, { studyId, siteId });
  const others = inputs.sites
    .filter((one) => one.siteId !== siteId)
    .map((one) => ({ siteId: one.siteId, code: one.code, name: one.name, ...placeOf(one) }));
  return { kind: 'surroundings', siteId, start: placeOf(site), placeDensityPerKm2: densityOf(query), others };
}
