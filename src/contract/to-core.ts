import { sunSynchronousInclination } from '#core/flight/orbit.ts';
import type { Boosters, Site, Stage, TargetOrbit, Vehicle } from '#core/flight/types.ts';
import {
  fromDegrees,
  fromKilometres,
  fromKilonewtons,
  kilograms,
  metres,
  metresPerSecond,
  seconds,
} from '#core/units.ts';
import type { Radians } from '#core/units.ts';
import type { EvaluateSite } from './evaluate.ts';
import type { TargetOrbitInput } from './orbit.ts';
import type { BoostersInput, StageInput, VehicleInput } from './vehicle.ts';

/** What of a site the flight figures follow from. */
export type FlightSite = Pick<
  EvaluateSite,
  'latitudeDeg' | 'longitudeDeg' | 'elevationM' | 'permittedAzimuthsDeg'
>;

export function toSite({ latitudeDeg, longitudeDeg, elevationM, permittedAzimuthsDeg }: FlightSite): Site {
  return {
    latitude: fromDegrees(latitudeDeg),
    longitude: fromDegrees(longitudeDeg),
    height: metres(elevationM),
    sectors: permittedAzimuthsDeg.map(([from, to]) => ({ from: fromDegrees(from), to: fromDegrees(to) })),
  };
}

/** What of an orbit its inclination follows from. */
export type InclinedOrbit = Pick<
  TargetOrbitInput,
  'perigeeKm' | 'apogeeKm' | 'inclinationDeg' | 'sunSynchronous'
>;

/** The inclination given, or the sun-synchronous one. @throws RangeError where there is none; the contract refuses it */
export function inclinationOf({
  perigeeKm,
  apogeeKm,
  inclinationDeg,
  sunSynchronous,
}: InclinedOrbit): Radians {
  if (sunSynchronous !== true && inclinationDeg !== undefined) return fromDegrees(inclinationDeg);
  const found = sunSynchronousInclination(fromKilometres(perigeeKm), fromKilometres(apogeeKm));
  if (found.kind === 'none') throw new RangeError(`inclinationOf: ${perigeeKm} × ${apogeeKm} km has none`);
  return found.inclination;
}

/** What of an orbit the flight figures follow from. */
export type FlightOrbit = InclinedOrbit & Pick<TargetOrbitInput, 'profile' | 'parkingKm' | 'flightsPerYear'>;

export function toOrbit(orbit: FlightOrbit): TargetOrbit {
  return {
    perigeeAltitude: fromKilometres(orbit.perigeeKm),
    apogeeAltitude: fromKilometres(orbit.apogeeKm),
    inclination: inclinationOf(orbit),
    profile: orbit.profile,
    parkingAltitude: fromKilometres(orbit.parkingKm),
    flightsPerYear: orbit.flightsPerYear,
  };
}

function toStage(stage: StageInput): Stage {
  return {
    dryMass: kilograms(stage.dryKg),
    propellantMass: kilograms(stage.propellantKg),
    vacuumThrust: fromKilonewtons(stage.thrustVacKn),
    vacuumImpulse: seconds(stage.ispVacS),
    seaLevelImpulse: stage.ispSeaLevelS === undefined ? undefined : seconds(stage.ispSeaLevelS),
  };
}

function toBoosters(boosters: BoostersInput): Boosters {
  return { ...toStage(boosters), count: boosters.count };
}

export function toVehicle(vehicle: VehicleInput): Vehicle {
  const { gravity, drag, steering } = vehicle.lossesMps;
  return {
    fairingMass: kilograms(vehicle.fairingKg),
    fairingLeavesAfterStage: vehicle.fairingLeavesAfterStage,
    reserve: metresPerSecond(vehicle.reserveMps),
    losses: {
      gravity: metresPerSecond(gravity),
      drag: metresPerSecond(drag),
      steering: metresPerSecond(steering),
    },
    boosters: vehicle.boosters === undefined ? undefined : toBoosters(vehicle.boosters),
    stages: vehicle.stages.map(toStage),
  };
}
