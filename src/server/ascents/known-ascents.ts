import type { AscentPair, AscentStateName } from '#contract/study-ascents.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import type { PooledDb } from '#db/client.ts';
import { findAscents } from '#db/queries/ascent.ts';
import { listRequests } from '#db/queries/ascent-request.ts';
import { studyTasks } from './study-tasks.ts';

export type Flight = Awaited<ReturnType<typeof findAscents>>[number];
type Asked = Awaited<ReturnType<typeof listRequests>>[number];

/** What is known of one site and orbit. */
export interface Known extends AscentPair {
  state: AscentStateName;
  /** The flight of what the study holds now, if anyone ever asked for it. */
  flight: Flight | undefined;
  /** That this study asked for that flight. */
  asked: Asked | undefined;
  /** The flight whose figures are shown: the current one, or the last of earlier inputs. */
  shown: Flight | undefined;
}

const keyOf = ({ siteId, orbitId }: AscentPair): string => `${siteId} ${orbitId}`;

function stateOf({ flight, asked, shown }: Omit<Known, 'state' | keyof AscentPair>): AscentStateName {
  if (flight?.state === 'done') return 'current';
  const isAsked = flight && asked && !asked.cancelledAt;
  if (isAsked && flight.state !== 'cancelled') return flight.state;
  if (shown) return 'stale';
  return asked ? 'cancelled' : 'missing';
}

async function byHash(db: PooledDb, hashes: readonly string[]): Promise<Map<string, Flight>> {
  if (hashes.length === 0) return new Map();
  const flights = await findAscents(db, { hashes: [...new Set(hashes)] });
  return new Map(flights.map((flight) => [flight.hash, flight]));
}

/** What is known of each site and orbit of a study, site by site. @throws AppError 'invalid' where they are too many */
export async function knownAscents(db: PooledDb, studyId: string, inputs: StudyInputs): Promise<Known[]> {
  // Without a vehicle that can be flown there is no flight to look for; old results are still shown.
  const hashOf = new Map(studyTasks(inputs).map((task) => [keyOf(task), task.hash]));
  const [flights, requests] = await Promise.all([
    byHash(db, [...hashOf.values()]),
    listRequests(db, { studyId }),
  ]);
  const isCurrent = (key: string): boolean => flights.get(hashOf.get(key) ?? '')?.state === 'done';
  // Latest first, as they are listed.
  const asked = new Map<string, Asked[]>();
  for (const request of requests) {
    const some = asked.get(keyOf(request));
    if (some) some.push(request);
    else asked.set(keyOf(request), [request]);
  }
  const earlier = await byHash(
    db,
    [...asked].flatMap(([key, some]) => (isCurrent(key) ? [] : some.map(({ hash }) => hash))),
  );
  const isFlown = ({ hash }: Asked): boolean => earlier.get(hash)?.state === 'done';
  return inputs.sites.flatMap(({ siteId }) =>
    inputs.orbits.map(({ orbitId }) => {
      const key = keyOf({ siteId, orbitId });
      const hash = hashOf.get(key) ?? '';
      const own = asked.get(key) ?? [];
      const flight = flights.get(hash);
      const shown = isCurrent(key) ? flight : earlier.get(own.find(isFlown)?.hash ?? '');
      const known = { flight, asked: own.find((request) => request.hash === hash), shown };
      return { siteId, orbitId, ...known, state: stateOf(known) };
    }),
  );
}
