import { describe, expect, test } from 'vitest';
import { along, azimuthTo } from '#components/map/pad-frame.ts';

/** Screens count down; north is up on the flat map. */
const flat = { x: 100, y: 200, east: [1, 0], north: [0, -1] } as const;
/** Near the globe's limb: north foreshortened to a half and turned by 30°. */
const turned = { x: 10, y: 20, east: [0.866, 0.5], north: [0.25, -0.433] } as const;

describe('azimuths at a pad', () => {
  test('east is to the right, north is up', () => {
    expect(along(flat, 0, 64)).toEqual([100, 136]);
    expect(along(flat, 90, 64)[0]).toBeCloseTo(164, 9);
    expect(azimuthTo(flat, { x: 100, y: 300 })).toBeCloseTo(180, 9);
    expect(azimuthTo(flat, { x: 50, y: 200 })).toBeCloseTo(270, 9);
  });

  test.each([0, 37.5, 92, 180, 211, 325])('%d° is found again where it was drawn', (azimuth) => {
    for (const frame of [flat, turned]) {
      const [x, y] = along(frame, azimuth, 150);
      expect(azimuthTo(frame, { x, y })).toBeCloseTo(azimuth, 6);
    }
  });
});
