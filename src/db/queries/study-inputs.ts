import { and, asc, eq, isNull } from 'drizzle-orm';
import { site } from '../schema/site.ts';
import { study, studyVehicle, targetOrbit } from '../schema/study.ts';
import type { Db, PooledDb } from '../client.ts';

/** Reads in one transaction that sees one moment: a change committed between two reads is not half seen. */
export function inOneMoment<T>(db: PooledDb, read: (tx: Db) => Promise<T>): Promise<T> {
  return db.transaction(read, { isolationLevel: 'repeatable read', accessMode: 'read only' });
}

/** A study's inputs as rows. Call it within `inOneMoment`, or use `readStudyInputs`. */
export async function selectStudyInputs(tx: Db, { studyId }: { studyId: string }) {
  const [head] = await tx
    .select({
      revision: study.revision,
      turnSpeedFraction: study.turnSpeedFraction,
      losses: study.losses,
    })
    .from(study)
    .where(eq(study.id, studyId));
  if (!head) return undefined;
  const sites = await tx
    .select({
      siteId: site.id,
      code: site.code,
      name: site.name,
      latitudeDeg: site.latitudeDeg,
      longitudeDeg: site.longitudeDeg,
      elevationM: site.elevationM,
      permittedAzimuthsDeg: site.permittedAzimuthsDeg,
    })
    .from(site)
    .where(and(eq(site.studyId, studyId), isNull(site.deletedAt)))
    .orderBy(asc(site.createdAt), asc(site.id));
  const orbits = await tx
    .select({
      orbitId: targetOrbit.id,
      code: targetOrbit.code,
      name: targetOrbit.name,
      perigeeM: targetOrbit.perigeeM,
      apogeeM: targetOrbit.apogeeM,
      inclinationDeg: targetOrbit.inclinationDeg,
      sunSynchronous: targetOrbit.sunSynchronous,
      profile: targetOrbit.profile,
      parkingM: targetOrbit.parkingM,
      flightsPerYear: targetOrbit.flightsPerYear,
    })
    .from(targetOrbit)
    .where(eq(targetOrbit.studyId, studyId))
    .orderBy(asc(targetOrbit.position), asc(targetOrbit.id));
  const [vehicle] = await tx
    .select({ spec: studyVehicle.spec })
    .from(studyVehicle)
    .where(eq(studyVehicle.studyId, studyId));
  return { ...head, sites, orbits, vehicle: vehicle?.spec };
}

/** A study's inputs as rows, all of one moment. */
export function readStudyInputs(db: PooledDb, { studyId }: { studyId: string }) {
  return inOneMoment(db, (tx) => selectStudyInputs(tx, { studyId }));
}
