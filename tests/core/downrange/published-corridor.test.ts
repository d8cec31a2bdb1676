import { describe, expect, test } from 'vitest';
import {
  NAUTICAL_MILE as NM,
  VEHICLE_CLASSES,
  classOfPayload,
  payloadLimit,
  type ClassColumn,
  type VehicleClass,
} from '#core/downrange/index.ts';
import { exclusionArea, halfWidthAt, shapeOf } from '#core/downrange/shape.ts';
import { CLASS_DIMENSIONS, LONGEST_RANGE } from '#core/downrange/vehicle-class.ts';
import { kilograms, metres } from '#core/units.ts';
import { reference, type ReferenceRow } from '#tests/support/reference.ts';

const FOOT = 0.3048;
const POUND = 0.45359237;

/** What core says to a row's question, in the row's unit. */
function answer({ quantity, class: name, at_nm: at }: ReferenceRow<'corridor'>): number {
  const vehicleClass = name as VehicleClass;
  const dimensions = CLASS_DIMENSIONS[vehicleClass];
  const shape = shapeOf(vehicleClass, LONGEST_RANGE);
  const s = Number(at) * NM;
  const [tangentS = 0, tangentY = 0] = shape.corners[0] ?? [];
  const slope = (halfWidthAt(shape, s + 1000) - halfWidthAt(shape, s - 1000)) / 2000;
  const answers: Readonly<Record<string, number>> = {
    width: (2 * halfWidthAt(shape, s)) / NM,
    'half width': halfWidthAt(shape, s) / NM,
    'circle radius': dimensions.circleRadius / FOOT,
    'circle radius in nm': dimensions.circleRadius / NM,
    'exclusion length': dimensions.exclusionLength / NM,
    'exclusion area': exclusionArea(shape) / 1e6,
    divergence: (Math.atan(slope) * 180) / Math.PI,
    'tangent uprange': -tangentS / NM,
    'tangent crossrange': tangentY / NM,
    'payload limit 28': (payloadLimit(28, vehicleClass) ?? 0) / POUND,
    'payload limit 90': (payloadLimit(90, vehicleClass) ?? 0) / POUND,
  };
  return answers[quantity] ?? NaN;
}

describe('the corridor’s published figures', () => {
  test.each(reference('corridor'))('$id: $quantity $class $at_nm', (row) => {
    expect(answer(row)).toBeWithin(row.expected, row.tolerance);
  });
});

describe('classOfPayload', () => {
  // 14 CFR 420.19, table 1 [read]: the limit itself belongs to the smaller class, a pound more to the next.
  test.each([28, 90] as ClassColumn[])('turns at the limits of the %s° column', (column) => {
    VEHICLE_CLASSES.slice(0, -1).forEach((name, at) => {
      const limit = payloadLimit(column, name);
      if (limit === null) throw new Error(`${name} has no limit`);
      expect(classOfPayload(limit, column)).toBe(name);
      expect(classOfPayload(kilograms(limit + POUND), column)).toBe(VEHICLE_CLASSES[at + 1]);
    });
    expect(payloadLimit(column, 'large')).toBeNull();
    expect(classOfPayload(kilograms(1e6), column)).toBe('large');
    expect(() => classOfPayload(kilograms(NaN), column)).toThrow(RangeError);
  });
});

describe('shapeOf', () => {
  test('refuses a range that the regulation has no corridor for', () => {
    expect(() => shapeOf('small', metres(5001 * NM))).toThrow(RangeError);
    expect(() => shapeOf('large', metres(12 * NM))).toThrow(RangeError);
    expect(() => shapeOf('small', metres(NaN))).toThrow(RangeError);
  });

  test('has no width beyond its ends', () => {
    const shape = shapeOf('medium', metres(1000 * NM));
    expect(halfWidthAt(shape, -shape.circleRadius - 1)).toBe(-1);
    expect(halfWidthAt(shape, 1000 * NM + 1)).toBe(-1);
    expect(halfWidthAt(shape, 0)).toBeGreaterThan(shape.circleRadius);
  });
});
