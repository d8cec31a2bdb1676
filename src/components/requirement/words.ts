import { sunSynchronousInclination } from '#core/flight/orbit.ts';
import { fromKilometres, toDegrees } from '#core/units.ts';
import { formatCount, formatFull, formatNumber } from '#contract/format.ts';
import type { StudyOrbit, StudyVehicle } from '#contract/requirement.ts';

export const PROFILE_NAMES: Record<StudyOrbit['profile'], string> = {
  auto: 'Auto, the cheaper one',
  direct: 'Direct to perigee',
  parking: 'Parking orbit first',
};

export const nameOfOrbit = ({ name, code }: Pick<StudyOrbit, 'name' | 'code'>): string => name || code;

/** "Rowan M" of "Rowan M (invented medium two-stage)". */
export const shortName = (name: string | undefined): string =>
  name?.replace(/\s*\(.*\)\s*$/, '') || 'the entered vehicle';

/**
 * The inclination that makes an orbit between two altitudes sun-synchronous, degrees; null where there is none or
 * the altitudes are no pair of numbers.
 */
export function sunSynchronousDeg(perigeeKm: unknown, apogeeKm: unknown): number | null {
  if (typeof perigeeKm !== 'number' || typeof apogeeKm !== 'number' || !(perigeeKm <= apogeeKm)) return null;
  const found = sunSynchronousInclination(fromKilometres(perigeeKm), fromKilometres(apogeeKm));
  return found.kind === 'found' ? toDegrees(found.inclination) : null;
}

/** "51.6" as entered, or the sun-synchronous one to a tenth of a hundredth. */
export function inclinationInWords(orbit: StudyOrbit): string {
  if (orbit.inclinationDeg !== null) return formatFull(orbit.inclinationDeg);
  const found = sunSynchronousDeg(orbit.perigeeKm, orbit.apogeeKm);
  return found === null ? 'none' : formatNumber(found, 2);
}

interface Written {
  question: string;
  orbits: readonly StudyOrbit[];
  vehicle: StudyVehicle;
}

/** The sentence the screen opens with: what is asked for, or what is still missing. */
export function requirementFinding({ orbits, vehicle }: Written): string {
  const flights = orbits.reduce((sum, { flightsPerYear }) => sum + flightsPerYear, 0);
  const flown = vehicle.vehicle ? `, flown by ${shortName(vehicle.vehicle.name)}` : '';
  if (orbits.length === 0) return `No target orbits yet${flown}.`;
  return `${formatCount(orbits.length, 'target orbit')}, ${formatCount(flights, 'flight')} a year${flown}.`;
}

/** What is left to write, in one line; null where nothing is. */
export function outstanding({ question, orbits, vehicle }: Written): string | null {
  const missing = [
    question === '' && 'the question to decide',
    orbits.length === 0 && 'the launch manifest',
    vehicle.vehicle === null && 'a vehicle, without which there are Δv figures but no payloads',
  ].filter((part) => part !== false);
  return missing.length === 0 ? null : `Still to be written: ${missing.join('; ')}.`;
}
