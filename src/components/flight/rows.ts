import type { OrbitResult, SiteResult } from '#contract/evaluate.ts';
import type { InputSite, StudyInputs } from '#contract/study-inputs.ts';

/** A site's result for the orbit looked at. */
export interface FlightRow {
  site: InputSite;
  result: OrbitResult;
}

export function rowsOf(inputs: StudyInputs, results: readonly SiteResult[], orbitIndex: number): FlightRow[] {
  return inputs.sites.flatMap((site, i) => {
    const result = results[i]?.orbits[orbitIndex];
    return result ? [{ site, result }] : [];
  });
}

const totalOf = ({ result }: FlightRow): number => result.deltaVMps.total ?? Infinity;

/** Cheapest first; out of reach last; equal totals in the order of the sites. */
export const byTotal = (rows: readonly FlightRow[]): FlightRow[] =>
  [...rows].sort((a, b) => (totalOf(a) === totalOf(b) ? 0 : totalOf(a) - totalOf(b)));

/** A site's year: the manifest's payload, and the orbits that give none. */
export interface ManifestRow {
  site: InputSite;
  results: OrbitResult[];
  payloadPerYearKg: number | null;
}

export function manifestRows(inputs: StudyInputs, results: readonly SiteResult[]): ManifestRow[] {
  const rows = inputs.sites.flatMap((site, i) => {
    const found = results[i];
    return found ? [{ site, results: found.orbits, payloadPerYearKg: found.payloadPerYearKg }] : [];
  });
  return rows.sort((a, b) => (b.payloadPerYearKg ?? 0) - (a.payloadPerYearKg ?? 0));
}
