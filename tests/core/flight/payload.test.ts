import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { payloadFor, PayloadSolver } from '#core/flight/payload.ts';
import { burnsOf, idealDeltaV } from '#core/flight/vehicle.ts';
import { kilograms, metresPerSecond } from '#core/units.ts';
import { anyVehicle, losses, medium, SEED, stage } from '#tests/support/flights.ts';
import { plainPayload } from '#tests/support/plain-flight.ts';

const deltaV = fc.double({ min: 200, max: 16_000, noNaN: true });
const carried = (solver: PayloadSolver, wanted: number) => {
  const payload = solver.carriedFor(metresPerSecond(wanted));
  return payload.kind === 'carries' ? payload.mass : 0;
};

describe('payload', () => {
  test('is the root that halving finds, to 0.01 kg, or falls short by what is missing', () => {
    fc.assert(
      fc.property(anyVehicle, deltaV, (vehicle, wanted) => {
        const payload = payloadFor(vehicle, metresPerSecond(wanted));
        const plain = plainPayload(vehicle, wanted);
        if (payload.kind === 'carries') expect(payload.mass).toBeWithin(plain, 0.01);
        if (payload.kind !== 'falls-short') return;
        expect(plain).toBe(-1);
        const most = idealDeltaV(burnsOf(vehicle), kilograms(0));
        expect(payload.shortfall).toBeWithin(wanted - most, 1e-9);
      }),
      { ...SEED, numRuns: 2000 },
    );
  }, 60_000);

  test('never rises with the Δv asked for', () => {
    fc.assert(
      fc.property(anyVehicle, deltaV, deltaV, (vehicle, one, two) => {
        const solver = new PayloadSolver(vehicle);
        const [less, more] = [Math.min(one, two), Math.max(one, two)];
        expect(carried(solver, more)).toBeLessThanOrEqual(carried(solver, less) + 1e-3);
      }),
      { ...SEED, numRuns: 2000 },
    );
  });

  test('never rises with losses or reserve: they are Δv like any other', () => {
    const base = new PayloadSolver(medium);
    const lossy = new PayloadSolver({ ...medium, losses: losses(1400, 100, 60) });
    expect(lossy.losses).toBe(1560);
    expect(lossy.reserve).toBe(base.reserve);
    expect(carried(lossy, 7400 + lossy.losses)).toBeLessThan(carried(base, 7400 + base.losses));
  });

  test('at exactly what the empty vehicle gives there is none, and no shortfall', () => {
    const solver = new PayloadSolver(medium);
    expect(solver.carriedFor(solver.mostDeltaV)).toEqual({ kind: 'carries', mass: 0 });
  });
});

describe('burns', () => {
  test('boosters that burn as long as the core leave it nothing to burn alone', () => {
    const core = stage(100_000, 8000, 2000, 300);
    const booster = stage(10_000, 1000, 200, 300);
    const [together, alone] = burnsOf({
      ...medium,
      boosters: { count: 2, ...booster },
      stages: [core, stage(20_000, 2000, 200, 340)],
    });
    expect(alone?.startMass).toBeWithin(alone?.endMass ?? NaN, 1e-6);
    expect((together?.startMass ?? NaN) - (together?.endMass ?? NaN)).toBeWithin(120_000, 1e-6);
  });

  test('boosters that outlast the core are refused', () => {
    const boosters = { count: 2, ...stage(30_000, 3000, 200, 280) };
    expect(() => burnsOf({ ...medium, boosters, stages: [stage(10_000, 900, 900, 300)] })).toThrow(
      RangeError,
    );
  });

  test('a fairing that leaves after a stage that is not there is refused', () => {
    expect(() => burnsOf({ ...medium, fairingLeavesAfterStage: 3 })).toThrow(RangeError);
  });

  test('the combined impulse is the flow-weighted mean at 0.75 of the step from sea level', () => {
    const [together, alone] = burnsOf(medium);
    // By hand: boosters 252 + 0.75 × 27 = 272.25 s, core 283 + 0.75 × 28 = 304 s; flows in kN/s of impulse.
    const flows = { boosters: 1200 / 279, core: 3350 / 311 };
    const mean = (flows.boosters * 272.25 + flows.core * 304) / (flows.boosters + flows.core);
    expect(together?.exhaustSpeed).toBeWithin(9.80665 * mean, 1e-9);
    expect(alone?.exhaustSpeed).toBeWithin(9.80665 * 311, 1e-9);
  });

  test('without boosters a first stage counts 0.8 of the step; a later one its vacuum impulse', () => {
    const [first, second] = burnsOf({ ...medium, boosters: undefined });
    expect(first?.exhaustSpeed).toBeWithin(9.80665 * (283 + 0.8 * 28), 1e-9);
    expect(second?.exhaustSpeed).toBeWithin(9.80665 * 345, 1e-9);
  });

  test('the fairing is aboard until the named stage burns out', () => {
    const early = burnsOf({ ...medium, fairingLeavesAfterStage: 1 });
    const late = burnsOf({ ...medium, fairingLeavesAfterStage: 2 });
    expect((late.at(-1)?.startMass ?? NaN) - (early.at(-1)?.startMass ?? NaN)).toBeWithin(1350, 1e-9);
    expect(early[0]?.startMass).toBe(late[0]?.startMass);
  });
});
