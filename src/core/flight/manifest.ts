import { kilograms } from '../units.ts';
import type { Kilograms } from '../units.ts';
import type { Flight, TargetOrbit } from './types.ts';

/** What a flight carries: 0 where it falls short or is out of reach, undefined where no vehicle is known. */
export function carriedBy(flight: Flight): Kilograms | undefined {
  if (flight.kind === 'out-of-reach') return kilograms(0);
  if (flight.payload.kind === 'unknown') return undefined;
  return flight.payload.kind === 'carries' ? flight.payload.mass : kilograms(0);
}

/** Payload a year of one site, Σ flights × payload; an orbit out of reach or fallen short counts zero. */
export function payloadPerYear(flights: readonly Flight[], orbits: readonly TargetOrbit[]): Kilograms {
  return kilograms(
    flights.reduce((sum, flight, k) => sum + (carriedBy(flight) ?? 0) * (orbits[k]?.flightsPerYear ?? 0), 0),
  );
}
