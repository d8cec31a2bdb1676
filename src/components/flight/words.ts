import type { OrbitResult } from '#contract/evaluate.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { InputOrbit } from '#contract/study-inputs.ts';

/** "direct, northerly" · "dogleg, 8.0°" · "plane change, 31.4°" · "out of reach" */
export function wayInWords(result: OrbitResult): string {
  switch (result.way) {
    case 'direct':
      return `direct, ${result.branch}`;
    case 'dogleg':
      return `dogleg, ${formatNumber(result.turnDeg, 1)}°`;
    case 'plane-change':
      return `plane change, ${formatNumber(result.planeChangeDeg, 1)}°`;
    case 'out-of-reach':
      return 'out of reach';
  }
}

/** What the turn costs, whichever kind it is; null where there is no way. */
export const turnCostMps = ({ deltaVMps }: OrbitResult): number | null =>
  deltaVMps.dogleg === null ? null : deltaVMps.dogleg + deltaVMps.planeChange;

const altitude = (km: number): string => formatNumber(km, Number.isInteger(km) ? 0 : 1);

/** "51.6°, 420 × 420 km, 4 a year" */
export function orbitFact(orbit: InputOrbit, inclinationDeg: number): string {
  const size = `${altitude(orbit.perigeeKm)} × ${altitude(orbit.apogeeKm)} km`;
  const flights = Number.isInteger(orbit.flightsPerYear) ? 0 : 1;
  return `${formatNumber(inclinationDeg, 1)}°, ${size}, ${formatNumber(orbit.flightsPerYear, flights)} a year`;
}

/** "11 flights a year" */
export function manifestFact(orbits: readonly InputOrbit[]): string {
  const flights = orbits.reduce((sum, orbit) => sum + orbit.flightsPerYear, 0);
  return Number.isInteger(flights)
    ? `${formatCount(flights, 'flight')} a year`
    : `${formatNumber(flights, 1)} flights a year`;
}

export const nameOf = (orbit: InputOrbit): string => orbit.name || orbit.code;
