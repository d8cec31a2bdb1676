import type { OrbitResult } from '#contract/evaluate.ts';
import { meridianOf } from '#core/flight/earth.ts';
import { inertialAzimuths, launchVector } from '#core/flight/launch-azimuth.ts';
import { fromDegrees, metres, metresPerSecond } from '#core/units.ts';
import type { MetresPerSecond } from '#core/units.ts';

export type CurvePoint = readonly [latitudeDeg: number, gainMps: number];

/** Rotation gain against latitude at sea level for one inclination, up to the latitude where it equals i. */
export interface GainCurve {
  points: CurvePoint[];
  /** The latitude where the curve ends, because no azimuth beyond reaches the inclination; null where it does not. */
  endDeg: number | null;
}

const SEA_LEVEL = metres(0);

function gainAt(latitudeDeg: number, inclinationDeg: number, injectionSpeed: MetresPerSecond): number | null {
  const { geocentricLatitude, rotationSpeed } = meridianOf(fromDegrees(latitudeDeg), SEA_LEVEL);
  const [azimuth] = inertialAzimuths(geocentricLatitude, fromDegrees(inclinationDeg));
  if (azimuth === undefined) return null;
  return injectionSpeed - launchVector(azimuth, injectionSpeed, rotationSpeed).requiredSpeed;
}

/** Geodetic latitude whose geocentric one equals the inclination, found by halving. */
function endLatitude(inclinationDeg: number, mostDeg: number): number | null {
  const reached = (latitudeDeg: number): boolean =>
    inertialAzimuths(
      meridianOf(fromDegrees(latitudeDeg), SEA_LEVEL).geocentricLatitude,
      fromDegrees(inclinationDeg),
    ).length > 0;
  if (reached(mostDeg)) return null;
  let [low, high] = [0, mostDeg];
  for (let i = 0; i < 40; i++) {
    const middle = (low + high) / 2;
    if (reached(middle)) low = middle;
    else high = middle;
  }
  return low;
}

const STEPS = 60;

export function gainCurve(inclinationDeg: number, injectionSpeedMps: number, mostDeg: number): GainCurve {
  const endDeg = endLatitude(inclinationDeg, mostDeg);
  const last = endDeg ?? mostDeg;
  const points = Array.from({ length: STEPS + 1 }, (_, i) => (last * i) / STEPS).flatMap(
    (latitudeDeg): CurvePoint[] => {
      const gain = gainAt(latitudeDeg, inclinationDeg, metresPerSecond(injectionSpeedMps));
      return gain === null ? [] : [[latitudeDeg, gain]];
    },
  );
  return { points, endDeg };
}

/** What a launch due east gains: ω times the distance from the axis. */
export const dueEastCurve = (mostDeg: number): CurvePoint[] =>
  Array.from({ length: STEPS + 1 }, (_, i) => {
    const latitudeDeg = (mostDeg * i) / STEPS;
    return [latitudeDeg, meridianOf(fromDegrees(latitudeDeg), SEA_LEVEL).rotationSpeed];
  });

/** The injection speed that an orbit's curve is drawn for: the one most sites fly. */
export function usualInjectionSpeedMps(results: readonly OrbitResult[]): number | null {
  const counts = new Map<number, number>();
  for (const { injectionSpeedMps: speed } of results)
    if (speed !== null) counts.set(speed, (counts.get(speed) ?? 0) + 1);
  return [...counts].sort((a, b) => b[1] - a[1])[0]?.[0] ?? null;
}
