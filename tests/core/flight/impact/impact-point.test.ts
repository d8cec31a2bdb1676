import fc from 'fast-check';
import { Geodesic } from 'geographiclib-geodesic';
import { describe, expect, test } from 'vitest';
import { EARTH, geodeticOf } from '#core/flight/ascent/planet.ts';
import { inertialState } from '#core/flight/impact/ground-state.ts';
import { impactPoint } from '#core/flight/impact/impact-point.ts';
import { fromDegrees, metres, metresPerSecond, toDegrees } from '#core/units.ts';
import { SEED } from '#tests/support/flights.ts';
import { reference } from '#tests/support/reference.ts';

const stateAt = (
  latitude: number,
  longitude: number,
  altitude: number,
  speed: number,
  path: number,
  heading: number,
): Float64Array =>
  inertialState({
    latitude: fromDegrees(latitude),
    longitude: fromDegrees(longitude),
    altitude: metres(altitude),
    relativeSpeed: metresPerSecond(speed),
    flightPath: fromDegrees(path),
    heading: fromDegrees(heading),
  });

test.each(reference('impact-point'))(
  '$id: $quantity from $latitude_deg°, $altitude_km km, $speed_mps m/s is $printed $unit',
  (row) => {
    const state = stateAt(
      Number(row.latitude_deg),
      Number(row.longitude_deg),
      Number(row.altitude_km) * 1000,
      Number(row.speed_mps),
      Number(row.path_deg),
      Number(row.heading_deg),
    );
    const found = impactPoint(state);
    if (found.kind !== 'impact') throw new Error(`no impact but ${found.kind}`);
    const figures: Record<string, number> = {
      latitude: toDegrees(found.latitude),
      longitude: toDegrees(found.longitude),
      'fall time': found.time,
    };
    expect(figures[row.quantity]).toBeWithin(row.expected, row.tolerance);
  },
);

/** The fall stepped through second by second in the inertial frame, two-body, and its last second halved. */
function fallStepwise(start: Float64Array): { state: number[]; time: number } {
  const mu = EARTH.gravitationalParameter;
  const rates = ([x, y, z, vx, vy, vz]: number[]): number[] => {
    const k = -mu / Math.hypot(x!, y!, z!) ** 3;
    return [vx!, vy!, vz!, k * x!, k * y!, k * z!];
  };
  const plus = (a: number[], b: number[], h: number) => a.map((value, k) => value + h * b[k]!);
  const step = (state: number[], h: number): number[] => {
    const k1 = rates(state);
    const k2 = rates(plus(state, k1, h / 2));
    const k3 = rates(plus(state, k2, h / 2));
    const k4 = rates(plus(state, k3, h));
    return state.map((value, k) => value + (h / 6) * (k1[k]! + 2 * k2[k]! + 2 * k3[k]! + k4[k]!));
  };
  const height = (state: number[]) => geodeticOf(EARTH, Math.hypot(state[0]!, state[1]!), state[2]!).height;
  let [state, time] = [[...start], 0];
  for (let next = step(state, 1); height(next) > 0; next = step(state, 1)) {
    state = next;
    time += 1;
  }
  for (let h = 0.5; h > 1e-9; h /= 2) {
    const next = step(state, h);
    if (height(next) <= 0) continue;
    state = next;
    time += h;
  }
  return { state, time };
}

describe('an impact point', () => {
  test('is where the fall, stepped through, comes down', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -89, max: 89, noNaN: true }),
        fc.double({ min: 1000, max: 250_000, noNaN: true }),
        fc.double({ min: 10, max: 6500, noNaN: true }),
        fc.double({ min: -60, max: 85, noNaN: true }),
        fc.double({ min: 0, max: 360, noNaN: true }),
        (latitude, altitude, speed, path, heading) => {
          const start = stateAt(latitude, 12, altitude, speed, path, heading);
          const found = impactPoint(start);
          if (found.kind !== 'impact') throw new Error(`no impact but ${found.kind}`);
          const { state, time } = fallStepwise(start);
          expect(found.time).toBeWithin(time, 1e-4);
          const p = Math.hypot(state[0]!, state[1]!);
          const longitude = Math.atan2(state[1]!, state[0]!) - EARTH.rotationRate * time;
          const { s12 } = Geodesic.WGS84.Inverse(
            toDegrees(found.latitude),
            toDegrees(found.longitude),
            (geodeticOf(EARTH, p, state[2]!).latitude * 180) / Math.PI,
            (longitude * 180) / Math.PI,
          );
          expect(s12).toBeWithin(0, 1);
        },
      ),
      { ...SEED, numRuns: 60 },
    );
  });

  test('lies at the closed form’s range on a still, round Earth', () => {
    // [derived] cos(Ψ/2) = (1 − Q cos²φ)/√(1 + Q(Q − 2) cos²φ) (Bate, Mueller and White, chapter 6): Q = 0.8 at 30°
    // gives 81.786789°.
    const round = { ...EARTH, eccentricitySquared: 0, secondZonalHarmonic: 0, rotationRate: 0 };
    const r = round.equatorialRadius;
    const speed = Math.sqrt((0.8 * round.gravitationalParameter) / r);
    const [sin, cos] = [Math.sin(fromDegrees(30)), Math.cos(fromDegrees(30))];
    // From 20° south, 40° east of north.
    const [ls, lc] = [Math.sin(fromDegrees(-20)), Math.cos(fromDegrees(-20))];
    const [north, east] = [speed * cos * Math.cos(fromDegrees(40)), speed * cos * Math.sin(fromDegrees(40))];
    const up = speed * sin;
    const found = impactPoint([r * lc, 0, r * ls, up * lc - north * ls, east, up * ls + north * lc], round);
    if (found.kind !== 'impact') throw new Error(`no impact but ${found.kind}`);
    const globe = new Geodesic.Geodesic(r, 0);
    const line = globe.Inverse(-20, 0, toDegrees(found.latitude), toDegrees(found.longitude));
    expect(line.a12!).toBeWithin(81.786789, 5e-7);
    expect(line.azi1!).toBeWithin(40, 1e-9);
  });

  test('of a short hop lies beside the pad', () => {
    // [derived] 30 m/s straight up: 2 v/g, g = μ/r² − ω² p cos φ at 45°, r = 6,367,489.5 m and p = 4,517,590.879 m.
    const pull = 3.986004418e14 / 6_367_489.5 ** 2 - 7.292115e-5 ** 2 * 4_517_590.879 * Math.SQRT1_2;
    const found = impactPoint(stateAt(45, 100, 0, 30, 90, 0));
    expect(found.kind).toBe('impact');
    if (found.kind !== 'impact') return;
    expect(found.time).toBeWithin(60 / pull, 1e-4);
    expect(toDegrees(found.longitude)).toBeWithin(100, 1e-5);
  });

  test('is none in orbit, on escape and below the ground', () => {
    // [derived] 7,793.152 m/s is circular at 185 km over the equatorial radius.
    const circular = [6_563_137, 0, 0, 0, 7793.152 * Math.SQRT1_2, 7793.152 * Math.SQRT1_2];
    expect(impactPoint(circular)).toEqual({ kind: 'orbit' });
    expect(impactPoint([6_563_137, 0, 0, 3000, 11_000, 0])).toEqual({ kind: 'escape' });
    expect(impactPoint([6_370_000, 0, 0, 100, 0, 0])).toEqual({ kind: 'none' });
    expect(impactPoint([7e6, 0, 0, -12_000, 10, 0]).kind).toBe('impact');
    expect(impactPoint([7e6, 0, 0, -2000, 13_000, 0]).kind).toBe('escape');
  });

  test('of a near-graze over the equator’s bulge is found', () => {
    // Polar, with perigee over the equator 5 km below its surface but 10 km above a sphere of the mean radius.
    const [ra, rp] = [7e6, EARTH.equatorialRadius - 5000];
    const speed = Math.sqrt(EARTH.gravitationalParameter * (2 / ra - 2 / (ra + rp)));
    expect(impactPoint([ra, 0, 0, 0, 0, speed]).kind).toBe('impact');
    // And with perigee over the pole, 5 km below the equator's radius, it clears the flatter ground there.
    expect(impactPoint([0, 0, ra, speed, 0, 0]).kind).toBe('orbit');
  });
});
