import type { Budget, Flight, FlownWay as CoreWay, Payload } from '#core/flight/types.ts';
import { toDegrees } from '#core/units.ts';
import type { Radians } from '#core/units.ts';
import type { FlownWay, OrbitResult, OutOfReachOrbit } from './evaluate.ts';

/** Rounding of radians to degrees may land on 360 itself. */
function azimuthDeg(azimuth: Radians): number {
  const degrees = toDegrees(azimuth);
  return degrees >= 360 ? 0 : degrees;
}

function presentBudget(budget: Budget): FlownWay['deltaVMps'] {
  const { required, losses, dogleg, planeChange, transfer, reserve, total } = budget;
  return { required, losses, dogleg, planeChange, transfer, reserve, total };
}

function presentPayload(payload: Payload): Pick<FlownWay, 'payloadKg' | 'shortfallMps'> {
  return {
    payloadKg: payload.kind === 'carries' ? payload.mass : null,
    shortfallMps: payload.kind === 'falls-short' ? payload.shortfall : null,
  };
}

function presentWay(way: CoreWay): FlownWay {
  return {
    way: way.kind,
    branch: way.branch,
    profile: way.profile,
    injectionSpeedMps: way.injectionSpeed,
    inertialAzimuthDeg: azimuthDeg(way.inertialAzimuth),
    launchAzimuthDeg: azimuthDeg(way.launchAzimuth),
    requiredSpeedMps: way.requiredSpeed,
    rotationGainMps: way.rotationGain,
    turnDeg: toDegrees(way.turn),
    planeChangeDeg: toDegrees(way.planeChange),
    deltaVMps: presentBudget(way.budget),
    ...presentPayload(way.payload),
  };
}

function presentOutOfReach(code: string, inclinationDeg: number): OutOfReachOrbit {
  return {
    code,
    inclinationDeg,
    way: 'out-of-reach',
    branch: null,
    profile: null,
    injectionSpeedMps: null,
    inertialAzimuthDeg: null,
    launchAzimuthDeg: null,
    requiredSpeedMps: null,
    rotationGainMps: null,
    turnDeg: null,
    planeChangeDeg: null,
    deltaVMps: {
      required: null,
      losses: null,
      dogleg: null,
      planeChange: null,
      transfer: null,
      reserve: null,
      total: null,
    },
    payloadKg: null,
    shortfallMps: null,
    others: [],
  };
}

/** A flight as it crosses the wire. `inclinationDeg` is the one given where one was: no digit is lost on the way. */
export function presentFlight(code: string, inclinationDeg: number, flight: Flight): OrbitResult {
  if (flight.kind === 'out-of-reach') return presentOutOfReach(code, inclinationDeg);
  return { code, inclinationDeg, ...presentWay(flight), others: flight.others.map(presentWay) };
}
