import { describe, expect, test } from 'vitest';
import { classOfVehicle, payloadLimit } from '#core/downrange/index.ts';
import type { Vehicle } from '#core/flight/index.ts';
import { kilograms, metresPerSecond, newtons, seconds } from '#core/units.ts';

const SETTINGS = { turnSpeedFraction: 0.6 };
const G0 = 9.80665;

/** One stage of such thrust that no loss enters but those given: the rocket equation by hand. */
const rocket = (propellant: number, dry: number, impulse: number): Vehicle => ({
  fairingMass: kilograms(0),
  fairingLeavesAfterStage: 1,
  reserve: metresPerSecond(0),
  losses: { gravity: metresPerSecond(1000), drag: metresPerSecond(0), steering: metresPerSecond(0) },
  stages: [
    {
      dryMass: kilograms(dry),
      propellantMass: kilograms(propellant),
      vacuumThrust: newtons(1e7),
      vacuumImpulse: seconds(impulse),
    },
  ],
});

/**
 * Payload of that stage by hand: circular speed at a + 185.2 km less the turning of a pad at 28° (vis-viva, WGS 84,
 * SMAD section 6.4), then m = (m_p − (q − 1) m_d)/(q − 1) with q = e^(Δv/(g₀ I_sp)).
 */
function byHand(propellant: number, dry: number, impulse: number, inclinationDeg: number): number {
  const radian = Math.PI / 180;
  const [a, e2] = [6_378_137, 0.00669437999014];
  const speed = Math.sqrt(3.986004418e14 / (a + 185_200));
  const sin = Math.sin(28 * radian);
  const N = a / Math.sqrt(1 - e2 * sin * sin);
  const turning = 7.292115e-5 * N * Math.cos(28 * radian);
  const geocentric = Math.atan((1 - e2) * Math.tan(28 * radian));
  const sinBeta = Math.cos(inclinationDeg * radian) / Math.cos(geocentric);
  const east = speed * sinBeta - turning;
  const required = Math.hypot(east, speed * Math.sqrt(1 - sinBeta * sinBeta));
  const q = Math.exp((required + 1000) / (G0 * impulse));
  return (propellant - (q - 1) * dry) / (q - 1);
}

describe('classOfVehicle', () => {
  test.each([28, 90] as const)('goes by the payload at %s°, worked by hand', (column) => {
    const found = classOfVehicle(rocket(60_000, 2000, 400), SETTINGS, column);
    if (found.kind !== 'class') throw new Error('falls short');
    expect(found.payload).toBeWithin(byHand(60_000, 2000, 400, column), 0.02);
    const limits = (['small', 'medium', 'medium-large'] as const).map(
      (name) => payloadLimit(column, name) ?? 0,
    );
    const names = ['small', 'medium', 'medium-large', 'large'] as const;
    expect(found.vehicleClass).toBe(names[limits.filter((limit) => limit < found.payload).length]);
  });

  test('puts one vehicle into a greater class at 90° where the limits are lower', () => {
    // By hand 1,976 kg at 28°, under the small limit of 1,996 kg, and 1,671 kg at 90°, over that of 1,497 kg.
    const vehicle = rocket(20_000, 700, 400);
    const [low, polar] = ([28, 90] as const).map((column) => classOfVehicle(vehicle, SETTINGS, column));
    expect(byHand(20_000, 700, 400, 28)).toBeLessThan(1996);
    expect(byHand(20_000, 700, 400, 90)).toBeGreaterThan(1497);
    expect(low).toMatchObject({ kind: 'class', vehicleClass: 'small' });
    expect(polar).toMatchObject({ kind: 'class', vehicleClass: 'medium' });
  });

  test('says by how much a vehicle misses the orbit', () => {
    const found = classOfVehicle(rocket(1000, 900, 250), SETTINGS, 28);
    expect(found).toMatchObject({ kind: 'falls-short' });
  });
});
