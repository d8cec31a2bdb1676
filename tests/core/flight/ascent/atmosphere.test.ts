import { describe, expect, test } from 'vitest';
import { AirTable } from '#core/flight/ascent/air-table.ts';
import { exponentialAir, standardAir } from '#core/flight/ascent/atmosphere.ts';
import type { Air } from '#core/flight/ascent/atmosphere.ts';
import { reference } from '#tests/support/reference.ts';

const read: Record<string, (air: Air) => number> = {
  temperature: (air) => air.temperature,
  pressure: (air) => air.pressure,
  density: (air) => air.density,
  'sound speed': (air) => air.soundSpeed,
};

describe('the standard atmosphere', () => {
  test.each(reference('atmosphere'))(
    '$id: $quantity at $altitude_km km is $printed $unit',
    ({ quantity, altitude_km, expected, tolerance }) => {
      expect(read[quantity]!(standardAir(Number(altitude_km) * 1000))).toBeWithin(expected, tolerance);
    },
  );

  test('is at rest: pressure falls by ρg, layer by layer', () => {
    // [derived] dp/dh = −ρ g₀ (r₀/(r₀ + Z))², the hydrostatic equation the standard is built on.
    for (let height = 500; height < 86_000; height += 777) {
      const fall = (standardAir(height + 1).pressure - standardAir(height - 1).pressure) / 2;
      const gravity = 9.80665 * (6_356_766 / (6_356_766 + height)) ** 2;
      expect(fall / (-standardAir(height).density * gravity)).toBeWithin(1, 1e-5);
    }
  });

  test('is none beyond 1,000 km', () => {
    expect(standardAir(1_000_001).density).toBe(0);
  });
});

describe('the table of an atmosphere', () => {
  const airs = {
    standard: { air: standardAir, width: 1e-4 },
    exponential: { air: exponentialAir(1.225, 7200), width: 1e-5 },
  };
  test.each(Object.entries(airs))('follows the %s one', (_, { air, width }) => {
    const table = new AirTable(air);
    // Off the grid's nodes, through every layer and the seam.
    for (let height = -1500; height < 400_000; height += 137.3) {
      table.look(height);
      const exact = air(height);
      // A corner between two published rows or layers rounds off within a step of the grid.
      const rows = height > 85_900 && air === standardAir;
      expect(table.density / exact.density).toBeWithin(1, rows ? 3e-3 : width);
      if (exact.pressure > 0) expect(table.pressure / exact.pressure).toBeWithin(1, rows ? 3e-3 : width);
      if (height < 86_000) expect(table.soundSpeed).toBeWithin(exact.soundSpeed, 0.05);
    }
  });

  test('gives the slope of its own density', () => {
    const table = new AirTable(standardAir);
    for (let height = 130; height < 85_000; height += 1710) {
      table.look(height + 0.5);
      const above = table.density;
      table.look(height - 0.5);
      const below = table.density;
      table.look(height);
      expect(table.densitySlope / (above - below)).toBeWithin(1, 1e-5);
    }
  });

  test('stays level below its bottom and gives no air above its top', () => {
    const table = new AirTable(standardAir);
    table.look(-2000);
    const bottom = table.density;
    table.look(-50_000);
    expect(table.density).toBe(bottom);
    table.look(2e6);
    expect([table.density, table.pressure]).toEqual([0, 0]);
  });
});
