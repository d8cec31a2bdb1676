import * as astronomy from 'astronomy-engine';
import fc from 'fast-check';
import geodesic from 'geographiclib-geodesic';
import { propagate, twoline2satrec } from 'satellite.js';
import { describe, expect, test } from 'vitest';
import { constants } from '#core/constants.ts';
import { meridianOf } from '#core/flight/earth.ts';
import { inclinationFlown, inertialAzimuths } from '#core/flight/launch-azimuth.ts';
import { nodeRate, speedAt } from '#core/flight/orbit.ts';
import { fromDegrees, metres, radians, toDegrees } from '#core/units.ts';
import { SEED } from '#tests/support/flights.ts';

/* Core beside general-purpose libraries over random inputs. */
const RUNS = { ...SEED, numRuns: 500 };
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const omega = constants.rotationRate.value;

describe('beside a geodesics library', () => {
  const wgs84 = geodesic.Geodesic.WGS84;
  const distance = (lat1: number, lon1: number, lat2: number, lon2: number) =>
    wgs84.Inverse(lat1, lon1, lat2, lon2).s12 ?? NaN;

  test('a site is carried along its parallel: the arc of a short step east gives its speed', () => {
    fc.assert(
      fc.property(between(-89, 89), (latitude) => {
        const step = 0.002;
        const arc = distance(latitude, 0, latitude, step);
        const speed = meridianOf(fromDegrees(latitude), metres(0)).rotationSpeed;
        // The library's distance is good to nanometres; the chord of so short a parallel is its arc to 1e-9.
        expect(speed).toBeWithin((omega * arc) / fromDegrees(step), 1e-5);
      }),
      RUNS,
    );
  });

  test('a short step north moves the site by the meridian’s arc', () => {
    fc.assert(
      fc.property(between(-89.9, 89.8), (latitude) => {
        const step = 0.01;
        const [a, b] = [latitude, latitude + step].map((deg) => meridianOf(fromDegrees(deg), metres(0)));
        if (!a || !b) throw new Error('two places');
        const chord = Math.hypot(b.axisDistance - a.axisDistance, b.z - a.z);
        expect(chord).toBeWithin(distance(latitude, 0, latitude + step, 0), 1e-5);
      }),
      RUNS,
    );
  });
});

/** A two-line element set with the given inclination, eccentricity and revolutions a day. */
function elements(inclination: number, eccentricity: number, revolutions: number, anomaly: number) {
  const angle = (deg: number) => deg.toFixed(4).padStart(8);
  const e = Math.round(eccentricity * 1e7)
    .toString()
    .padStart(7, '0');
  return twoline2satrec(
    '1 00001U 26001A   26100.00000000  .00000000  00000-0  00000-0 0  9990',
    `2 00001 ${angle(inclination)} ${angle(40)} ${e} ${angle(30)} ${angle(anomaly)} ${revolutions.toFixed(8).padStart(11)}    10`,
  );
}

type Vector = readonly [number, number, number];
const cross = ([a, b, c]: Vector, [x, y, z]: Vector): Vector => [b * z - c * y, c * x - a * z, a * y - b * x];
const length = (v: Vector) => Math.hypot(...v);

/** Position in km and velocity in km/s, some minutes after the epoch. */
function stateAt(satellite: ReturnType<typeof elements>, minutes: number): { r: Vector; v: Vector } {
  const epoch = Date.UTC(2026, 3, 10);
  const state = propagate(satellite, new Date(epoch + minutes * 60_000));
  if (!state) throw new Error('no state');
  const { position: p, velocity: q } = state;
  return { r: [p.x, p.y, p.z], v: [q.x, q.y, q.z] };
}

describe('beside an SGP4 propagator', () => {
  test('the inclination of a state follows from its latitude and heading, and the other way round', () => {
    fc.assert(
      fc.property(between(5, 175), between(0, 360), between(13, 16), (inclination, anomaly, revolutions) => {
        const { r, v } = stateAt(elements(inclination, 0.001, revolutions, anomaly), 0);
        const latitude = radians(Math.asin(r[2] / length(r)));
        const east = (r[0] * v[1] - r[1] * v[0]) / Math.hypot(r[0], r[1]);
        const up = (r[0] * v[0] + r[1] * v[1] + r[2] * v[2]) / length(r);
        const north = (v[2] - (up * r[2]) / length(r)) / Math.cos(latitude);
        const h = cross(r, v);
        const plane = Math.acos(h[2] / length(h));
        const flown = inclinationFlown(latitude, radians(Math.atan2(east, north)));
        expect(flown).toBeWithin(plane, 1e-9);
        // Osculating and mean inclination differ by some hundredths of a degree.
        expect(toDegrees(flown)).toBeWithin(inclination, 0.05);
        const azimuths = inertialAzimuths(latitude, radians(plane));
        const nearest = Math.min(
          ...azimuths.map((azimuth) => Math.abs(Math.sin((azimuth - Math.atan2(east, north)) / 2))),
        );
        // Where the heading is due east or west to a part in 1e5, its sine tells its direction no better than 1e-7.
        expect(nearest).toBeLessThan(1e-6);
      }),
      RUNS,
    );
  });

  test('the speed of a state is the vis-viva speed of its radius', () => {
    fc.assert(
      fc.property(
        between(10, 170),
        between(0, 0.3),
        between(0, 360),
        (inclination, eccentricity, anomaly) => {
          const revolutions = 9;
          const { r, v } = stateAt(elements(inclination, eccentricity, revolutions, anomaly), 0);
          const axis = Math.cbrt(3.986004418e14 / ((revolutions * 2 * Math.PI) / 86_400) ** 2);
          // The propagator's speed carries the J₂ ripple, some parts in a thousand at most.
          const speed = speedAt(length(r) * 1000, axis);
          expect(length(v) * 1000).toBeWithin(speed, 0.002 * speed);
        },
      ),
      RUNS,
    );
  });

  test('the node drifts at the secular rate', () => {
    fc.assert(
      fc.property(between(20, 160), between(12, 15.5), (inclination, revolutions) => {
        const satellite = elements(inclination, 0.001, revolutions, 0);
        const days = 20;
        const node = (minutes: number) => {
          const { r, v } = stateAt(satellite, minutes);
          const [x, y] = cross(r, v);
          return Math.atan2(x, -y);
        };
        const drift = node(days * 1440) - node(0);
        const axis = Math.cbrt(3.986004418e14 / ((revolutions * 2 * Math.PI) / 86_400) ** 2);
        const altitude = metres(axis - constants.equatorialRadius.value);
        const expected = nodeRate(altitude, altitude, fromDegrees(inclination)) * days * 86_400;
        const apart = Math.atan2(Math.sin(drift - expected), Math.cos(drift - expected));
        // Over 20 days J₂ squared and J₄ add some thousandths of the drift; the ripple within a turn 0.1°.
        expect(apart).toBeWithin(0, 0.006 * Math.abs(expected) + 0.003);
      }),
      RUNS,
    );
  });
});

describe('beside an ephemeris library', () => {
  test('the Earth turns at ω', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 9000 }), fc.integer({ min: 1, max: 400 }), (start, days) => {
        const from = new Date(Date.UTC(2001, 0, 1) + start * 86_400_000);
        const to = new Date(from.getTime() + days * 86_400_000);
        const part = (astronomy.SiderealTime(to) - astronomy.SiderealTime(from)) / 24;
        // A day is one turn and a 366th part; whole turns are known, sidereal time gives the rest.
        const turns = days + Math.round((omega * days * 86_400) / (2 * Math.PI) - days - part) + part;
        // Sidereal time counts from the moving equinox: 7.09e-12 rad/s faster; nutation ripples by 1e-4 rad.
        const rate = (turns * 2 * Math.PI) / (days * 86_400) - 7.09e-12;
        expect(rate).toBeWithin(omega, 1e-12 + 1e-4 / (days * 86_400));
      }),
      RUNS,
    );
  });

  test('the Sun takes a tropical year from equinox to equinox, on average over the four seasons', () => {
    const [first, last] = [astronomy.Seasons(1950), astronomy.Seasons(2050)];
    const spans = (['mar_equinox', 'jun_solstice', 'sep_equinox', 'dec_solstice'] as const).map(
      (season) => (last[season].tt - first[season].tt) / 100,
    );
    const mean = spans.reduce((sum, span) => sum + span, 0) / 4;
    expect(constants.tropicalYear.value / 86_400).toBeWithin(mean, 1e-4);
  });
});
