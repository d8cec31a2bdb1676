import { ASCENT_METHOD } from '#contract/ascent-job.ts';
import { type AscentPair, type AscentsAsked, type AscentsInput } from '#contract/study-ascents.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import type { VehicleInput } from '#contract/vehicle.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { assignAscents, insertAscents, lockAscents } from '#db/queries/ascent.ts';
import { writeRequests } from '#db/queries/ascent-request.ts';
import { findStudy } from '#db/queries/study.ts';
import { loadStudyInputs } from '#server/evaluate/study-inputs.ts';
import { AppError, notFound } from '#server/errors.ts';
import { liveJobs, sendLeased } from '#server/jobs/lease.ts';
import type { Member } from '#server/member.ts';
import { announceProgress } from './announce.ts';
import { batchesOf } from './batches.ts';
import { takeBackOutdated } from './cancel-ascents.ts';
import { vehicleHash, type PairTask } from './input-hash.ts';
import { obstacleOf, studyTasks } from './study-tasks.ts';

/** What a person asked for by name comes before whole studies. */
const PRIORITY = { named: 10, whole: 0 } as const;
/** Naming this many is asking for the whole study. */
const MOST_NAMED = 40;

/** @throws AppError 'not-found' · 'study-archived' · 'conflict' */
async function askableInputs(
  db: PooledDb,
  studyId: string,
): Promise<StudyInputs & { vehicle: VehicleInput }> {
  const [study, inputs] = await Promise.all([findStudy(db, { studyId }), loadStudyInputs(db, studyId)]);
  if (!study) throw notFound();
  if (study.archivedAt)
    throw new AppError('study-archived', 'The study is archived. Restore it before you fly it.');
  const { vehicle } = inputs;
  const obstacle = obstacleOf(inputs);
  if (obstacle !== null || !vehicle)
    throw new AppError('conflict', `${obstacle ?? ''} Nothing was asked for.`.trim());
  return { ...inputs, vehicle };
}

const keyOf = ({ siteId, orbitId }: AscentPair): string => `${siteId} ${orbitId}`;

/** The flights of the sites and orbits named. @throws AppError 'invalid' where one is not in the study */
function namedTasks(inputs: StudyInputs, pairs: readonly AscentPair[]): PairTask[] {
  const [siteIds, orbitIds] = [pairs.map(({ siteId }) => siteId), pairs.map(({ orbitId }) => orbitId)];
  const tasks = studyTasks({
    ...inputs,
    sites: inputs.sites.filter(({ siteId }) => siteIds.includes(siteId)),
    orbits: inputs.orbits.filter(({ orbitId }) => orbitIds.includes(orbitId)),
  });
  const known = new Map(tasks.map((task) => [keyOf(task), task]));
  return [...new Map(pairs.map((pair) => [keyOf(pair), pair])).values()].map((pair) => {
    const task = known.get(keyOf(pair));
    if (!task) throw new AppError('invalid', 'The study has no such site or orbit. Nothing was asked for.');
    return task;
  });
}

/** Which of some flights are done, and which no batch carries, or one that comes later than is asked for now. */
async function sortOut(tx: Db, hashes: readonly string[], priority: number) {
  const rows = await lockAscents(tx, { hashes });
  const batchIds = new Set(rows.flatMap(({ batchId }) => batchId ?? []));
  const live = await liveJobs(tx, 'ascents', [...batchIds]);
  const isCarried = ({ state, batchId }: (typeof rows)[number]): boolean =>
    (state === 'waiting' || state === 'flying') && live.has(batchId ?? '');
  const done = rows.filter(({ state }) => state === 'done');
  const uncarried = rows.filter(
    (row) =>
      row.state !== 'done' && (!isCarried(row) || (row.state === 'waiting' && row.priority < priority)),
  );
  const hashesOf = (some: typeof rows): Set<string> => new Set(some.map(({ hash }) => hash));
  return { done: hashesOf(done), uncarried: hashesOf(uncarried) };
}

/**
 * Asks for flown ascents: what is flown already for these very inputs, for whichever study, is not flown again, and
 * what is on its way is waited for.
 *
 * @throws AppError 'conflict' where the study cannot be flown · 'study-archived' · 'invalid'
 */
export async function askAscents(
  db: PooledDb,
  { member, input }: { member: Member; input: AscentsInput },
): Promise<AscentsAsked> {
  const { studyId, userId } = member;
  const inputs = await askableInputs(db, studyId);
  const tasks = input.pairs ? namedTasks(inputs, input.pairs) : studyTasks(inputs);
  const priority = input.pairs && input.pairs.length <= MOST_NAMED ? PRIORITY.named : PRIORITY.whole;
  const vehicle = vehicleHash(inputs.vehicle);
  return db.transaction(async (tx) => {
    const byHash = new Map(tasks.map((task) => [task.hash, task]));
    await insertAscents(tx, {
      vehicle: { hash: vehicle, vehicle: inputs.vehicle },
      rows: [...byHash].map(([hash, { task }]) => ({
        hash,
        vehicleHash: vehicle,
        task: { ...task },
        method: ASCENT_METHOD,
      })),
    });
    const { done, uncarried } = await sortOut(tx, [...byHash.keys()], priority);
    const batches = batchesOf([...byHash.values()].filter(({ hash }) => uncarried.has(hash)));
    await assignAscents(tx, { priority, batches });
    await writeRequests(tx, {
      studyId,
      userId,
      priority,
      requests: tasks.map(({ siteId, orbitId, hash }) => ({ siteId, orbitId, hash })),
    });
    await takeBackOutdated(tx, { studyId, tasks });
    await sendLeased(
      tx,
      'ascents',
      batches.map(({ id, hashes }) => ({ id, data: { hashes }, priority })),
    );
    await announceProgress(tx, [studyId]);
    const current = tasks.filter(({ hash }) => done.has(hash)).length;
    return { underWay: tasks.length - current, current };
  });
}
