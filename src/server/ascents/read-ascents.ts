import { promisify } from 'node:util';
import { gunzip } from 'node:zlib';
import type { TrajectoryPoint } from '#contract/ascent.ts';
import { AscentFigures } from '#contract/ascent-job.ts';
import type {
  AscentStateName,
  AscentPair,
  AscentsQuery,
  StudyAscent,
  StudyAscentDetail,
  StudyAscents,
} from '#contract/study-ascents.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import type { PooledDb } from '#db/client.ts';
import { findAscents, findTrajectory, queueAhead } from '#db/queries/ascent.ts';
import { listLastResults, listRequests } from '#db/queries/ascent-request.ts';
import { findStudy } from '#db/queries/study.ts';
import { loadStudyInputs } from '#server/evaluate/study-inputs.ts';
import { notFound } from '#server/errors.ts';
import { narrowed, obstacleOf, studyTasks } from './study-tasks.ts';

type Flight = Awaited<ReturnType<typeof findAscents>>[number];
type Asked = Awaited<ReturnType<typeof listRequests>>[number];
type Result = Awaited<ReturnType<typeof listLastResults>>[number];

const keyOf = ({ siteId, orbitId }: AscentPair): string => `${siteId} ${orbitId}`;

/** What is known of one site and orbit. */
interface Known {
  /** The flight of what the study holds now, if anyone ever asked for it. */
  flight: Flight | undefined;
  /** That this study asked for that flight. */
  asked: Asked | undefined;
  /** The last result of whatever inputs. */
  last: Result | undefined;
}

function stateOf({ flight, asked, last }: Known): AscentStateName {
  if (flight?.state === 'done') return 'current';
  const isAsked = flight && asked && !asked.cancelledAt;
  if (isAsked && flight.state !== 'cancelled') return flight.state;
  if (last) return 'stale';
  return asked ? 'cancelled' : 'missing';
}

function itemOf(pair: AscentPair, known: Known): StudyAscent {
  const { flight, asked, last } = known;
  const state = stateOf(known);
  const result = state === 'current' ? flight : last;
  return {
    siteId: pair.siteId,
    orbitId: pair.orbitId,
    state,
    reason: state === 'current' || !asked ? null : (flight?.failures.at(-1)?.reason ?? null),
    requestedBy: asked?.requestedBy ?? null,
    requestedAt: asked?.requestedAt.toISOString() ?? null,
    figures: result ? AscentFigures.parse(result.outcome) : null,
    figuresAreStale: result !== undefined && state !== 'current',
    flownAt: result?.finishedAt?.toISOString() ?? null,
    hash: result?.hash ?? null,
  };
}

async function itemsOf(db: PooledDb, studyId: string, inputs: StudyInputs): Promise<StudyAscent[]> {
  const tasks = studyTasks(inputs);
  const [flights, requests, results] = await Promise.all([
    findAscents(db, { hashes: tasks.map(({ hash }) => hash) }),
    listRequests(db, { studyId }),
    listLastResults(db, { studyId }),
  ]);
  const flightOf = new Map(flights.map((flight) => [flight.hash, flight]));
  const askedFor = new Map(requests.map((asked) => [`${keyOf(asked)} ${asked.hash}`, asked]));
  const lastOf = new Map(results.map((result) => [keyOf(result), result]));
  const hashOf = new Map(tasks.map((task) => [keyOf(task), task.hash]));
  return inputs.sites.flatMap(({ siteId }) =>
    inputs.orbits.map(({ orbitId }) => {
      const key = keyOf({ siteId, orbitId });
      // Without a vehicle that can be flown there is no flight to look for; old results are still shown.
      const hash = hashOf.get(key) ?? '';
      return itemOf(
        { siteId, orbitId },
        { flight: flightOf.get(hash), asked: askedFor.get(`${key} ${hash}`), last: lastOf.get(key) },
      );
    }),
  );
}

function countsOf(items: readonly StudyAscent[]): StudyAscents['counts'] {
  const counts = { current: 0, stale: 0, waiting: 0, flying: 0, failed: 0, cancelled: 0, missing: 0 };
  for (const { state } of items) counts[state] += 1;
  return counts;
}

async function secondsLeft(db: PooledDb, studyId: string): Promise<number | null> {
  const { ahead, perSecond } = await queueAhead(db, { studyId });
  if (ahead === 0) return 0;
  return perSecond === null ? null : Math.ceil(ahead / perSecond);
}

/** The flown ascents of a study, site by site. @throws AppError 'not-found' · 'invalid' where they are too many */
export async function readAscents(
  db: PooledDb,
  { studyId, query }: { studyId: string; query: AscentsQuery },
): Promise<StudyAscents> {
  const [study, whole] = await Promise.all([findStudy(db, { studyId }), loadStudyInputs(db, studyId)]);
  if (!study) throw notFound();
  const items = await itemsOf(db, studyId, narrowed(whole, query));
  return {
    revision: whole.revision,
    losses: study.losses,
    obstacle: obstacleOf(whole),
    counts: countsOf(items),
    secondsLeft: await secondsLeft(db, studyId),
    items: query.list === 'true' ? items : [],
  };
}

const unpack = promisify(gunzip);

/** One flown ascent with its trajectory, which is of the same inputs as the figures. @throws AppError 'not-found' */
export async function readAscent(
  db: PooledDb,
  { studyId, ...pair }: AscentPair & { studyId: string },
): Promise<StudyAscentDetail> {
  const [item] = await itemsOf(db, studyId, narrowed(await loadStudyInputs(db, studyId), pair));
  if (!item) throw notFound('The study has no such site or orbit.');
  const packed = item.hash === null ? undefined : await findTrajectory(db, { hash: item.hash });
  if (!packed) throw notFound('No ascent has been flown for this site and orbit yet.');
  return { ...item, trajectory: JSON.parse((await unpack(packed)).toString('utf8')) as TrajectoryPoint[] };
}
