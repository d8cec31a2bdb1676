import { payloadFor } from '#core/flight/payload.ts';
import { metresPerSecond } from '#core/units.ts';
import type { EvaluateOrbit, OrbitResult } from '#contract/evaluate.ts';
import { flightsFor } from '#contract/flights.ts';
import { DEFAULT_PARKING_KM } from '#contract/orbit.ts';
import type { StudyOrbit } from '#contract/requirement.ts';
import { toVehicle } from '#contract/to-core.ts';
import type { VehicleInput } from '#contract/vehicle.ts';

/** A pad on the equator at sea level, free all round: the same for every vehicle, so that vehicles compare. */
const EQUATOR = { code: 'EQ', latitudeDeg: 0, longitudeDeg: 0, elevationM: 0, permittedAzimuthsDeg: [] };

/** 200 km circular, due east: the orbit brochures quote. */
const LOW: EvaluateOrbit = {
  code: 'LOW',
  perigeeKm: 200,
  apogeeKm: 200,
  inclinationDeg: 0,
  profile: 'auto',
  parkingKm: DEFAULT_PARKING_KM,
  flightsPerYear: 0,
};

/** What is carried, or by how much even no payload falls short. */
export type Carried = { payloadKg: number } | { shortfallMps: number };

/** The payload for a total Δv that is given, losses and reserve counted in it. */
export function carriedFor(vehicle: VehicleInput, deltaVMps: number): Carried {
  const carried = payloadFor(toVehicle(vehicle), metresPerSecond(deltaVMps));
  if (carried.kind === 'carries') return { payloadKg: carried.mass };
  return { shortfallMps: carried.kind === 'falls-short' ? carried.shortfall : 0 };
}

const toEvaluate = ({ inclinationDeg, sunSynchronous, ...orbit }: StudyOrbit): EvaluateOrbit => ({
  code: orbit.code,
  perigeeKm: orbit.perigeeKm,
  apogeeKm: orbit.apogeeKm,
  profile: orbit.profile,
  parkingKm: orbit.parkingKm,
  flightsPerYear: orbit.flightsPerYear,
  ...(sunSynchronous || inclinationDeg === null ? { sunSynchronous: true } : { inclinationDeg }),
});

/** Flights from the equator to 200 km due east and to each orbit of the manifest, in that order. */
export function flightsFromEquator(
  vehicle: VehicleInput,
  orbits: readonly StudyOrbit[],
  turnSpeedFraction: number,
): { low: OrbitResult | undefined; manifest: OrbitResult[] } {
  const request = {
    orbits: [LOW, ...orbits.map(toEvaluate)],
    vehicle,
    settings: { turnSpeedFraction },
    others: false,
  };
  const [site] = flightsFor(request)([EQUATOR]);
  const [low, ...manifest] = site?.orbits ?? [];
  return { low, manifest };
}
