import { expect, test } from 'vitest';
import { cutAtDateLine } from '#contract/date-line.ts';

test('a line that crosses the date line is cut there, as in RFC 7946, section 3.1.9', () => {
  // [from memory] The RFC's example: 170° E 40° N … 170° W 50° N is cut at 180° where the latitude is halfway.
  const cut = cutAtDateLine([
    [170, 40],
    [-170, 50],
  ]);
  expect(cut).toEqual([
    [
      [170, 40],
      [180, 45],
    ],
    [
      [-180, 45],
      [-170, 50],
    ],
  ]);
});

test('westward the cut lies on the other side, and heights are cut with the rest', () => {
  const cut = cutAtDateLine([
    [-178, 0, 100],
    [178, 0, 200],
    [176, 0, 300],
  ]);
  expect(cut).toEqual([
    [
      [-178, 0, 100],
      [-180, 0, 150],
    ],
    [
      [180, 0, 150],
      [178, 0, 200],
      [176, 0, 300],
    ],
  ]);
});

test('a line that stays on one side stays whole, and one place is no line', () => {
  expect(
    cutAtDateLine([
      [-10, 0],
      [10, 5],
    ]),
  ).toHaveLength(1);
  expect(cutAtDateLine([[0, 0]])).toEqual([]);
  expect(cutAtDateLine([])).toEqual([]);
});
