import type { OrbitResult, SiteResult } from '#contract/evaluate.ts';
import { flightsFor } from '#contract/flights.ts';
import type { InputOrbit, InputSite, StudyInputs } from '#contract/study-inputs.ts';

/** Every site for every orbit, the way flown alone. */
export function computeFlights({ sites, orbits, vehicle, settings }: StudyInputs): SiteResult[] {
  return flightsFor({ orbits, vehicle, settings, others: false })(sites);
}

/** One site for one orbit, with the ways not taken. */
export function withOthers(
  { vehicle, settings }: StudyInputs,
  site: InputSite,
  orbit: InputOrbit,
): OrbitResult | undefined {
  return flightsFor({ orbits: [orbit], vehicle, settings, others: true })([site])[0]?.orbits[0];
}
