import { describe, expect, test } from 'vitest';
import {
  formatCount,
  formatDateTimeUtc,
  formatFull,
  formatLatitude,
  formatLongitude,
  formatNumber,
  formatShare,
  formatSigned,
  initialsOf,
  listInWords,
  readTypedNumber,
} from '#contract/format.ts';

/*
 * What is expected is the design's rule for figures (a true minus U+2212, a thousands comma, fixed decimals, "0" for
 * zero), written out by hand.
 */

describe('figures', () => {
  test.each([
    [1234.5, 1, '1,234.5'],
    [-1234.56, 1, '\u22121,234.6'],
    [0, 2, '0.00'],
    [-0.004, 2, '0.00'],
    [-0, 0, '0'],
    [999_999.5, 0, '1,000,000'],
  ])('%d to %d decimals reads %s', (value, decimals, text) => {
    expect(formatNumber(value, decimals)).toBe(text);
  });

  test('signs, shares, full figures', () => {
    expect([0.054, -0.014, 0, 0.0001].map((value) => formatSigned(value, 3))).toEqual([
      '+0.054',
      '\u22120.014',
      '0.000',
      '0.000',
    ]);
    expect([0.905, 1, 0, -0.25].map(formatShare)).toEqual(['.905', '1.000', '.000', '\u2212.250']);
    expect(formatFull(-7503.123456789)).toBe('\u22127,503.123456789');
  });

  test('positions carry their half of the globe', () => {
    expect(formatLatitude(-4.7218)).toBe('4.72° S');
    expect(formatLongitude(180)).toBe('180.00° E');
    expect(formatLongitude(-37.0514, 4)).toBe('37.0514° W');
  });
});

test.each([
  ['12.5', 12.5],
  ['\u221212.5', -12.5],
  ['35,786', 35_786],
  ['1 234', 1234],
  ['6.4e6', 6.4e6],
  ['.5', 0.5],
  ['', undefined],
  ['12,5', '12,5'],
  ['1,23,456', '1,23,456'],
  ['about 5', 'about 5'],
  ['0x10', '0x10'],
])('typed %j is read as %j', (typed, read) => {
  expect(readTypedNumber(typed)).toBe(read);
});

test('words', () => {
  expect(formatCount(1, 'site')).toBe('1 site');
  expect(formatCount(1240, 'study', 'studies')).toBe('1,240 studies');
  expect([[], ['a'], ['a', 'b'], ['a', 'b', 'c']].map((items) => listInWords(items))).toEqual([
    '',
    'a',
    'a and b',
    'a, b and c',
  ]);
  expect(formatDateTimeUtc('2026-12-01T12:42:31+01:00')).toBe('2026-12-01 11:42 UTC');
  expect(['Ingrid Marsh', 'T. Okoye', 'Aalto', ' '].map(initialsOf)).toEqual(['IM', 'TO', 'AA', '?']);
});
