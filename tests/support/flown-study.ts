import { OrbitInput } from '#contract/requirement.ts';
import { VehicleInput } from '#contract/vehicle.ts';
import type { PooledDb } from '#db/client.ts';
import { newId } from '#db/columns.ts';
import { site } from '#db/schema/site.ts';
import type { Member } from '#server/member.ts';
import { addOrbit } from '#server/requirement/add-orbit.ts';
import { putVehicle } from '#server/requirement/change-vehicle.ts';
import { studyWith } from './study.ts';

/** A vehicle that says what a flown ascent needs. */
export const flownVehicle = VehicleInput.parse({
  name: 'Trial lifter',
  lossesMps: { gravity: 1300, drag: 100, steering: 40 },
  stages: [
    { dryKg: 810, propellantKg: 8200, thrustVacKn: 184, ispVacS: 309, ispSeaLevelS: 281 },
    { dryKg: 198, propellantKg: 1850, thrustVacKn: 21.5, ispVacS: 342 },
  ],
  ascent: { referenceAreaM2: 1.33, dragCoefficient: 0.42, verticalRiseS: 8, kickS: 8 },
});

export interface FlownStudy {
  member: Member;
  siteIds: string[];
  orbitIds: string[];
}

/** A study that can be flown: sites at the latitudes given, and orbits of the inclinations given. */
export async function flownStudy(
  db: PooledDb,
  { latitudesDeg, inclinationsDeg = [51.6] }: { latitudesDeg: number[]; inclinationsDeg?: number[] },
): Promise<FlownStudy> {
  const member = await studyWith(db, 'lead');
  const { studyId } = member;
  const orbitIds: string[] = [];
  for (const inclinationDeg of inclinationsDeg) {
    const input = OrbitInput.parse({ perigeeKm: 500, apogeeKm: 500, inclinationDeg });
    orbitIds.push((await addOrbit(db, { member, input })).id);
  }
  await putVehicle(db, { member, version: undefined, input: { vehicle: flownVehicle } });
  const siteIds = latitudesDeg.map(newId);
  const rows = latitudesDeg.map((latitudeDeg, i) => ({
    id: siteIds[i],
    studyId,
    code: `S${i}`,
    name: `Site ${i}`,
    nameKey: `site ${i}`,
    latitudeDeg,
    longitudeDeg: 10,
  }));
  await db.insert(site).values(rows);
  return { member, siteIds, orbitIds };
}
