import { kilograms, metres } from '../units.ts';
import type { Kilograms, Metres } from '../units.ts';

/** Classes of guided orbital launch vehicles by weight of payload, 14 CFR 420.19, table 1. */
export const VEHICLE_CLASSES = ['small', 'medium', 'medium-large', 'large'] as const;
export type VehicleClass = (typeof VEHICLE_CLASSES)[number];

/** An international nautical mile and an inch, exact. */
export const NAUTICAL_MILE = 1852;
const INCH = 0.0254;
/** A pound avoirdupois, exact (international yard and pound agreement, 1959). */
const POUND = 0.45359237;

/** The dimensions of a class's overflight exclusion zone and corridor. */
export interface ClassDimensions {
  /** D_max: radius about the launch point. */
  readonly circleRadius: Metres;
  /** D_OEZ: length of the overflight exclusion zone downrange. */
  readonly exclusionLength: Metres;
  /** Half of the corridor's widths at 10, 100 and 5,000 nautical miles (lines CF, DE and HI). */
  readonly halfWidths: readonly [Metres, Metres, Metres];
}

export const WIDTH_RANGES = [10, 100, 5000].map((miles) => metres(miles * NAUTICAL_MILE)) as [
  Metres,
  Metres,
  Metres,
];
/** No corridor is longer. */
export const LONGEST_RANGE = WIDTH_RANGES[2];

/** Inches as printed in the regulation's tables: circle, zone, widths at 10, 100 and 5,000 nm. */
function dimensions(
  circle: number,
  zone: number,
  widths: readonly [number, number, number],
): ClassDimensions {
  const half = widths.map((inches) => metres((inches * INCH) / 2)) as [Metres, Metres, Metres];
  return { circleRadius: metres(circle * INCH), exclusionLength: metres(zone * INCH), halfWidths: half };
}

/**
 * 14 CFR part 420, appendix A, tables.
 * @see downrangeReferences.appendixA, tests/reference/corridor.csv
 */
export const CLASS_DIMENSIONS: Readonly<Record<VehicleClass, ClassDimensions>> = {
  small: dimensions(87_600, 240_500, [2.8762e6, 8.59452e6, 128.566e6]),
  medium: dimensions(111_600, 253_000, [2.9722e6, 8.64252e6, 128.566e6]),
  'medium-large': dimensions(127_200, 310_300, [3.0346e6, 8.67372e6, 128.566e6]),
  large: dimensions(156_000, 937_700, [3.14979e6, 8.73131e6, 128.566e6]),
};

/** The table's two columns: payload to 100 nm circular at 28° from a pad at 28°, or at 90°. */
export type ClassColumn = 28 | 90;

/** Most payload of small, medium and medium large, in pounds. */
const LIMITS_LB: Readonly<Record<ClassColumn, readonly [number, number, number]>> = {
  28: [4400, 11_100, 18_500],
  90: [3300, 8400, 15_000],
};

/** The most payload of a class in a column; null for large, which has no bound. */
export function payloadLimit(column: ClassColumn, vehicleClass: VehicleClass): Kilograms | null {
  const pounds = LIMITS_LB[column][VEHICLE_CLASSES.indexOf(vehicleClass)];
  return pounds === undefined ? null : kilograms(pounds * POUND);
}

/**
 * The class of a vehicle by its payload to a circular orbit at 100 nautical miles.
 * @param column which column of the table the payload is for
 * @throws RangeError for a payload below 0
 * @see downrangeReferences.part420, tests/reference/corridor.csv
 */
export function classOfPayload(payload: Kilograms, column: ClassColumn): VehicleClass {
  if (!(payload >= 0)) throw new RangeError(`classOfPayload: payload of ${payload} kg`);
  const found = VEHICLE_CLASSES.find((name) => payload <= (payloadLimit(column, name) ?? Infinity));
  return found ?? 'large';
}
