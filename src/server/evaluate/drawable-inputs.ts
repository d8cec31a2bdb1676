import type { StudyInputs } from '#contract/study-inputs.ts';
import type { PooledDb } from '#db/client.ts';
import { loadStudyInputs } from '#server/evaluate/study-inputs.ts';

/** Above this many results a page is sent without them and its island works them out in the browser. */
const MOST_RESULTS = 2_000;

/** A study's inputs for a page that draws its figures on the server; null where that would hold the page up. */
export async function drawableInputs(db: PooledDb, studyId: string): Promise<StudyInputs | null> {
  const inputs = await loadStudyInputs(db, studyId);
  return inputs.sites.length * Math.max(1, inputs.orbits.length) > MOST_RESULTS ? null : inputs;
}
