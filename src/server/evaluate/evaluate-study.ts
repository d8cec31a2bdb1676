import type { SiteResult } from '#contract/evaluate.ts';
import { flightsFor } from '#contract/flights.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';

/** Every site of a study against its manifest, the way flown alone; the ways not taken come with the interface. */
export function evaluateStudy({ sites, orbits, vehicle, settings }: StudyInputs): SiteResult[] {
  return flightsFor({ orbits, vehicle, settings, others: false })(sites);
}
