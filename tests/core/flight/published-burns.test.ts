import { describe, expect, test } from 'vitest';
import { circularSpeed, radiusOf, speedAt } from '#core/flight/orbit.ts';
import { payloadFor } from '#core/flight/payload.ts';
import {
  bestSplit,
  burnOf,
  costOf,
  sharedPlaneChange,
  simplePlaneChange,
} from '#core/flight/plane-change.ts';
import type { Vehicle } from '#core/flight/types.ts';
import { burnsOf, idealDeltaV, massFlow } from '#core/flight/vehicle.ts';
import {
  fromDegrees,
  fromKilometres,
  kilograms,
  metresPerSecond,
  newtons,
  radians,
  seconds,
  toDegrees,
} from '#core/units.ts';
import { reference } from '#tests/support/reference.ts';
import type { ReferenceRow } from '#tests/support/reference.ts';

type Row = ReferenceRow<'plane-change'>;

const change = (row: Row) => fromDegrees(Number(row.change_deg));
const speed = (km: string) => circularSpeed(radiusOf(fromKilometres(Number(km))));

/** The two burns of the transfer between the row's circles. */
function burns(row: Row) {
  const low = radiusOf(fromKilometres(Number(row.low_km)));
  const high = radiusOf(fromKilometres(Number(row.high_km)));
  const axis = (low + high) / 2;
  return {
    first: burnOf(circularSpeed(low), speedAt(low, axis)),
    second: burnOf(speedAt(high, axis), circularSpeed(high)),
  };
}

function sum(row: Row, share: number): number {
  const { first, second } = burns(row);
  return costOf(first, share) + costOf(second, change(row) - share);
}

const least = (row: Row) => {
  const { first, second } = burns(row);
  return sharedPlaneChange(first, second, change(row));
};

const share = (row: Row) => {
  const { first, second } = burns(row);
  return toDegrees(radians(bestSplit(first, second, change(row))));
};

const quantities: Record<string, (row: Row) => number> = {
  alone: (row) => simplePlaneChange(speed(row.low_km), change(row)),
  coplanar: (row) => costOf(burns(row).first, 0) + costOf(burns(row).second, 0),
  'all at apogee': (row) => sum(row, 0),
  'apogee burn': (row) => costOf(burns(row).second, change(row)),
  'share at perigee': share,
  saving: (row) => 100 * (1 - least(row) / sum(row, 0)),
  least,
};

describe('plane change and transfer', () => {
  test.each(reference('plane-change'))('$id $quantity', (row) => {
    expect(quantities[row.quantity]?.(row) ?? NaN).toBeWithin(row.expected, row.tolerance);
  });
});

/** Thrust plays no part in these examples; any will do. */
const stage = (propellantKg: number, dryKg: number, impulseS: number) => ({
  dryMass: kilograms(dryKg),
  propellantMass: kilograms(propellantKg),
  vacuumThrust: newtons(1e6),
  vacuumImpulse: seconds(impulseS),
});

const vehicleOf = (...stages: Vehicle['stages']): Vehicle => ({
  fairingMass: kilograms(0),
  fairingLeavesAfterStage: 1,
  reserve: metresPerSecond(0),
  losses: { gravity: metresPerSecond(0), drag: metresPerSecond(0), steering: metresPerSecond(0) },
  stages,
});

/** The example's two stages: 100 t and 8 t at 300 s, 20 t and 2 t at 340 s. */
const twoStages = vehicleOf(stage(100_000, 8000, 300), stage(20_000, 2000, 340));

/** Impulse of a stage of the four-phase ascent benchmark from its thrust, propellant and burn time. */
const impulseOf = (thrustN: number, propellantKg: number, burnS: number) =>
  (massFlow({ ...stage(1, 1, 1), vacuumThrust: newtons(thrustN) }) * burnS) / propellantKg;

/** The benchmark's four burns: six boosters with the core, three with the core, the core alone, the second stage. */
function fourBurns(): number {
  const [booster, core, second] = [226.196809, 366.091954, 24.028571];
  const burn = (thrustN: number, flow: number, startKg: number, endKg: number) => ({
    exhaustSpeed: metresPerSecond(thrustN / flow),
    startMass: kilograms(startKg),
    endMass: kilograms(endKg),
  });
  return idealDeltaV(
    [
      burn(4_854_100, 6 * booster + core, 301_454, 171_863.885057),
      burn(2_968_600, 3 * booster + core, 158_183.885057, 79_623.770115),
      burn(1_083_100, core, 72_783.770115, 32_294),
      burn(110_094, second, 23_464, 7529.712412),
    ],
    kilograms(0),
  );
}

const rocket: Record<string, (row: ReferenceRow<'rocket'>) => number> = {
  'one burn': () => idealDeltaV(burnsOf(vehicleOf(stage(4000, 1000, 300))), kilograms(0)),
  ideal: (row) => idealDeltaV(burnsOf(twoStages), kilograms(Number(row.payload_kg))),
  'booster impulse': () => impulseOf(628_500, 17_010, 75.2),
  'second stage impulse': () => impulseOf(110_094, 16_820, 700),
  'four burns': fourBurns,
  payload: (row) => {
    const payload = payloadFor(twoStages, metresPerSecond(Number(row.delta_v_mps)));
    return payload.kind === 'carries' ? payload.mass : NaN;
  },
};

describe('the rocket equation', () => {
  test.each(reference('rocket'))('$id $quantity', (row) => {
    expect(rocket[row.quantity]?.(row) ?? NaN).toBeWithin(row.expected, row.tolerance);
  });
});
