import type { StudyInputs } from '#contract/study-inputs.ts';
import { computeFlights } from './compute.ts';
import { manifestFinding, orbitFinding } from './finding.ts';
import { manifestRows, rowsOf } from './rows.ts';

export const MANIFEST = '*';

/** The sentence the sheet opens with for an orbit of the address; the first orbit where it names none. */
export function flightHeading(inputs: StudyInputs | null, orbitCode: string | null): string {
  if (!inputs || inputs.orbits.length === 0 || inputs.sites.length === 0) return 'Flight';
  const results = computeFlights(inputs);
  if (orbitCode === MANIFEST) return manifestFinding(manifestRows(inputs, results), inputs.orbits).heading;
  const index = Math.max(
    0,
    inputs.orbits.findIndex(({ code }) => code === orbitCode),
  );
  const rows = rowsOf(inputs, results, index);
  return orbitFinding(rows, rows[0]?.result.inclinationDeg ?? 0).heading;
}
