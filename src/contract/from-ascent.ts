import type { Planet } from '#core/flight/ascent/planet.ts';
import type { Trajectory } from '#core/flight/ascent/trajectory.ts';
import type { ImpactPoint as CoreImpactPoint } from '#core/flight/impact/impact-point.ts';
import { toDegrees } from '#core/units.ts';
import type { AscentOutput, NoAscentReason, TrajectoryPoint } from './ascent.ts';
import type { ImpactPoint } from './impact-point.ts';

const DEGREE = Math.PI / 180;

/** A longitude within a turn of −180…180, brought to −180 < λ ≤ 180. */
function longitudeDeg(degrees: number): number {
  if (degrees > 180) return degrees - 360;
  return degrees <= -180 ? degrees + 360 : degrees;
}

/**
 * An impact point as it crosses the wire.
 * @param fromDeg longitude of the meridian that its longitude counts from
 */
export function presentImpactPoint(point: CoreImpactPoint, fromDeg = 0): ImpactPoint {
  if (point.kind !== 'impact') return { kind: point.kind };
  return {
    kind: 'impact',
    latitudeDeg: toDegrees(point.latitude),
    longitudeDeg: longitudeDeg(toDegrees(point.longitude) + fromDeg),
    timeS: point.time,
  };
}

/** A trajectory as it crosses the wire, with the impact point of each moment. @param siteDeg the site's longitude */
export function presentTrajectory(
  trajectory: Trajectory,
  siteDeg: number,
  planet: Planet,
): TrajectoryPoint[] {
  return Array.from({ length: trajectory.length }, (_, index) => {
    const point = trajectory.point(index, planet);
    return {
      timeS: point.time,
      latitudeDeg: point.latitude / DEGREE,
      longitudeDeg: longitudeDeg(point.longitude / DEGREE + siteDeg),
      altitudeM: point.altitude,
      relativeSpeedMps: point.relativeSpeed,
      flightPathDeg: point.flightPath / DEGREE,
      headingDeg: point.heading / DEGREE,
      massKg: point.mass,
      dynamicPressurePa: point.dynamicPressure,
      accelerationMps2: point.acceleration,
      impact: presentImpactPoint(trajectory.impact(index, planet), siteDeg),
    };
  });
}

/** That there is no ascent: every figure is null. */
export function presentNoAscent(reason: NoAscentReason): AscentOutput {
  return {
    converged: false,
    reason,
    payloadKg: null,
    flownInclinationDeg: null,
    burnOutS: null,
    launchHeadingDeg: null,
    maxDynamicPressurePa: null,
    idealDeltaVMps: null,
    relativeSpeedMps: null,
    centrifugalMps: null,
    lossesMps: null,
    remainderMps: null,
    trajectory: [],
  };
}
