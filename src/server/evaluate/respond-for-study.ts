import { flightsFor } from '#contract/flights.ts';
import { flownSite } from '#contract/flown-results.ts';
import type { PooledDb } from '#db/client.ts';
import { inOneMoment, selectStudyInputs } from '#db/queries/study-inputs.ts';
import { readFlownStates } from '#server/ascents/flown-states.ts';
import { json } from '#server/endpoint.ts';
import { notFound } from '#server/errors.ts';
import { respondWithEvaluation } from './respond.ts';
import { presentStudyInputs } from './study-inputs.ts';

/**
 * A study's evaluation, with the losses it takes: where they are flown, an orbit that is not flown yet has no payload,
 * and the ways not taken stay the closed form's. @throws AppError 'not-found'
 */
export async function respondForStudy(db: PooledDb, { studyId }: { studyId: string }): Promise<Response> {
  const { inputs, states } = await inOneMoment(db, async (tx) => {
    const rows = await selectStudyInputs(tx, { studyId });
    if (!rows) throw notFound();
    const read = presentStudyInputs(rows);
    return { inputs: read, states: rows.losses === 'flown' ? await readFlownStates(tx, read) : null };
  });
  const { revision, ...request } = inputs;
  if (states === null)
    return respondWithEvaluation(
      { ...request, vehicle: request.vehicle ?? undefined, others: true },
      { revision },
    );
  const flightsPerYear = request.orbits.map((orbit) => orbit.flightsPerYear);
  const closed = flightsFor({ ...request, others: true })(request.sites);
  return json({
    revision,
    sites: closed.map((result, at) => flownSite(result, states[at] ?? [], flightsPerYear)),
  });
}
