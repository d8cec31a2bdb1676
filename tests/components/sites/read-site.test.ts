import { describe, expect, test } from 'vitest';
import { azimuthWords, elevationOf, latitudeOf, longitudeOf, readCell } from '#components/sites/read-site.ts';

describe('what is typed for a site', () => {
  test('degrees, minutes and seconds are read, and what was read is said', () => {
    // 12° 41′ 30″ = 12 + 41/60 + 30/3600 = 12.691 666…° [derived, ISO 6709]
    expect(latitudeOf('12 41 30 S')).toMatchObject({ kind: 'read', words: 'read as −12.6917' });
  });

  test('a longitude from 180 to 360 is brought round, and says so', () => {
    expect(longitudeOf('193.4')).toMatchObject({
      value: -166.6,
      words: 'read as −166.6000, brought into −180 to 180',
    });
  });

  test.each([
    [longitudeOf('-193.4'), '166.6'],
    [latitudeOf('4721.8'), '47.218'],
    [longitudeOf('3705.14'), '37.0514'],
  ])('a refusal offers what may have been meant', (reading, meant) => {
    expect(reading).toMatchObject({ kind: 'refused', meant });
  });

  test('a latitude just out of range offers nothing: there is no telling', () => {
    expect(latitudeOf('97.215')).toEqual({
      kind: 'refused',
      message: 'Latitude 97.215 is outside −90 to 90.',
    });
  });

  test('an empty elevation is sea level; one on no ground is refused', () => {
    expect(elevationOf('')).toMatchObject({ value: 0 });
    expect(elevationOf('9000')).toMatchObject({ value: 9000 });
    expect(elevationOf('9001')).toMatchObject({ kind: 'refused' });
  });

  test('a cell becomes the change that the contract takes', () => {
    expect(readCell('permittedAzimuthsDeg', '325-92; 200-250')).toMatchObject({
      value: {
        permittedAzimuthsDeg: [
          [325, 92],
          [200, 250],
        ],
      },
      words: 'read as 325–92; 200–250',
    });
    expect(readCell('code', ' pv ')).toMatchObject({ value: { code: 'PV' } });
    expect(readCell('name', '  ')).toMatchObject({ kind: 'refused' });
  });

  test('no sector is all round', () => {
    expect(azimuthWords([])).toBe('all round');
  });
});
