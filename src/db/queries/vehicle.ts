import { and, asc, count, desc, eq, ilike, isNull, or, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { libraryVehicle, studyVehicle } from '../schema/study.ts';
import { containing } from './study.ts';

const columns = {
  id: libraryVehicle.id,
  code: libraryVehicle.code,
  name: libraryVehicle.name,
  spec: libraryVehicle.spec,
  version: libraryVehicle.version,
  archivedAt: libraryVehicle.archivedAt,
  updatedAt: libraryVehicle.updatedAt,
};
export type LibraryVehicleRow = NonNullable<Awaited<ReturnType<typeof findLibraryVehicle>>>;
type Spec = Record<string, unknown>;

/** A page of the library, latest change first; archived vehicles only where they are asked for. */
export async function listLibraryVehicles(
  db: Db,
  options: { query: string; page: number; pageSize: number; archived: boolean },
) {
  const pattern = containing(options.query);
  const found = and(
    options.archived ? undefined : isNull(libraryVehicle.archivedAt),
    options.query ? or(ilike(libraryVehicle.name, pattern), ilike(libraryVehicle.code, pattern)) : undefined,
  );
  const rows = await db
    .select(columns)
    .from(libraryVehicle)
    .where(found)
    .orderBy(desc(libraryVehicle.updatedAt), asc(libraryVehicle.code))
    .limit(options.pageSize)
    .offset((options.page - 1) * options.pageSize);
  const [counted] = await db.select({ n: count() }).from(libraryVehicle).where(found);
  return { rows, total: counted?.n ?? 0 };
}

export async function findLibraryVehicle(db: Db, { vehicleId }: { vehicleId: string }) {
  const [row] = await db.select(columns).from(libraryVehicle).where(eq(libraryVehicle.id, vehicleId));
  return row;
}

/** The same, locked until the transaction ends. */
export async function lockLibraryVehicle(db: Db, { vehicleId }: { vehicleId: string }) {
  const [row] = await db
    .select(columns)
    .from(libraryVehicle)
    .where(eq(libraryVehicle.id, vehicleId))
    .for('update');
  return row;
}

export async function findLibraryVehicleByCode(db: Db, { code }: { code: string }) {
  const [row] = await db.select(columns).from(libraryVehicle).where(eq(libraryVehicle.code, code));
  return row;
}

export async function insertLibraryVehicle(db: Db, values: { code: string; name: string; spec: Spec }) {
  const [row] = await db.insert(libraryVehicle).values(values).returning(columns);
  if (!row) throw new Error('an insert returned no row');
  return row;
}

/** Writes a library vehicle and moves its version. */
export async function updateLibraryVehicle(
  db: Db,
  {
    vehicleId,
    values,
  }: {
    vehicleId: string;
    values: { code?: string; name?: string; spec?: Spec; archivedAt?: Date | null };
  },
) {
  const [row] = await db
    .update(libraryVehicle)
    .set({ ...values, version: sql`${libraryVehicle.version} + 1`, updatedAt: sql`now()` })
    .where(eq(libraryVehicle.id, vehicleId))
    .returning(columns);
  return row;
}

const studyColumns = {
  spec: studyVehicle.spec,
  libraryVehicleId: studyVehicle.libraryVehicleId,
  version: studyVehicle.version,
};

/** The one vehicle of a study, if it has been chosen. */
export async function findStudyVehicle(db: Db, { studyId }: { studyId: string }) {
  const [row] = await db.select(studyColumns).from(studyVehicle).where(eq(studyVehicle.studyId, studyId));
  return row;
}

/** Writes a study's vehicle whole, at the version given. */
export async function writeStudyVehicle(
  db: Db,
  values: { studyId: string; spec: Spec; libraryVehicleId: string | null; version: number },
) {
  const { studyId, ...set } = values;
  const [row] = await db
    .insert(studyVehicle)
    .values(values)
    .onConflictDoUpdate({ target: studyVehicle.studyId, set })
    .returning(studyColumns);
  if (!row) throw new Error(`the vehicle of ${studyId} was written and not returned`);
  return row;
}

export async function deleteStudyVehicle(db: Db, { studyId }: { studyId: string }): Promise<void> {
  await db.delete(studyVehicle).where(eq(studyVehicle.studyId, studyId));
}
