import { and, asc, eq, isNull } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { newId } from '../columns.ts';
import { criterion, criterionGroup, weightSet } from '../schema/criterion.ts';
import { site } from '../schema/site.ts';
import { study, studyVehicle, targetOrbit } from '../schema/study.ts';

type Insert<T extends { $inferInsert: object }, Dropped extends string> = Omit<
  T['$inferInsert'],
  'id' | 'studyId' | 'position' | 'version' | Dropped
>;
type Spec = Record<string, unknown>;

/** What a set of weights says, by keys or ids of criteria and groups. */
export interface WeightSaying {
  method: (typeof weightSet.$inferSelect)['method'];
  points: Record<string, number>;
  order: string[];
  judgements: [string, string, number][];
}

/**
 * All that makes a study what it is, without its people and its history: what a copy takes and what a scenario
 * brings. Orbits, groups and criteria go by keys of their own, which figures, weights and computed criteria refer to.
 */
export interface StudyContents {
  head: Required<
    Pick<typeof study.$inferInsert, 'organisation' | 'question' | 'turnSpeedFraction' | 'losses'>
  > & { decideBy: string | null };
  vehicle: { spec: Spec; libraryVehicleId: string | null } | null;
  orbits: (Insert<typeof targetOrbit, never> & { key: string })[];
  groups: (Insert<typeof criterionGroup, never> & { key: string })[];
  criteria: (Insert<typeof criterion, 'orbitId' | 'groupId'> & {
    key: string;
    orbitKey: string | null;
    groupKey: string | null;
  })[];
  /** `values` and `particulars` by criterion key. */
  sites: (Insert<typeof site, 'values' | 'uploadId' | 'createdAt' | 'updatedAt' | 'deletedAt'> & {
    values: Record<string, number | string>;
  })[];
  /** The study's weights by criterion and group key; null where none were ever set. */
  weights: WeightSaying | null;
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
      losses: study.losses,
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
    .select({
      method: weightSet.method,
      points: weightSet.points,
      order: weightSet.order,
      judgements: weightSet.judgements,
    })
    .from(weightSet)
    .where(and(eq(weightSet.studyId, studyId), isNull(weightSet.userId)));
  return {
    head,
    vehicle: vehicle ?? null,
    orbits: await readOrbits(tx, studyId),
    groups: await readGroups(tx, studyId),
    criteria: await readCriteria(tx, studyId),
    sites: await readSites(tx, studyId),
    weights: weights ?? null,
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

function readGroups(tx: Db, studyId: string): Promise<StudyContents['groups']> {
  return tx
    .select({ key: criterionGroup.id, name: criterionGroup.name, nameKey: criterionGroup.nameKey })
    .from(criterionGroup)
    .where(eq(criterionGroup.studyId, studyId))
    .orderBy(asc(criterionGroup.id));
}

function readCriteria(tx: Db, studyId: string): Promise<StudyContents['criteria']> {
  return tx
    .select({
      key: criterion.id,
      orbitKey: criterion.orbitId,
      groupKey: criterion.groupId,
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
  /** The same where there may be no key. */
  orNull(key: string | null): string | null {
    return key === null ? null : this.of(key);
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
  /**
   * What a set of weights says, by ids; what it says of criteria and groups that are gone falls away. A judgement
   * against one that is gone stays, since it still says that the other has been judged.
   */
  saying({ method, points, order, judgements }: WeightSaying): WeightSaying {
    const ids = this.#ids;
    return {
      method,
      points: this.record(points),
      order: order.flatMap((key) => ids.get(key) ?? []),
      judgements: judgements.flatMap(([a, b, times]): WeightSaying['judgements'] => {
        return ids.has(a) || ids.has(b) ? [[ids.get(a) ?? a, ids.get(b) ?? b, times]] : [];
      }),
    };
  }
}

/**
 * Fills an empty study with contents, in their order.
 * @returns how keys of criteria and groups became ids, for whoever writes members' own weights
 */
export async function writeContents(
  tx: Db,
  { studyId, contents }: { studyId: string; contents: StudyContents },
): Promise<{ weightsByIds: (weights: WeightSaying) => WeightSaying }> {
  const orbits = new Renamed(contents.orbits);
  const weighed = new Renamed([...contents.criteria, ...contents.groups]);
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
  if (contents.groups.length > 0)
    await tx
      .insert(criterionGroup)
      .values(contents.groups.map(({ key, ...values }) => ({ ...values, id: weighed.of(key), studyId })));
  if (contents.criteria.length > 0)
    await tx.insert(criterion).values(
      contents.criteria.map(({ key, orbitKey, groupKey, ...values }, position) => ({
        ...values,
        id: weighed.of(key),
        orbitId: orbits.orNull(orbitKey),
        groupId: weighed.orNull(groupKey),
        studyId,
        position,
      })),
    );
  for (let i = 0; i < contents.sites.length; i += ROWS_A_STATEMENT)
    await tx.insert(site).values(
      contents.sites.slice(i, i + ROWS_A_STATEMENT).map((row) => ({
        ...row,
        values: weighed.record(row.values),
        particulars: weighed.record(row.particulars ?? {}),
        studyId,
      })),
    );
  if (contents.weights) await tx.insert(weightSet).values({ studyId, ...weighed.saying(contents.weights) });
  return { weightsByIds: (weights) => weighed.saying(weights) };
}
