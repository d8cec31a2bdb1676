import type { AscentsCancelled, AscentsScope } from '#contract/study-ascents.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { cancelFlights, findAscents, lockAscents } from '#db/queries/ascent.ts';
import { cancelRequests, listLive, stillAskedFor, type Request } from '#db/queries/ascent-request.ts';
import { cancelJobs } from '#server/jobs/lease.ts';
import type { Member } from '#server/member.ts';
import { announceProgress } from './announce.ts';
import type { PairTask } from './input-hash.ts';

/** What a study asks for that is not flown yet, of earlier inputs too. */
async function pendingOf(tx: Db, studyId: string): Promise<Request[]> {
  const live = await listLive(tx, { studyId });
  const flights = await findAscents(tx, { hashes: [...new Set(live.map(({ hash }) => hash))] });
  const underWay = new Set(
    flights.filter(({ state }) => state === 'waiting' || state === 'flying').map(({ hash }) => hash),
  );
  return live.filter(({ hash }) => underWay.has(hash));
}

/** Takes requests back, and out of the queue what nobody else asks for. */
async function takeBack(
  tx: Db,
  { studyId, requests }: { studyId: string; requests: readonly Request[] },
): Promise<void> {
  if (requests.length === 0) return;
  // Whoever asks for one of these meanwhile waits here, and finds it cancelled or not.
  const hashes = [...new Set(requests.map(({ hash }) => hash))];
  await lockAscents(tx, { hashes });
  await cancelRequests(tx, { studyId, requests });
  const asked = await stillAskedFor(tx, { hashes });
  const emptied = await cancelFlights(tx, { hashes: hashes.filter((hash) => !asked.has(hash)) });
  await cancelJobs(tx, 'ascents', emptied);
}

/** Takes back what a study still asks for of earlier inputs, where it asks for the same site and orbit anew. */
export async function takeBackOutdated(
  tx: Db,
  { studyId, tasks }: { studyId: string; tasks: readonly PairTask[] },
): Promise<void> {
  const asked = new Map(tasks.map(({ siteId, orbitId, hash }) => [`${siteId} ${orbitId}`, hash]));
  const outdated = (await pendingOf(tx, studyId)).filter(({ siteId, orbitId, hash }) => {
    const now = asked.get(`${siteId} ${orbitId}`);
    return now !== undefined && now !== hash;
  });
  await takeBack(tx, { studyId, requests: outdated });
}

/**
 * Cancels what a study asks for and is not flown yet. What waits leaves the queue; a flight under way ends, and its
 * batch stops there. What other studies ask for too is flown for them.
 */
export async function cancelAscents(
  db: PooledDb,
  { member, scope }: { member: Member; scope: AscentsScope },
): Promise<AscentsCancelled> {
  const { studyId } = member;
  return db.transaction(async (tx) => {
    const requests = (await pendingOf(tx, studyId)).filter(
      ({ siteId, orbitId }) => (scope.siteId ?? siteId) === siteId && (scope.orbitId ?? orbitId) === orbitId,
    );
    await takeBack(tx, { studyId, requests });
    await announceProgress(tx, [studyId]);
    return { cancelled: requests.length };
  });
}
