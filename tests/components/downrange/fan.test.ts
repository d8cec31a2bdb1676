import { describe, expect, test } from 'vitest';
import type { FanSpoke } from '#contract/downrange.ts';
import {
  BASE,
  INNER,
  OUTER,
  arcsOf,
  at,
  azimuthAt,
  barPath,
  clearKm,
  distanceRadius,
  distanceTicks,
  peopleOf,
  peopleRadius,
} from '#components/downrange/fan-geometry.ts';
import { offerOf, readLimits, setsNone } from '#components/downrange/limits.ts';
import { azimuthFrom, classFrom, turned } from '#components/downrange/launch.ts';

const spoke = (azimuthDeg: number, fields: Partial<FanSpoke> = {}): FanSpoke => ({
  azimuthDeg,
  coastKm: 1,
  firstLandKm: null,
  firstLandName: null,
  people: 0,
  settlements: 0,
  settlementsWithoutFigure: 0,
  spreadPeople: 0,
  unknownPeopleLandKm2: 0,
  excludedPeople: 0,
  excludedSettlements: 0,
  ...fields,
});
const fanOf = (fields: (azimuthDeg: number) => Partial<FanSpoke>): FanSpoke[] =>
  Array.from({ length: 360 }, (_, azimuthDeg) => spoke(azimuthDeg, fields(azimuthDeg)));

describe('the polar fan', () => {
  test.each([
    [0, 0, -1],
    [90, 1, 0],
    [180, 0, 1],
    [270, -1, 0],
  ])('azimuth %i° points the compass’s way, and back', (azimuthDeg, x, y) => {
    const [px, py] = at(azimuthDeg, 100);
    expect(px).toBeWithin(100 * x, 1e-9);
    expect(py).toBeWithin(100 * y, 1e-9);
    expect(azimuthAt(px, py)).toBe(azimuthDeg);
  });

  test('distance grows outwards to the range, people inwards by powers of ten', () => {
    expect([0, 2500, 5000, 9000].map((km) => distanceRadius(km, 5000))).toEqual([
      BASE,
      (BASE + OUTER) / 2,
      OUTER,
      OUTER,
    ]);
    expect(distanceRadius(null, 5000)).toBe(OUTER);
    expect(peopleRadius(0)).toBe(BASE);
    expect(peopleRadius(1e9)).toBeWithin(INNER, 1e-6);
    expect(peopleRadius(1e12)).toBe(INNER);
    expect(peopleRadius(1e3) - peopleRadius(1e6)).toBeWithin((BASE - INNER) / 3, 0.01);
    expect(barPath(10, BASE, BASE)).toBe('');
  });

  test('a line that never leaves land has no clear distance, one that meets none has no figure', () => {
    expect(clearKm(spoke(0, { coastKm: null }))).toBe(0);
    expect(clearKm(spoke(0))).toBeNull();
    expect(clearKm(spoke(0, { firstLandKm: 1200 }))).toBe(1200);
    expect(peopleOf(spoke(0, { people: 5, spreadPeople: 2 }))).toBe(7);
    expect(peopleOf(spoke(0, { people: 5, spreadPeople: null }))).toBe(5);
  });

  test('azimuths without land make arcs, through north too', () => {
    const open = (azimuthDeg: number) => azimuthDeg >= 350 || azimuthDeg <= 10;
    const fan = fanOf((azimuthDeg) => (open(azimuthDeg) ? {} : { firstLandKm: 10 }));
    expect(arcsOf(fan, (one) => clearKm(one) === null)).toEqual([[349.5, 370.5]]);
    expect(arcsOf(fan, () => true)).toEqual([[0, 360]]);
    expect(arcsOf(fan, () => false)).toEqual([]);
  });

  test.each([
    [500, [250, 500]],
    [9260, [2500, 5000, 7500]],
  ])('circles for a range of %i km', (rangeKm, ticks) => {
    expect(distanceTicks(rangeKm).every((tick) => tick <= rangeKm)).toBe(true);
    expect(distanceTicks(rangeKm).length).toBeLessThanOrEqual(5);
    if (rangeKm === 9260) expect(distanceTicks(rangeKm)).toEqual(ticks);
  });
});

describe('limits', () => {
  const site = {
    siteId: '0190a000-0000-7000-8000-000000000001',
    code: 'EQ',
    name: 'Equator',
    latitudeDeg: 0,
    longitudeDeg: 0,
    elevationM: 0,
    permittedAzimuthsDeg: [],
  };

  test('are read as typed; empty ones set none, wrong ones say so', () => {
    expect(readLimits({ clearKm: '1,500', people: '', exclusionEmpty: true })).toEqual({
      limits: { clearKm: 1500, people: null, exclusionEmpty: true },
      errors: {},
    });
    expect(readLimits({ clearKm: 'far', people: '-1', exclusionEmpty: false }).errors).toEqual({
      clearKm: 'Clear distance “far” is not a number.',
      people: 'People is 0 or more.',
    });
    expect(setsNone({ clearKm: null, people: null, exclusionEmpty: false })).toBe(true);
  });

  test('offer the sectors that keep within them, with what they open', () => {
    const fan = fanOf((azimuthDeg) => (azimuthDeg >= 60 && azimuthDeg <= 120 ? {} : { firstLandKm: 100 }));
    const offer = offerOf(fan, { clearKm: 1000, people: null, exclusionEmpty: false }, site, 185);
    expect(offer.text).toBe('60-120');
    expect(offer.widthDeg).toBe(60);
    // From the equator due east is 0°; the edges' inertial azimuths are within a few degrees of 60° and 120°.
    const [opened] = offer.inclinations;
    expect(opened?.fromDeg).toBeWithin(0, 1e-9);
    expect(opened?.toDeg).toBeGreaterThan(27);
    expect(opened?.toDeg).toBeLessThan(30);
  });

  test('a limit on people counts spread people too, and says where people are unknown', () => {
    const fan = fanOf((azimuthDeg) =>
      azimuthDeg < 180
        ? { people: 40, spreadPeople: 70 }
        : { people: 40, spreadPeople: 50, unknownPeopleLandKm2: 3 },
    );
    const offer = offerOf(fan, { clearKm: null, people: 100, exclusionEmpty: false }, site, 185);
    expect(offer.text).toBe('180-359');
    expect(offer.sectors.map(({ complete }) => complete)).toEqual([false]);
  });
});

test('an azimuth of the address is 0 to below 360, or none', () => {
  expect(['90', '0', '360', '12.5'].map(azimuthFrom)).toEqual([90, 0, 0, 12.5]);
  expect([null, '', 'east', '-1', '361'].map(azimuthFrom)).toEqual([null, null, null, null, null]);
});

test('turning passes through north', () => {
  expect([turned(359, 1), turned(0, -1), turned(0.1, -0.2), turned(42.3, 0.1)]).toEqual([
    0, 359, 359.9, 42.4,
  ]);
});

test('the class is the address’s, else the vehicle’s, else the smallest', () => {
  expect(classFrom('large', { vehicleClass: 'medium', columns: [] })).toBe('large');
  expect(classFrom('huge', { vehicleClass: 'medium', columns: [] })).toBe('medium');
  expect(classFrom(null, null)).toBe('small');
});
