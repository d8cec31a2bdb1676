import { and, asc, eq, isNull } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { newId } from '../columns.ts';
import { criterion, weightSet } from '../schema/criterion.ts';
import { site } from '../schema/site.ts';
import { study, studyVehicle, targetOrbit } from '../schema/study.ts';

type Insert<T extends { $inferInsert: object }, Dropped extends string> = Omit<
  T['$inferInsert'],
  'id' | 'studyId' | 'position' | 'version' | Dropped
>;
type Spec = Record<string, unknown>;

/**
 * All that makes a study what it is, without its people and its history: what a copy takes and what a scenario
 * brings. Orbits and criteria go by keys of their own, which figures, points and computed criteria refer to.
 */
export interface StudyContents {
  head: { organisation: string; question: string; decideBy: string | null; turnSpeedFraction: number };
  vehicle: { spec: Spec; libraryVehicleId: string | null } | null;
  orbits: (Insert<typeof targetOrbit, never> & { key: string })[];
  criteria: (Insert<typeof criterion, 'orbitId'> & { key: string; orbitKey: string | null })[];
  /** `values` by criterion key. */
  sites: (Insert<typeof site, 'values' | 'uploadId' | 'createdAt' | 'updatedAt' | 'deletedAt'> & {
    values: Record<string, number | string>;
  })[];
  /** The study's weights by criterion key; null where none were ever set. */
  points: Record<string, number> | null;
}

/** A study's contents at one moment: its row is locked against changes until the transaction ends. */
export async function readContents(
  tx: Db,
  { studyId }: { studyId: string },
): Promise<StudyContents | undefined> {
  const [head] = await tx
    .select({
      organisation: study.organisation,
      question: study.question,
      decideBy: study.decideBy,
      turnSpeedFraction: study.turnSpeedFraction,
    })
    .from(study)
    .where(eq(study.id, studyId))
    .for('share');
  if (!head) return undefined;
  const [vehicle] = await tx
    .select({ spec: studyVehicle.spec, libraryVehicleId: studyVehicle.libraryVehicleId })
    .from(studyVehicle)
    .where(eq(studyVehicle.studyId, studyId));
  const [weights] = await tx
    .select({ points: weightSet.points })
    .from(weightSet)
    .where(and(eq(weightSet.studyId, studyId), isNull(weightSet.userId)));
  return {
    head,
    vehicle: vehicle ?? null,
    orbits: await readOrbits(tx, studyId),
    criteria: await readCriteria(tx, studyId),
    sites: await readSites(tx, studyId),
    points: weights?.points ?? null,
  };
}

function readOrbits(tx: Db, studyId: string): Promise<StudyContents['orbits']> {
  return tx
    .select({
      key: targetOrbit.id,
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
}

function readCriteria(tx: Db, studyId: string): Promise<StudyContents['criteria']> {
  return tx
    .select({
      key: criterion.id,
      orbitKey: criterion.orbitId,
      name: criterion.name,
      nameKey: criterion.nameKey,
      unit: criterion.unit,
      direction: criterion.direction,
      source: criterion.source,
      quantity: criterion.quantity,
      levelMode: criterion.levelMode,
      worst: criterion.worst,
      best: criterion.best,
      shape: criterion.shape,
      ratingSteps: criterion.ratingSteps,
      limitKind: criterion.limitKind,
      limitValue: criterion.limitValue,
    })
    .from(criterion)
    .where(eq(criterion.studyId, studyId))
    .orderBy(asc(criterion.position), asc(criterion.id));
}

function readSites(tx: Db, studyId: string): Promise<StudyContents['sites']> {
  return tx
    .select({
      code: site.code,
      name: site.name,
      nameKey: site.nameKey,
      latitudeDeg: site.latitudeDeg,
      longitudeDeg: site.longitudeDeg,
      elevationM: site.elevationM,
      permittedAzimuthsDeg: site.permittedAzimuthsDeg,
      notes: site.notes,
      values: site.values,
      particulars: site.particulars,
    })
    .from(site)
    .where(and(eq(site.studyId, studyId), isNull(site.deletedAt)))
    .orderBy(asc(site.createdAt), asc(site.id));
}

const ROWS_A_STATEMENT = 1_000;

/** New ids for keys; one that is not there was never a key of these contents. */
class Renamed {
  readonly #ids: Map<string, string>;
  constructor(keyed: readonly { key: string }[]) {
    this.#ids = new Map(keyed.map(({ key }) => [key, newId()]));
  }
  of(key: string): string {
    const id = this.#ids.get(key);
    if (id === undefined) throw new RangeError(`writeContents: nothing has the key ${key}`);
    return id;
  }
  /** A record's keys made ids; figures of criteria that are gone fall away. */
  record<V>(values: Readonly<Record<string, V>>): Record<string, V> {
    return Object.fromEntries(
      Object.entries(values).flatMap(([key, value]) => {
        const id = this.#ids.get(key);
        return id === undefined ? [] : [[id, value]];
      }),
    );
  }
}

/**
 * Fills an empty study with contents, in their order.
 * @returns how a criterion's key became its id, for whoever writes members' own weights
 */
export async function writeContents(
  tx: Db,
  { studyId, contents }: { studyId: string; contents: StudyContents },
): Promise<{ pointsByIds: (points: Record<string, number>) => Record<string, number> }> {
  const orbits = new Renamed(contents.orbits);
  const criteria = new Renamed(contents.criteria);
  await tx.update(study).set(contents.head).where(eq(study.id, studyId));
  if (contents.vehicle) await tx.insert(studyVehicle).values({ studyId, ...contents.vehicle });
  if (contents.orbits.length > 0)
    await tx.insert(targetOrbit).values(
      contents.orbits.map(({ key, ...values }, position) => ({
        ...values,
        id: orbits.of(key),
        studyId,
        position,
      })),
    );
  if (contents.criteria.length > 0)
    await tx.insert(criterion).values(
      contents.criteria.map(({ key, orbitKey, ...values }, position) => ({
        ...values,
        id: criteria.of(key),
        orbitId: orbitKey === null ? null : orbits.of(orbitKey),
        studyId,
        position,
      })),
    );
  for (let i = 0; i < contents.sites.length; i += ROWS_A_STATEMENT)
    await tx.insert(site).values(
      contents.sites.slice(i, i + ROWS_A_STATEMENT).map((row) => ({
        ...row,
        values: criteria.record(row.values),
        particulars: criteria.record(row.particulars ?? {}),
        studyId,
      })),
    );
  if (contents.points)
    await tx.insert(weightSet).values({ studyId, points: criteria.record(contents.points) });
  return { pointsByIds: (points) => criteria.record(points) };
}
