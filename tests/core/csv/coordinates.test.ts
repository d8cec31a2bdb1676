import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readLatitude, readLongitude } from '#core/csv/coordinates.ts';

const latitude = (text: string, decimalComma = false) => {
  const read = readLatitude(text, decimalComma);
  return read.kind === 'read' ? read.latitudeDeg : read.code;
};
const longitude = (text: string, decimalComma = false) => {
  const read = readLongitude(text, decimalComma);
  return read.kind === 'read' ? read.longitudeDeg : read.code;
};

describe('notations', () => {
  // By the definition of the sexagesimal degree (SI brochure, table 8: 1° = 60′ = 3600″): 12 + 41/60 + 30/3600.
  const expected = -(12 + 41 / 60 + 30 / 3600);
  test.each([
    '12 41 30 S',
    '12°41′30″S',
    `12° 41' 30" S`,
    `12°41'30''S`,
    'S 12° 41′ 30″',
    'S12:41:30',
    '-12:41:30',
    '−12°41′30″',
    '12º41´30”S',
    '12 deg 41 min 30 sec South',
    '12-41-30 S',
    '12 41.5 S',
    '12°41.5′ S',
    "S 12° 41.5'",
    '-12 41.5',
    ' 12\u00a041\u00a030 s ',
  ])('%s', (text) => {
    expect(latitude(text)).toBeCloseTo(expected, 12);
  });

  test.each([
    ['-4.7218', -4.7218],
    ['−4.7218', -4.7218],
    ['+4.7218', 4.7218],
    ['4.7218N', 4.7218],
    ['N 4.7218°', 4.7218],
    ['4.7218° S', -4.7218],
    ['-4.7218E0', -4.7218],
    ['4.72e+1', 47.2],
    ['.5', 0.5],
    ['5.', 5],
    ['-0', 0],
    ['0 30 0 S', -0.5],
    ['-0 30', -0.5],
    ['90', 90],
    ['-90', -90],
  ])('%s', (text, degrees) => {
    expect(latitude(text)).toBe(degrees);
  });

  test('E after a longitude is east, within it an exponent', () => {
    expect(longitude('12E')).toBe(12);
    expect(longitude('1.2E1')).toBe(12);
    expect(longitude('1.2E1E')).toBe(12);
    expect(longitude('58.3502 W')).toBe(-58.3502);
  });

  test('a decimal comma only where the file has one', () => {
    expect(latitude('-4,7218', true)).toBe(-4.7218);
    expect(latitude("12°41,5'S", true)).toBeCloseTo(expected, 12);
    expect(latitude('-4.7218', true)).toBe(-4.7218);
    expect(latitude('-4,7218')).toBe('not-a-number');
    expect(latitude('1.234,5', true)).toBe('not-a-number');
  });
});

describe('refusals', () => {
  test.each([
    ['', 'empty'],
    ['  ', 'empty'],
    ['north', 'not-a-number'],
    ['NaN', 'not-a-number'],
    ['Infinity', 'not-a-number'],
    ['0x10', 'not-a-number'],
    ['1e999', 'not-a-number'],
    ['12 4130', 'not-a-number'],
    ['12.5 30', 'not-a-number'],
    ['12 30.5 10', 'not-a-number'],
    ['12 60 0 S', 'out-of-range'],
    ['12 0 60 S', 'out-of-range'],
    ['97.2150', 'out-of-range'],
    ['-90.0001', 'out-of-range'],
    ['12 E', 'hemisphere'],
    ['-12 S', 'hemisphere'],
    ['N 12 S', 'not-a-number'],
    ['--4', 'not-a-number'],
    ['4 5 6 7', 'not-a-number'],
  ])('latitude %j: %s', (text, code) => {
    expect(latitude(text)).toBe(code);
  });

  test('says the text and the range', () => {
    expect(readLatitude('97.2150')).toMatchObject({
      message: 'Latitude 97.2150 is outside −90 to 90.',
      degrees: 97.215,
    });
  });
});

describe('longitudes from 180 to 360', () => {
  test.each([
    ['184.8600', -175.14, 'Longitude 184.8600 brought into −180 to 180.'],
    ['360', 0, 'Longitude 360 brought into −180 to 180.'],
    ['180.5', -179.5, 'Longitude 180.5 brought into −180 to 180.'],
    ['-180', 180, 'Longitude −180 is stored as 180.'],
    ['180 W', 180, 'Longitude −180 is stored as 180.'],
  ])('%s', (text, longitudeDeg, change) => {
    expect(readLongitude(text)).toEqual({ kind: 'read', longitudeDeg, change });
  });
  test.each(['180', '-179.9999', '0'])('%s stands', (text) => {
    expect(readLongitude(text)).toMatchObject({ kind: 'read', change: null });
  });
  test.each(['-180.1', '360.01', '190 W'])('%s is refused', (text) => {
    expect(longitude(text)).toBe('out-of-range');
  });
});

describe('what is written is read back', () => {
  const degrees = (limit: number) =>
    fc.double({ min: -limit, max: limit, noNaN: true, noDefaultInfinity: true });

  test('decimal degrees exactly, with a point, a comma or an exponent', () => {
    fc.assert(
      fc.property(degrees(90), (value) => {
        expect(latitude(String(value))).toBe(value + 0);
        expect(latitude(value.toExponential())).toBe(value + 0);
        expect(latitude(String(value).replace('.', ','), true)).toBe(value + 0);
      }),
      { seed: 20310401 },
    );
  });

  test('degrees, minutes and seconds to half the last printed digit', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -324_000_000, max: 324_000_000 }),
        fc.constantFrom(' ', '°', ':'),
        (thousandths, mark) => {
          const size = Math.abs(thousandths);
          const whole = [Math.floor(size / 3_600_000), Math.floor(size / 60_000) % 60] as const;
          const seconds = (size % 60_000) / 1000;
          const text = `${whole[0]}${mark}${whole[1]}${mark === '°' ? "'" : mark}${seconds.toFixed(3)}`;
          expect(latitude(`${text} ${thousandths < 0 ? 'S' : 'N'}`)).toBeCloseTo(thousandths / 3_600_000, 10);
        },
      ),
      { seed: 20310401 },
    );
  });

  test('every reading lies in range', () => {
    fc.assert(
      fc.property(fc.double({ min: -400, max: 400, noNaN: true }), (value) => {
        const read = readLongitude(String(value));
        if (read.kind === 'refused') expect(value < -180 || value > 360).toBe(true);
        else expect(read.longitudeDeg > -180 && read.longitudeDeg <= 180).toBe(true);
      }),
      { seed: 20310401 },
    );
  });
});
