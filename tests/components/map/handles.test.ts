import { describe, expect, test } from 'vitest';
import { arrowStep, handlesOf, moveHandle, settle } from '#components/map/handles.ts';

describe('handles of sectors', () => {
  test('each sector has two, all round has none', () => {
    expect(handlesOf([[325, 92]])).toEqual([
      { sector: 0, end: 0, azimuthDeg: 325 },
      { sector: 0, end: 1, azimuthDeg: 92 },
    ]);
    expect(handlesOf([[0, 360]])).toEqual([]);
  });

  test('one end moves, the others stay', () => {
    const sectors = [
      [35, 120],
      [200, 250],
    ] as const;
    expect(moveHandle(sectors, { sector: 1, end: 0 }, 210.04)).toEqual([
      [35, 120],
      [210, 250],
    ]);
  });

  test('turning on through north stays within 0 to 360', () => {
    expect(moveHandle([[359, 92]], { sector: 0, end: 0 }, 360)).toEqual([[0, 92]]);
    expect(settle(-0.04)).toBe(0);
    expect(settle(-1)).toBe(359);
  });

  test('an end never comes to lie on the other, be that written 0 or 360', () => {
    expect(moveHandle([[35, 120]], { sector: 0, end: 0 }, 120)).toEqual([[35, 120]]);
    expect(moveHandle([[20, 360]], { sector: 0, end: 0 }, 0)).toEqual([[20, 360]]);
  });

  test('arrows turn by a degree, with Shift by a tenth', () => {
    expect(arrowStep('ArrowRight', false)).toBe(1);
    expect(arrowStep('ArrowDown', true)).toBe(-0.1);
    expect(arrowStep('Enter', false)).toBeUndefined();
  });
});
