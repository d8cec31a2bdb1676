import type { ImpactPoint as CoreImpactPoint } from '#core/flight/impact/impact-point.ts';
import { toDegrees } from '#core/units.ts';
import type { ImpactPoint } from './impact-point.ts';

/** Longitudes are −180 < λ ≤ 180. */
const longitudeDeg = (degrees: number): number => (degrees <= -180 ? degrees + 360 : degrees);

/** An impact point as it crosses the wire. */
export function presentImpactPoint(point: CoreImpactPoint): ImpactPoint {
  if (point.kind !== 'impact') return { kind: point.kind };
  return {
    kind: 'impact',
    latitudeDeg: toDegrees(point.latitude),
    longitudeDeg: longitudeDeg(toDegrees(point.longitude)),
    timeS: point.time,
  };
}
