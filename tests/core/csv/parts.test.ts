import fc from 'fast-check';
import { Geodesic } from 'geographiclib-geodesic';
import { describe, expect, test } from 'vitest';
import { CodeMaker, foldName, isCode } from '#core/csv/codes.ts';
import { addGuard, stripGuard } from '#core/csv/guard.ts';
import { recognise } from '#core/csv/headings.ts';
import { NearIndex } from '#core/csv/near.ts';
import { readSectors, writeSectors, type Sector } from '#core/csv/sectors.ts';

describe('readSectors', () => {
  test.each([
    [
      '35-120; 200-250',
      [
        [35, 120],
        [200, 250],
      ],
    ],
    [
      '35-120 / 200-250',
      [
        [35, 120],
        [200, 250],
      ],
    ],
    [
      '35–120|200°–250°',
      [
        [35, 120],
        [200, 250],
      ],
    ],
    ['342 to 95', [[342, 95]]],
    ['300 - 20;', [[300, 20]]],
    ['0-360', [[0, 360]]],
    ['12.5-13.25', [[12.5, 13.25]]],
    ['', []],
    ['all', []],
    ['All round', []],
  ])('%j', (text, sectors) => {
    expect(readSectors(text)).toEqual({ kind: 'read', sectors });
  });

  test.each([
    ['140-140', 'Permitted azimuths 140–140: from and to are the same. Write 0–360 for all round.'],
    ['360-0', 'Permitted azimuths 360–0: from and to are the same. Write 0–360 for all round.'],
    ['35-400', 'Permitted azimuths 35–400: azimuths run from 0 to 360, clockwise from north.'],
    ['-20-40', 'Permitted azimuths −20–40: azimuths run from 0 to 360, clockwise from north.'],
    [
      'north',
      'Permitted azimuths “north” is no sector. Write from and to in degrees, such as 35-120; 200-250.',
    ],
    [
      '35-120;;40-50',
      'Permitted azimuths “” is no sector. Write from and to in degrees, such as 35-120; 200-250.',
    ],
    ['45', 'Permitted azimuths “45” is no sector. Write from and to in degrees, such as 35-120; 200-250.'],
  ])('%j is refused', (text, message) => {
    expect(readSectors(text)).toEqual({ kind: 'refused', message });
  });

  test('at most twelve', () => {
    const many = (n: number) => Array.from({ length: n }, (_, i) => `${i * 20}-${i * 20 + 5}`).join(';');
    expect(readSectors(many(12)).kind).toBe('read');
    expect(readSectors(many(13)).kind).toBe('refused');
  });

  test('what is written is read back', () => {
    const bound = fc.integer({ min: 0, max: 3600 }).map((tenths) => tenths / 10);
    const sector = fc.tuple(bound, bound).filter(([from, to]) => (from - to) % 360 !== 0);
    fc.assert(
      fc.property(fc.array(sector, { maxLength: 12 }), (sectors) => {
        expect(readSectors(writeSectors(sectors as Sector[]))).toEqual({ kind: 'read', sectors });
      }),
      { seed: 20310401 },
    );
  });
});

describe('recognise', () => {
  test.each([
    ['site', 'name', null],
    ['Candidate Site', 'name', null],
    ['CODE', 'code', null],
    ['lat', 'latitudeDeg', null],
    ['Latitude (°)', 'latitudeDeg', null],
    ['latitudeDeg', 'latitudeDeg', null],
    ['LAT_DD', 'latitudeDeg', null],
    [' long ', 'longitudeDeg', null],
    ['Lng.', 'longitudeDeg', null],
    ['Längengrad', 'longitudeDeg', null],
    ['alt_ft', 'elevationM', 'ft'],
    ['Elevation [m]', 'elevationM', 'm'],
    ['Altitude (feet)', 'elevationM', 'ft'],
    ['elev', 'elevationM', 'm'],
    ['az_ok', 'permittedAzimuthsDeg', null],
    ['Permitted  azimuths, deg', 'permittedAzimuthsDeg', null],
    ['Remarks', 'notes', null],
  ])('%s', (heading, field, unit) => {
    expect(recognise(heading)).toMatchObject({ field, unit });
  });
  test.each(['Cost to first launch (M€)', 'launch days a year', 'elevation_km', ''])(
    '%s is none of them',
    (heading) => {
      expect(recognise(heading)).toBeUndefined();
    },
  );
});

describe('CodeMaker', () => {
  test('initials, else letters of the name, never twice', () => {
    const maker = new CodeMaker(['sk']);
    expect(
      ['Ponta do Vigia', 'Essery Bank', 'Skarvnes', 'Skarvnes', 'Île Åse', '北角', '北角'].map((n) =>
        maker.make(n),
      ),
    ).toEqual(['PV', 'EB', 'SA', 'SR', 'IA', 'S2', 'S3']);
  });
  test('10,000 like names get 10,000 codes of 2 to 8 letters or digits', () => {
    const maker = new CodeMaker([]);
    const codes = Array.from({ length: 10_000 }, () => maker.make('Site'));
    expect(new Set(codes).size).toBe(10_000);
    expect(codes.every(isCode)).toBe(true);
  });
  test('case and spacing do not part names', () => {
    expect(foldName('  ÉSSERY \n bank')).toBe(foldName('E\u0301ssery  Bank'));
  });
});

describe('NearIndex', () => {
  /** Beside a general-purpose geodesic library: points laid out at known distances, poles and date line included. */
  test('finds what lies within 1 km on the ellipsoid, and nothing else', () => {
    const place = fc.record({
      latitudeDeg: fc.oneof(
        fc.double({ min: -90, max: 90, noNaN: true }),
        fc.constantFrom(-90, 90, 0, 89.999),
      ),
      longitudeDeg: fc.oneof(
        fc.double({ min: -180, max: 180, noNaN: true }),
        fc.constantFrom(180, -179.9999, 0),
      ),
    });
    const far = fc.oneof(
      fc.double({ min: 0, max: 999.9, noNaN: true }),
      fc.double({ min: 1000.1, max: 5000, noNaN: true }),
    );
    fc.assert(
      fc.property(place, fc.double({ min: 0, max: 360, noNaN: true }), far, (from, azimuthDeg, distanceM) => {
        const to = Geodesic.WGS84.Direct(from.latitudeDeg, from.longitudeDeg, azimuthDeg, distanceM);
        const index = new NearIndex();
        index.add({ latitudeDeg: to.lat2 ?? 0, longitudeDeg: to.lon2 ?? 0 });
        const found = index.find(from, () => true);
        expect(found !== undefined).toBe(distanceM < 1000);
        if (found !== undefined) expect(found.distanceKm * 1000).toBeCloseTo(distanceM, 3);
      }),
      { seed: 20310401, numRuns: 500 },
    );
  });
});

describe('guard', () => {
  test('what begins like a formula is guarded, and the guard comes off', () => {
    expect(['=1+1', '+1', '-x', '@a', '\tx', '\rx'].map(addGuard)).toEqual([
      "'=1+1",
      "'+1",
      "'-x",
      "'@a",
      "'\tx",
      "'\rx",
    ]);
    expect(['plain', "'quoted'", ''].map(addGuard)).toEqual(['plain', "'quoted'", '']);
  });
  test('nothing is lost', () => {
    const text = fc.string({ unit: fc.constantFrom("'", '=', '-', '@', 'a', ' ', '\t') });
    fc.assert(
      fc.property(text, (value) => stripGuard(addGuard(value)) === value),
      { seed: 20310401 },
    );
  });
});
