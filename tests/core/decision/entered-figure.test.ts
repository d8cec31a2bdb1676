import { describe, expect, test } from 'vitest';
import { figureFaults } from '#core/decision/entered-figure.ts';

describe('an entered figure', () => {
  test.each([
    [{ likely: 300 }],
    [{ likely: 300, low: 250 }],
    [{ likely: 300, high: 360 }],
    [{ likely: 300, low: 300, high: 300 }],
    [{ likely: -3, low: -4.5, high: -3 }],
    [{ likely: undefined }],
  ])('%j may stand', (figure) => {
    expect(figureFaults(figure, false)).toEqual([]);
  });

  test.each([
    [{ likely: 300, low: 301 }, [{ part: 'low', kind: 'low-above' }]],
    [{ likely: 300, high: 299.9 }, [{ part: 'high', kind: 'high-below' }]],
    [
      { likely: undefined, low: 1, high: 2 },
      [
        { part: 'low', kind: 'no-figure' },
        { part: 'high', kind: 'no-figure' },
      ],
    ],
  ])('%j may not', (figure, faults) => {
    expect(figureFaults(figure, false)).toEqual(faults);
  });
});

test('a rating and its low and high stand on whole steps 0 to 4', () => {
  expect(figureFaults({ low: 0, likely: 2, high: 4 }, true)).toEqual([]);
  expect(figureFaults({ low: -1, likely: 2.5, high: 5 }, true)).toEqual([
    { part: 'low', kind: 'no-step' },
    { part: 'likely', kind: 'no-step' },
    { part: 'high', kind: 'no-step' },
  ]);
});
