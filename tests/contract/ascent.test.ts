import { describe, expect, test } from 'vitest';
import { AscentInput, AscentOutput } from '#contract/ascent.ts';
import { ascentBytes, flyAscent } from '#contract/flown-ascent.ts';
import { ImpactPointInput } from '#contract/impact-point.ts';
import library from '#seed/vehicles.json' with { type: 'json' };
import { findImpactPoint } from '#server/ascents/find-impact-point.ts';
import { respondWithAscent } from '#server/ascents/respond.ts';

type LibraryVehicle = (typeof library.vehicles)[number];
const [alder, rowan] = library.vehicles as [LibraryVehicle, LibraryVehicle];
const site = { latitudeDeg: 7.3306, longitudeDeg: -58.5002, elevationM: 6 };
const orbit = { perigeeKm: 420, apogeeKm: 420, inclinationDeg: 51.6 };
const request = (change: Record<string, unknown> = {}) => ({ site, orbit, vehicle: rowan, ...change });

/** The dotted paths of what does not fit. */
function refused(change: Record<string, unknown>): string[] {
  const result = AscentInput.safeParse(request(change));
  return result.success ? [] : result.error.issues.map(({ path }) => path.join('.'));
}

describe('an ascent over the interface', () => {
  const answer = AscentOutput.parse(flyAscent(AscentInput.parse(request())));
  if (!answer.converged) throw new Error(`not flown: ${answer.reason}`);
  const { trajectory } = answer;
  const [first, last] = [trajectory[0]!, trajectory.at(-1)!];

  test('starts on the pad and ends at the injection', () => {
    expect(first.timeS).toBe(0);
    expect(first.latitudeDeg).toBeWithin(site.latitudeDeg, 1e-9);
    expect(first.longitudeDeg).toBeWithin(site.longitudeDeg, 1e-9);
    expect(first.altitudeM).toBeWithin(site.elevationM, 1e-3);
    expect(first.relativeSpeedMps).toBe(0);
    expect(last.timeS).toBe(answer.burnOutS);
    expect(last.relativeSpeedMps).toBeWithin(answer.relativeSpeedMps, 1e-6);
    expect(last.massKg).toBeGreaterThan(answer.payloadKg);
    expect(last.impact).toEqual({ kind: 'orbit' });
    expect(answer.flownInclinationDeg).toBeWithin(51.6, 1e-5);
  });

  test('goes forward in time, loses mass and never stands below its pad', () => {
    trajectory.slice(1).forEach((point, k) => {
      const before = trajectory[k]!;
      expect(point.timeS).toBeGreaterThan(before.timeS - 1e-9);
      expect(point.massKg).toBeLessThanOrEqual(before.massKg);
      expect(point.altitudeM).toBeGreaterThanOrEqual(site.elevationM - 1e-3);
    });
  });

  test('gives each moment the impact point that the interface gives for it', () => {
    for (const point of trajectory.filter((_, k) => k % 9 === 4)) {
      const { latitudeDeg, longitudeDeg, altitudeM, relativeSpeedMps, flightPathDeg, headingDeg } = point;
      const found = findImpactPoint(
        ImpactPointInput.parse({
          latitudeDeg,
          longitudeDeg,
          altitudeM,
          relativeSpeedMps,
          flightPathDeg,
          headingDeg,
        }),
      );
      if (point.impact.kind !== 'impact' || found.kind !== 'impact') {
        expect(found).toEqual(point.impact);
        continue;
      }
      expect(found.latitudeDeg).toBeWithin(point.impact.latitudeDeg, 1e-6);
      expect(found.longitudeDeg).toBeWithin(point.impact.longitudeDeg, 1e-6);
      expect(found.timeS).toBeWithin(point.impact.timeS, 1e-4);
    }
  });

  test('closes: relative speed and losses less the centrifugal gain are the ideal Δv', () => {
    const { gravity, drag, steering, backPressure } = answer.lossesMps;
    const spent = answer.relativeSpeedMps + gravity + drag + steering + backPressure;
    expect(spent - answer.centrifugalMps).toBeWithin(answer.idealDeltaVMps, 0.1);
    // [derived] Tsiolkovsky: boosters with the core, the core, the second stage to what is left, vacuum impulses.
    const g0 = 9.80665;
    const [core, second] = rowan.stages as [(typeof rowan.stages)[0], (typeof rowan.stages)[0]];
    const { boosters } = rowan!;
    const flow = (engine: { thrustVacKn: number; ispVacS: number }) =>
      (engine.thrustVacKn * 1000) / (g0 * engine.ispVacS);
    const time = boosters!.propellantKg / flow(boosters!);
    const upper = second!.dryKg + second!.propellantKg + answer.payloadKg;
    const withCore = upper + core.dryKg + core.propellantKg + rowan.fairingKg;
    const start = withCore + 2 * (boosters!.dryKg + boosters!.propellantKg);
    expect(first.massKg).toBeWithin(start, 1e-6);
    const coreBurnt = time * flow(core);
    const thrust = 2 * boosters!.thrustVacKn * 1000 + core.thrustVacKn * 1000;
    const together = thrust / (2 * flow(boosters!) + flow(core));
    const ideal =
      together * Math.log(start / (start - 2 * boosters!.propellantKg - coreBurnt)) +
      g0 * core.ispVacS * Math.log((withCore - coreBurnt) / (withCore - core.propellantKg)) +
      g0 * second.ispVacS * Math.log(upper / last.massKg);
    expect(answer.idealDeltaVMps).toBeWithin(ideal, 0.05);
  });

  test('leaves propellant that just covers transfer and reserve', () => {
    // [derived] Hohmann transfer 185 → 420 km: 67.95 + 67.36 m/s by vis-viva, and 60 m/s of reserve.
    const [mu, r1, r2] = [3.986004418e14, 6_563_137, 6_798_137];
    const a = (r1 + r2) / 2;
    const burns =
      Math.sqrt(mu * (2 / r1 - 1 / a)) -
      Math.sqrt(mu / r1) +
      Math.sqrt(mu / r2) -
      Math.sqrt(mu * (2 / r2 - 1 / a));
    const empty = rowan.stages[1]!.dryKg + answer.payloadKg;
    const left = 9.80665 * rowan.stages[1]!.ispVacS * Math.log(last.massKg / empty);
    expect(left).toBeWithin(burns + 60, 0.01);
  });

  test('is answered off the main thread with the same bytes', async () => {
    let asked = 0;
    const input = AscentInput.parse(request({ vehicle: alder }));
    const response = await respondWithAscent(input, async (each) => {
      asked += 1;
      return ascentBytes(each);
    });
    expect(asked).toBe(1);
    expect(response.headers.get('content-type')).toBe('application/json');
    expect(await response.json()).toEqual(flyAscent(input));
  });
});

test('an orbit that is not flown comes with its reason and no figure', () => {
  const answer = AscentOutput.parse(
    flyAscent(
      AscentInput.parse(
        request({
          vehicle: alder,
          site: { ...site, latitudeDeg: 60 },
          orbit: { ...orbit, apogeeKm: 35_786, inclinationDeg: 10 },
        }),
      ),
    ),
  );
  expect(answer).toMatchObject({ converged: false, reason: 'falls-short', payloadKg: null, trajectory: [] });
});

test('a direct profile is flown to the perigee of its orbit', () => {
  const answer = flyAscent(
    AscentInput.parse(
      request({ orbit: { perigeeKm: 170, apogeeKm: 5000, inclinationDeg: 30, profile: 'direct' } }),
    ),
  );
  if (!answer.converged) throw new Error(answer.reason);
  // [derived] vis-viva at 170 km of 170 × 5,000 km; the air-relative speed is lower by about ω a cos i.
  const [mu, rp, ra] = [3.986004418e14, 6_548_137, 11_378_137];
  const speed = Math.sqrt(mu * (2 / rp - 2 / (rp + ra)));
  expect(answer.relativeSpeedMps).toBeWithin(speed - 7.292115e-5 * rp * Math.cos(Math.PI / 6), 25);
  const last = answer.trajectory.at(-1)!;
  expect(last.flightPathDeg).toBeWithin(0, 0.2);
});

describe('what does not fit is named', () => {
  const { ascent, ...bare } = rowan!;
  test.each([
    ['a vehicle without its ascent', { vehicle: bare }, ['vehicle.ascent']],
    [
      'a booster without its area',
      { vehicle: { ...rowan, boosters: { ...rowan.boosters, referenceAreaM2: undefined } } },
      ['vehicle.boosters.referenceAreaM2'],
    ],
    [
      'an unknown figure of the ascent',
      { vehicle: { ...rowan, ascent: { ...ascent, wings: 2 } } },
      ['vehicle.ascent'],
    ],
    [
      'a drag table that falls back',
      {
        vehicle: {
          ...rowan,
          ascent: {
            ...ascent,
            dragCoefficient: [
              [1, 0.4],
              [0.5, 0.3],
            ],
          },
        },
      },
      ['vehicle.ascent.dragCoefficient'],
    ],
    [
      'an orbit without an inclination',
      { orbit: { perigeeKm: 400, apogeeKm: 400 } },
      ['orbit.inclinationDeg'],
    ],
    ['a site off the Earth', { site: { ...site, latitudeDeg: 95 } }, ['site.latitudeDeg']],
    [
      'boosters that outlast the core',
      { vehicle: { ...rowan, boosters: { ...rowan.boosters, propellantKg: 99_000 } } },
      ['vehicle.boosters'],
    ],
  ])('%s', (_, change, paths) => {
    expect(refused(change)).toEqual(paths);
  });

  test('a drag table is taken in place of a number', () => {
    const table = [
      [0, 0.35],
      [0.9, 0.4],
      [1.2, 0.6],
      [4, 0.35],
    ];
    expect(refused({ vehicle: { ...rowan, ascent: { ...ascent, dragCoefficient: table } } })).toEqual([]);
  });
});
