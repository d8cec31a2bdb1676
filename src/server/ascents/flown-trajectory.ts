import type { TrajectoryPoint } from '#contract/ascent.ts';
import type { AscentPair, StudyAscentDetail } from '#contract/study-ascents.ts';
import type { InputOrbit, InputSite } from '#contract/study-inputs.ts';
import type { PooledDb } from '#db/client.ts';
import { loadStudyInputs } from '#server/evaluate/study-inputs.ts';
import { notFound } from '#server/errors.ts';
import { readAscent } from './read-ascents.ts';

/** A flown ascent to be written to a file, with what it flew from and to. */
export interface FlownTrajectory {
  site: InputSite;
  orbit: InputOrbit;
  ascent: StudyAscentDetail;
  points: TrajectoryPoint[];
}

/** @throws AppError 'not-found' where nothing was flown, or what was flown met no end condition */
export async function flownTrajectory(
  db: PooledDb,
  { studyId, siteId, orbitId }: AscentPair & { studyId: string },
): Promise<FlownTrajectory> {
  const ascent = await readAscent(db, { studyId, siteId, orbitId });
  const inputs = await loadStudyInputs(db, studyId);
  const site = inputs.sites.find((one) => one.siteId === siteId);
  const orbit = inputs.orbits.find((one) => one.orbitId === orbitId);
  const points = ascent.trajectory;
  if (!site || !orbit || points.length === 0)
    throw notFound('This ascent was flown without reaching its orbit: there is no trajectory.');
  return { site, orbit, ascent, points };
}

/** Letters, digits, hyphen and underscore alone: a code may hold anything. */
const plain = (code: string): string => code.replace(/[^\w-]+/g, '-');

/** How a file is handed out, named after site and orbit, and after its age where inputs have changed since. */
export function fileHeaders(
  { site, orbit, ascent }: FlownTrajectory,
  { type, extension }: { type: string; extension: string },
): Record<string, string> {
  const age = ascent.figuresAreStale ? '-earlier-inputs' : '';
  return {
    'content-type': type,
    'content-disposition': `attachment; filename="ascent-${plain(site.code)}-${plain(orbit.code)}${age}.${extension}"`,
    'cache-control': 'private, no-store',
  };
}
