import { and, asc, count, eq, ilike, or, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { criterion } from '../schema/criterion.ts';
import { targetOrbit } from '../schema/study.ts';
import { containing } from './study.ts';

const columns = {
  id: targetOrbit.id,
  position: targetOrbit.position,
  code: targetOrbit.code,
  name: targetOrbit.name,
  perigeeM: targetOrbit.perigeeM,
  apogeeM: targetOrbit.apogeeM,
  inclinationDeg: targetOrbit.inclinationDeg,
  sunSynchronous: targetOrbit.sunSynchronous,
  profile: targetOrbit.profile,
  parkingM: targetOrbit.parkingM,
  flightsPerYear: targetOrbit.flightsPerYear,
  version: targetOrbit.version,
};
export type OrbitRow = Awaited<ReturnType<typeof listOrbits>>[number];
export type OrbitValues = Omit<OrbitRow, 'id' | 'version' | 'position'>;

interface InStudy {
  studyId: string;
}
interface OneOrbit extends InStudy {
  orbitId: string;
}

const one = ({ studyId, orbitId }: OneOrbit) =>
  and(eq(targetOrbit.studyId, studyId), eq(targetOrbit.id, orbitId));

/** A study's target orbits in the order of the manifest. */
export function listOrbits(db: Db, { studyId }: InStudy) {
  return db
    .select(columns)
    .from(targetOrbit)
    .where(eq(targetOrbit.studyId, studyId))
    .orderBy(asc(targetOrbit.position), asc(targetOrbit.id));
}

/** A page of them, and how many match. */
export async function searchOrbits(
  db: Db,
  { studyId, query, page, pageSize }: InStudy & { query: string; page: number; pageSize: number },
) {
  const pattern = containing(query);
  const found = and(
    eq(targetOrbit.studyId, studyId),
    query ? or(ilike(targetOrbit.code, pattern), ilike(targetOrbit.name, pattern)) : undefined,
  );
  const rows = await db
    .select(columns)
    .from(targetOrbit)
    .where(found)
    .orderBy(asc(targetOrbit.position), asc(targetOrbit.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [counted] = await db.select({ n: count() }).from(targetOrbit).where(found);
  return { rows, total: counted?.n ?? 0 };
}

export async function findOrbit(db: Db, which: OneOrbit): Promise<OrbitRow | undefined> {
  const [row] = await db.select(columns).from(targetOrbit).where(one(which));
  return row;
}

export async function insertOrbit(
  db: Db,
  { studyId, position, values }: InStudy & { position: number; values: OrbitValues },
): Promise<OrbitRow> {
  const [row] = await db
    .insert(targetOrbit)
    .values({ studyId, position, ...values })
    .returning(columns);
  if (!row) throw new Error('an insert returned no row');
  return row;
}

/** Writes an orbit and moves its version. */
export async function updateOrbit(
  db: Db,
  { values, ...which }: OneOrbit & { values: OrbitValues },
): Promise<OrbitRow | undefined> {
  const [row] = await db
    .update(targetOrbit)
    .set({ ...values, version: sql`${targetOrbit.version} + 1` })
    .where(one(which))
    .returning(columns);
  return row;
}

/** Puts one orbit in its place; versions stay, so that a reorder makes nobody's edit stale. */
export async function placeOrbit(
  db: Db,
  { position, ...which }: OneOrbit & { position: number },
): Promise<void> {
  await db.update(targetOrbit).set({ position }).where(one(which));
}

export async function deleteOrbit(db: Db, which: OneOrbit): Promise<void> {
  await db.delete(targetOrbit).where(one(which));
}

/** Names of the computed criteria that are worked out for an orbit. */
export async function listCriteriaOfOrbit(db: Db, { studyId, orbitId }: OneOrbit): Promise<string[]> {
  const rows = await db
    .select({ name: criterion.name })
    .from(criterion)
    .where(and(eq(criterion.studyId, studyId), eq(criterion.orbitId, orbitId)))
    .orderBy(asc(criterion.position));
  return rows.map(({ name }) => name);
}
