import { describe, expect, test } from 'vitest';
import {
  labelStep,
  latitudeLabel,
  longitudeLabel,
  multiples,
  neatStep,
  scaleBar,
} from '#components/map/steps.ts';

describe('degrees on the neatline', () => {
  test('blocks of 5° where they can be told apart, coarser and finer beyond', () => {
    expect(neatStep(9.756)).toBe(5); // the design's own map: 800 px for 82°
    expect(neatStep(2.2)).toBe(10);
    expect(neatStep(0.6)).toBe(30);
    expect(neatStep(100)).toBe(0.5);
    expect(neatStep(900)).toBe(0.05);
  });

  test('printed degrees lie at least 64 px apart', () => {
    for (const perDegree of [0.5, 1, 2.2, 9.756, 40, 100, 900]) {
      const step = labelStep(neatStep(perDegree), perDegree);
      expect(step * perDegree).toBeGreaterThanOrEqual(64);
    }
  });

  test('tenths stay tenths', () => {
    expect(multiples(0.1, -0.25, 0.35)).toEqual([-0.2, -0.1, 0, 0.1, 0.2, 0.3]);
    expect(multiples(10, -70.5, -49)).toEqual([-70, -60, -50]);
  });

  test('longitudes come round at 180°', () => {
    expect(longitudeLabel(-70, 10)).toBe('70° W');
    expect(longitudeLabel(190, 10)).toBe('170° W');
    expect(longitudeLabel(180, 10)).toBe('180°');
    expect(longitudeLabel(-180, 10)).toBe('180°');
    expect(longitudeLabel(360, 10)).toBe('0°');
    expect(latitudeLabel(-10, 10)).toBe('10° S');
    expect(latitudeLabel(0.5, 0.5)).toBe('0.5° N');
  });
});

test('the scale bar is the longest of 1, 2, 5 that fits', () => {
  expect(scaleBar(10_000, 110)).toEqual({ km: 1000, px: 100 });
  expect(scaleBar(5_000, 110)).toEqual({ km: 500, px: 100 });
  expect(scaleBar(40, 110).km).toBe(2);
});
