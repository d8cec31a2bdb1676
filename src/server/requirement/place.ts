import type { Db } from '#db/client.ts';
import { listOrbits, placeOrbit } from '#db/queries/orbit.ts';

/** Puts an orbit at a place of the manifest and numbers all 0, 1, 2 …; a place past the end is the end. */
export async function moveOrbit(
  tx: Db,
  { studyId, orbitId, position }: { studyId: string; orbitId: string; position: number },
): Promise<void> {
  const orbits = await listOrbits(tx, { studyId });
  const others = orbits.map(({ id }) => id).filter((id) => id !== orbitId);
  await number(tx, studyId, [...others.slice(0, position), orbitId, ...others.slice(position)]);
}

/** Closes the gap a removed orbit left. */
export async function closeGaps(tx: Db, { studyId }: { studyId: string }): Promise<void> {
  await number(
    tx,
    studyId,
    (await listOrbits(tx, { studyId })).map(({ id }) => id),
  );
}

async function number(tx: Db, studyId: string, order: readonly string[]): Promise<void> {
  for (const [position, orbitId] of order.entries()) await placeOrbit(tx, { studyId, orbitId, position });
}
