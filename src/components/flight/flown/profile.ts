import type { TrajectoryPoint } from '#contract/ascent.ts';
import { between } from '#core/downrange/geodesic.ts';
import { toKilometres } from '#core/units.ts';
import type { VehicleInput } from '#contract/vehicle.ts';

/** A moment of a flight in the units that charts print. */
export interface Moment {
  timeS: number;
  /** Along the geodesic from the pad. */
  downrangeKm: number;
  altitudeKm: number;
  speedMps: number;
  pressureKpa: number;
  accelerationMps2: number;
}

export type Along = 'timeS' | 'downrangeKm';
export type ProfileKey = Exclude<keyof Moment, Along>;

/** The charts of a flight, one over the other. */
export const PROFILES = [
  { key: 'altitudeKm', name: 'Altitude', unit: 'km', decimals: 1 },
  { key: 'speedMps', name: 'Speed', unit: 'm/s', decimals: 0 },
  { key: 'pressureKpa', name: 'Dynamic pressure', unit: 'kPa', decimals: 1 },
  { key: 'accelerationMps2', name: 'Acceleration', unit: 'm/s²', decimals: 1 },
] as const satisfies { key: ProfileKey; name: string; unit: string; decimals: number }[];

const PASCALS = 1_000;

export function momentsOf(points: readonly TrajectoryPoint[]): Moment[] {
  const pad = points[0];
  if (!pad) return [];
  return points.map((point) => ({
    timeS: point.timeS,
    downrangeKm: toKilometres(between(pad, point).distance),
    altitudeKm: point.altitudeM / 1_000,
    speedMps: point.relativeSpeedMps,
    pressureKpa: point.dynamicPressurePa / PASCALS,
    accelerationMps2: point.accelerationMps2,
  }));
}

/** Where a time lies between the points of a flight: after a part is left behind where two share the moment. */
export function placeOf(
  points: readonly { timeS: number }[],
  timeS: number,
): { index: number; part: number } {
  const next = points.findIndex((point) => point.timeS > timeS);
  if (next === 0) return { index: 0, part: 0 };
  if (next < 0) return { index: Math.max(0, points.length - 1), part: 0 };
  const [from, to] = [points[next - 1]?.timeS ?? 0, points[next]?.timeS ?? 0];
  return { index: next - 1, part: (timeS - from) / (to - from) };
}

const between01 = (from: number, to: number, part: number): number => from + (to - from) * part;

/** The flight at a time, straight between its points; undefined where it has none. */
export function momentAt(moments: readonly Moment[], timeS: number): Moment | undefined {
  const { index, part } = placeOf(moments, timeS);
  const [from, to] = [moments[index], moments[index + 1]];
  if (!from || !to || part === 0) return from;
  return {
    timeS,
    downrangeKm: between01(from.downrangeKm, to.downrangeKm, part),
    altitudeKm: between01(from.altitudeKm, to.altitudeKm, part),
    speedMps: between01(from.speedMps, to.speedMps, part),
    pressureKpa: between01(from.pressureKpa, to.pressureKpa, part),
    accelerationMps2: between01(from.accelerationMps2, to.accelerationMps2, part),
  };
}

/** The limits that a vehicle is flown within, by chart; a vehicle may know none. */
export function limitsOf(vehicle: VehicleInput | null): Partial<Record<ProfileKey, number>> {
  const { maxDynamicPressurePa: pressure, maxAxialAccelerationMps2: acceleration } = vehicle?.ascent ?? {};
  return {
    ...(typeof pressure === 'number' ? { pressureKpa: pressure / PASCALS } : {}),
    ...(typeof acceleration === 'number' ? { accelerationMps2: acceleration } : {}),
  };
}
