import { evaluateFlight } from '../flight/index.ts';
import type { FlightSettings, Site, TargetOrbit, Vehicle } from '../flight/index.ts';
import { fromDegrees, metres, radians } from '../units.ts';
import type { Kilograms, MetresPerSecond } from '../units.ts';
import { NAUTICAL_MILE, classOfPayload } from './vehicle-class.ts';
import type { ClassColumn, VehicleClass } from './vehicle-class.ts';

/** The class that a vehicle's payload puts it in, or by how much it misses the orbit that the table asks about. */
export type ClassOfVehicle =
  | { readonly kind: 'class'; readonly vehicleClass: VehicleClass; readonly payload: Kilograms }
  | { readonly kind: 'falls-short'; readonly shortfall: MetresPerSecond };

/** The table's pad: 28° of latitude, any azimuth permitted. */
const PAD: Site = { latitude: fromDegrees(28), longitude: radians(0), height: metres(0), sectors: [] };
const ALTITUDE = metres(100 * NAUTICAL_MILE);

/**
 * A vehicle's class by its payload to 100 nautical miles circular from a pad at 28°, flown straight into the orbit.
 * @param column inclination of the orbit: the table's 28° or 90°
 * @see downrangeReferences.part420, tests/core/downrange/class-of-vehicle.test.ts
 */
export function classOfVehicle(
  vehicle: Vehicle,
  settings: FlightSettings,
  column: ClassColumn,
): ClassOfVehicle {
  const orbit: TargetOrbit = {
    perigeeAltitude: ALTITUDE,
    apogeeAltitude: ALTITUDE,
    inclination: fromDegrees(column),
    profile: 'direct',
    parkingAltitude: ALTITUDE,
    flightsPerYear: 0,
  };
  const flight = evaluateFlight(PAD, orbit, vehicle, settings);
  // A pad at 28° has azimuths for both inclinations, and a vehicle was given.
  if (flight.kind === 'out-of-reach' || flight.payload.kind === 'unknown')
    throw new RangeError(`classOfVehicle: no flight to ${column}°`);
  if (flight.payload.kind === 'falls-short')
    return { kind: 'falls-short', shortfall: flight.payload.shortfall };
  const { mass } = flight.payload;
  return { kind: 'class', vehicleClass: classOfPayload(mass, column), payload: mass };
}
