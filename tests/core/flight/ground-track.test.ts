import fc from 'fast-check';
import { Geodesic } from 'geographiclib-geodesic';
import { eciToGeodetic, gstime, json2satrec, propagate } from 'satellite.js';
import { describe, expect, test } from 'vitest';
import { groundTrack, type GroundTrack } from '#core/flight/ground-track.ts';
import { fromDegrees, metres, toDegrees } from '#core/units.ts';

const wgs84 = Geodesic.WGS84;

function track(latitudeDeg: number, longitudeDeg: number, azimuthDeg: number, altitudesKm: [number, number]) {
  return groundTrack({
    latitude: fromDegrees(latitudeDeg),
    longitude: fromDegrees(longitudeDeg),
    inertialAzimuth: fromDegrees(azimuthDeg),
    perigeeRadius: metres(6_378_137 + altitudesKm[0] * 1000),
    apogeeRadius: metres(6_378_137 + altitudesKm[1] * 1000),
  });
}

const pointsOf = ({ pieces }: GroundTrack): [latitude: number, longitude: number][] =>
  pieces.flat().map(({ latitude, longitude }) => [toDegrees(latitude), toDegrees(longitude)]);

const distanceKm = (a: [number, number], b: [number, number]): number =>
  (wgs84.Inverse(...a, ...b, Geodesic.DISTANCE).s12 ?? Number.NaN) / 1000;

describe('groundTrack', () => {
  // satellite.js: SGP4, an independent propagator. It knows J2, which moves the node by 0.35° and the perigee's
  // time by about as much in one revolution: 60 km over the ground at most.
  test('lies where an SGP4 propagator sees the satellite', () => {
    const epoch = new Date('2026-03-20T00:00:00Z');
    const satrec = json2satrec({
      OBJECT_NAME: 'TEST',
      OBJECT_ID: '2026-001A',
      EPOCH: '2026-03-20T00:00:00.000',
      MEAN_MOTION: 15.5,
      ECCENTRICITY: 1e-6,
      INCLINATION: 51.6,
      RA_OF_ASC_NODE: 40,
      ARG_OF_PERICENTER: 0,
      MEAN_ANOMALY: 0,
      EPHEMERIS_TYPE: 0,
      CLASSIFICATION_TYPE: 'U',
      NORAD_CAT_ID: 1,
      ELEMENT_SET_NO: 1,
      REV_AT_EPOCH: 1,
      BSTAR: 0,
      MEAN_MOTION_DOT: 0,
      MEAN_MOTION_DDOT: 0,
    });
    const seen = Array.from({ length: 19 }, (_, step): [number, number] => {
      const time = new Date(epoch.getTime() + step * 300_000);
      const state = propagate(satrec, time);
      if (!state) throw new Error('the propagator gave no state');
      const { latitude, longitude } = eciToGeodetic(state.position, gstime(time));
      return [(latitude * 180) / Math.PI, (longitude * 180) / Math.PI];
    });
    const [latitude, longitude] = seen[0] ?? [0, 0];
    // sin β = cos i at the equator; 15.5 revolutions a day is a radius of 6,796 km by Kepler's third law.
    const ours = pointsOf(track(latitude, longitude, 90 - 51.6, [418, 418]));
    for (const place of seen)
      expect(Math.min(...ours.map((point) => distanceKm(point, place)))).toBeLessThan(60);
  });

  // Wertz, "Space Mission Engineering", section 9 [from memory]: successive nodes move west by 15.04° an hour of period.
  test('ends west of the pad by the turn of the Earth in one period', () => {
    const { period, pieces } = track(0, 10, 38.4, [400, 400]);
    const last = pieces.at(-1)?.at(-1);
    expect(toDegrees(last?.longitude ?? fromDegrees(0))).toBeCloseTo(10 - (15.041_07 * period) / 3600, 3);
  });

  test('an ellipse has the period of its half axis and the same end of track rule', () => {
    // Geostationary transfer: 185 × 35,786 km, 10.5 h [derived: 2π √(a³/μ), a = 24,363.6 km].
    const { period, pieces } = track(5, -52, 90, [185, 35_786]);
    expect(period / 3600).toBeCloseTo(10.51, 1);
    const last = pieces.at(-1)?.at(-1);
    const west = (15.041_07 * period) / 3600;
    expect(toDegrees(last?.longitude ?? fromDegrees(0))).toBeCloseTo(((-52 - west + 540) % 360) - 180, 3);
  });

  test('ticks stand each 1,000 km over the ground, by geodesics of GeographicLib', () => {
    const ours = track(28, -80, 70, [185, 185]);
    const points = pointsOf(ours);
    const first = ours.ticks[0];
    if (!first) throw new Error('there is no tick');
    let gone = 0;
    const place: [number, number] = [toDegrees(first.latitude), toDegrees(first.longitude)];
    const after = points.findIndex(([, longitude]) => longitude > place[1]);
    for (let at = 1; at < after; at += 1) gone += distanceKm(points[at - 1] ?? place, points[at] ?? place);
    gone += distanceKm(points[after - 1] ?? place, place);
    expect(gone).toBeCloseTo(1000, 0);
    const azimuth = wgs84.Inverse(...(points[after - 1] ?? place), ...(points[after] ?? place)).azi1 ?? 0;
    expect(toDegrees(first.heading)).toBeCloseTo(azimuth, 2);
  });

  test('never leaves the latitudes of its inclination, never jumps, whatever the pad', () => {
    const e2 = 0.006_694_379_990_14; // WGS 84, NGA.STND.0036
    fc.assert(
      fc.property(
        fc.double({ min: -90, max: 90, noNaN: true }),
        fc.double({ min: -180, max: 180, noNaN: true, minExcluded: true }),
        fc.double({ min: 0, max: 360, noNaN: true, maxExcluded: true }),
        fc.integer({ min: 150, max: 2000 }),
        (latitude, longitude, azimuth, altitude) => {
          const ours = track(latitude, longitude, azimuth, [altitude, altitude]);
          const geocentric = Math.atan((1 - e2) * Math.tan((latitude * Math.PI) / 180));
          const cosine = Math.cos(geocentric) * Math.sin((azimuth * Math.PI) / 180);
          const top = Math.atan2(Math.sqrt(1 - cosine ** 2), (1 - e2) * Math.abs(cosine));
          for (const piece of ours.pieces)
            piece.forEach((point, at) => {
              expect(Math.abs(point.latitude)).toBeLessThanOrEqual(top + 1e-6);
              expect(Math.abs(point.longitude - (piece[at - 1] ?? point).longitude)).toBeLessThanOrEqual(
                Math.PI,
              );
            });
          for (const { heading } of ours.ticks) expect(Number.isFinite(heading)).toBe(true);
        },
      ),
      { seed: 4, numRuns: 60 },
    );
  });

  test('refuses an apogee below the perigee', () => {
    expect(() => track(0, 0, 90, [400, 300])).toThrow(RangeError);
  });
});
