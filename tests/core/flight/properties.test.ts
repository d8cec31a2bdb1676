import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { evaluateFlight, evaluateFlights } from '#core/flight/index.ts';
import type { Flight, FlownWay, Site } from '#core/flight/index.ts';
import { fromDegrees, radians } from '#core/units.ts';
import {
  anyOrbit,
  anySettings,
  anySite,
  anyVehicle,
  medium,
  orbitOf,
  SEED,
  SETTINGS,
  siteAt,
} from '#tests/support/flights.ts';

const RUNS = { ...SEED, numRuns: 1500 };
const wrap = (angle: number) => ((angle % (2 * Math.PI)) + 2 * Math.PI) % (2 * Math.PI);

/** The site seen in a mirror laid along the equator: north becomes south. */
const mirrored = (site: Site): Site => ({
  ...site,
  latitude: radians(-site.latitude),
  sectors: site.sectors.map(({ from, to }) => ({
    from: radians(wrap(Math.PI - to)),
    to: radians(wrap(Math.PI - from)),
  })),
});

const waysOf = (flight: Flight): readonly FlownWay[] =>
  flight.kind === 'out-of-reach' ? [] : [flight, ...flight.others];

/** Every number anywhere in a result. */
function numbersIn(value: unknown): number[] {
  if (typeof value === 'number') return [value];
  return value !== null && typeof value === 'object' ? Object.values(value).flatMap(numbersIn) : [];
}

describe('any valid input', () => {
  test('gives finite numbers, totals that are the sum of their lines, azimuths from 0 to 360 and turns up to 60°', () => {
    fc.assert(
      fc.property(anySite, anyOrbit, anyVehicle, anySettings, (site, orbit, vehicle, settings) => {
        const flight = evaluateFlight(site, orbit, vehicle, settings);
        expect(numbersIn(flight).every(Number.isFinite)).toBe(true);
        for (const { budget, turn, planeChange, ...way } of waysOf(flight)) {
          const { required, losses, dogleg, planeChange: plane, transfer, reserve, total } = budget;
          expect(total).toBeWithin(required + losses + dogleg + plane + transfer + reserve, 1e-8);
          expect(Math.min(required, dogleg, plane, transfer)).toBeGreaterThanOrEqual(0);
          expect(way.rotationGain).toBeWithin(way.injectionSpeed - way.requiredSpeed, 1e-9);
          for (const azimuth of [way.launchAzimuth, way.inertialAzimuth]) {
            expect(azimuth).toBeGreaterThanOrEqual(0);
            expect(azimuth).toBeLessThan(2 * Math.PI);
          }
          expect(Math.max(turn, planeChange)).toBeLessThanOrEqual(fromDegrees(60 + 2e-9));
          if (way.payload.kind === 'falls-short') expect(way.payload.shortfall).toBeGreaterThan(0);
          if (way.payload.kind === 'carries') expect(way.payload.mass).toBeGreaterThanOrEqual(0);
        }
      }),
      RUNS,
    );
  }, 60_000);

  test('takes the cheapest way, within a tie, and lists the others cheapest first', () => {
    fc.assert(
      fc.property(anySite, anyOrbit, anySettings, (site, orbit, settings) => {
        const ways = waysOf(evaluateFlight(site, orbit, null, settings));
        ways.forEach(({ budget }, k) => {
          for (const later of ways.slice(k + 1)) {
            expect(budget.total).toBeLessThanOrEqual(later.budget.total + 1e-6);
          }
        });
      }),
      RUNS,
    );
  }, 60_000);

  test('gives the same one by one and in a batch', () => {
    fc.assert(
      fc.property(
        fc.array(anySite, { minLength: 1, maxLength: 4 }),
        fc.array(anyOrbit, { minLength: 1, maxLength: 3 }),
        fc.option(anyVehicle),
        anySettings,
        (sites, orbits, vehicle, settings) => {
          const table = evaluateFlights(sites, orbits, vehicle, settings);
          sites.forEach((site, s) =>
            orbits.forEach((orbit, o) => {
              const single = evaluateFlight(site, orbit, vehicle, settings);
              expect(table.flight(s, o)).toEqual(
                single.kind === 'out-of-reach' ? single : { ...single, others: [] },
              );
              const payload = single.kind === 'out-of-reach' ? undefined : single.payload;
              expect(table.payloadMass(s, o)).toBe(payload?.kind === 'carries' ? payload.mass : 0);
            }),
          );
        },
      ),
      { ...SEED, numRuns: 400 },
    );
  }, 60_000);
});

describe('symmetry', () => {
  test('north and south of the equator cost the same', () => {
    fc.assert(
      fc.property(anySite, anyOrbit, anySettings, (site, orbit, settings) => {
        const [north, south] = [site, mirrored(site)].map((one) =>
          evaluateFlight(one, orbit, null, settings),
        );
        if (north?.kind === 'out-of-reach' || south?.kind === 'out-of-reach') {
          expect(north?.kind).toBe(south?.kind);
          return;
        }
        expect(north?.budget.total ?? NaN).toBeWithin(south?.budget.total ?? NaN, 1e-5);
      }),
      RUNS,
    );
  }, 60_000);

  test('the northerly and the southerly answer need the same speed', () => {
    fc.assert(
      fc.property(anySite, anyOrbit, (site, orbit) => {
        const flight = evaluateFlight({ ...site, sectors: [] }, orbit, null, SETTINGS);
        const direct = waysOf(flight).filter(({ kind }) => kind === 'direct');
        for (const way of direct) {
          const twin = direct.find(({ profile, branch }) => profile === way.profile && branch !== way.branch);
          if (twin) expect(twin.requiredSpeed).toBeWithin(way.requiredSpeed, 1e-9);
        }
      }),
      RUNS,
    );
  }, 60_000);

  test('the longitude plays no part, the date line included', () => {
    const orbit = orbitOf(500, 500, 51.6);
    const at = (longitude: number) =>
      evaluateFlight(siteAt(34, [[20, 100]], 0, longitude), orbit, medium, SETTINGS);
    for (const longitude of [-179.999, -90, 179.999, 180]) expect(at(longitude)).toEqual(at(0));
  });
});

describe('the gain from the turning Earth', () => {
  test('depends on the inclination and hardly on the latitude: near ω a cos i', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -50, max: 50, noNaN: true }),
        fc.double({ min: 51, max: 129, noNaN: true }),
        (latitude, inclination) => {
          const flight = evaluateFlight(siteAt(latitude), orbitOf(185, 185, inclination), null, SETTINGS);
          if (flight.kind !== 'direct') throw new Error('every such inclination is reached');
          // ω a cos i less the second-order term, half the squared site speed across the plane over v: at most 14 m/s.
          const first = 7.292115e-5 * 6_378_137 * Math.cos(fromDegrees(inclination));
          expect(flight.rotationGain).toBeWithin(first, 14.5);
        },
      ),
      RUNS,
    );
  });
});
