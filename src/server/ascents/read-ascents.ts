import { promisify } from 'node:util';
import { gunzip } from 'node:zlib';
import type { TrajectoryPoint } from '#contract/ascent.ts';
import { AscentFigures } from '#contract/ascent-job.ts';
import type {
  AscentPair,
  AscentsQuery,
  StudyAscent,
  StudyAscentDetail,
  StudyAscents,
} from '#contract/study-ascents.ts';
import type { PooledDb } from '#db/client.ts';
import { countAhead, findOutcomes, findTrajectory, recentPace } from '#db/queries/ascent.ts';
import { findStudy } from '#db/queries/study.ts';
import { loadStudyInputs } from '#server/evaluate/study-inputs.ts';
import { notFound } from '#server/errors.ts';
import { knownAscents, type Flight, type Known } from './known-ascents.ts';
import { narrowed, obstacleOf } from './study-tasks.ts';

type Outcomes = ReadonlyMap<string, unknown>;

function itemOf({ siteId, orbitId, state, flight, asked, shown }: Known, outcomes: Outcomes): StudyAscent {
  return {
    siteId,
    orbitId,
    state,
    reason: state === 'current' || !asked ? null : (flight?.reason ?? null),
    requestedBy: asked?.requestedBy ?? null,
    requestedAt: asked?.requestedAt.toISOString() ?? null,
    figures: shown ? AscentFigures.parse(outcomes.get(shown.hash)) : null,
    figuresAreStale: shown !== undefined && state !== 'current',
    flownAt: shown?.finishedAt?.toISOString() ?? null,
    hash: shown?.hash ?? null,
  };
}

async function itemsOf(db: PooledDb, known: readonly Known[]): Promise<StudyAscent[]> {
  const hashes = [...new Set(known.flatMap(({ shown }) => shown?.hash ?? []))];
  const rows = hashes.length === 0 ? [] : await findOutcomes(db, { hashes });
  const outcomes = new Map(rows.map(({ hash, outcome }) => [hash, outcome]));
  return known.map((one) => itemOf(one, outcomes));
}

function countsOf(known: readonly Known[]): StudyAscents['counts'] {
  const counts = { current: 0, stale: 0, waiting: 0, flying: 0, failed: 0, cancelled: 0, missing: 0 };
  for (const { state } of known) counts[state] += 1;
  return counts;
}

/** Until the last of some flights is flown, behind whatever comes before it. */
async function secondsLeft(db: PooledDb, known: readonly Known[]): Promise<number | null> {
  const underWay = known.flatMap(({ state, flight }) =>
    flight && (state === 'waiting' || state === 'flying') ? [flight] : [],
  );
  if (underWay.length === 0) return 0;
  const isLater = (a: Flight, b: Flight): boolean =>
    a.priority < b.priority || (a.priority === b.priority && a.askedAt > b.askedAt);
  const last = underWay.reduce((late, flight) => (isLater(flight, late) ? flight : late));
  const [ahead, perSecond] = await Promise.all([countAhead(db, last), recentPace(db)]);
  return perSecond === null ? null : Math.ceil(ahead / perSecond);
}

/** The flown ascents of a study, site by site. @throws AppError 'not-found' · 'invalid' where they are too many */
export async function readAscents(
  db: PooledDb,
  { studyId, query }: { studyId: string; query: AscentsQuery },
): Promise<StudyAscents> {
  const [study, whole] = await Promise.all([findStudy(db, { studyId }), loadStudyInputs(db, studyId)]);
  if (!study) throw notFound();
  const known = await knownAscents(db, studyId, narrowed(whole, query));
  return {
    revision: whole.revision,
    losses: study.losses,
    obstacle: obstacleOf(whole),
    counts: countsOf(known),
    secondsLeft: await secondsLeft(db, known),
    items: query.list === 'true' ? await itemsOf(db, known) : [],
  };
}

const unpack = promisify(gunzip);

/** One flown ascent with its trajectory, which is of the same inputs as the figures. @throws AppError 'not-found' */
export async function readAscent(
  db: PooledDb,
  { studyId, ...pair }: AscentPair & { studyId: string },
): Promise<StudyAscentDetail> {
  const inputs = narrowed(await loadStudyInputs(db, studyId), pair);
  const [item] = await itemsOf(db, await knownAscents(db, studyId, inputs));
  if (!item) throw notFound('The study has no such site or orbit.');
  const packed = item.hash === null ? undefined : await findTrajectory(db, { hash: item.hash });
  if (!packed) throw notFound('No ascent has been flown for this site and orbit yet.');
  return { ...item, trajectory: JSON.parse((await unpack(packed)).toString('utf8')) as TrajectoryPoint[] };
}
