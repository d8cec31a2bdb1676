import type { ImpactPoint, ImpactPointInput } from '#contract/impact-point.ts';
import { presentImpactPoint } from '#contract/from-ascent.ts';
import { inertialState } from '#core/flight/impact/ground-state.ts';
import { impactPoint } from '#core/flight/impact/impact-point.ts';
import { fromDegrees, metres, metresPerSecond } from '#core/units.ts';

/** Where a state over the turning Earth would come down. */
export function findImpactPoint(input: ImpactPointInput): ImpactPoint {
  const state = inertialState({
    latitude: fromDegrees(input.latitudeDeg),
    longitude: fromDegrees(input.longitudeDeg),
    altitude: metres(input.altitudeM),
    relativeSpeed: metresPerSecond(input.relativeSpeedMps),
    flightPath: fromDegrees(input.flightPathDeg),
    heading: fromDegrees(input.headingDeg),
  });
  return presentImpactPoint(impactPoint(state));
}
