import { expect, test } from 'vitest';
import { figureText, stepInWords } from '#contract/rating.ts';

const steps = ['Very poor', 'Poor', 'Fair', 'Good', 'Very good'];

test('a rating’s figure is its step’s name with the number', () => {
  expect([0, 3, 4].map((figure) => stepInWords({ steps }, figure))).toEqual([
    'Very poor (0)',
    'Good (3)',
    'Very good (4)',
  ]);
  expect(figureText({ steps }, 2, 0)).toBe('Fair (2)');
});

test('between steps, beyond them and where there are none the number stands alone', () => {
  expect([2.5, 5, -1].map((figure) => stepInWords({ steps }, figure))).toEqual([null, null, null]);
  expect(figureText({ steps }, 2.5, 1)).toBe('2.5');
  expect(figureText({ steps: null }, -1234, 0)).toBe('−1,234');
});
