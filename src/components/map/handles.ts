import type { SectorDeg } from './types.ts';

/** One end of one sector. */
export interface Handle {
  readonly sector: number;
  readonly end: 0 | 1;
  readonly azimuthDeg: number;
}

/** The ends of a pad's sectors in order; a sector that is all round has none. */
export function handlesOf(sectors: readonly SectorDeg[]): Handle[] {
  return sectors.flatMap(([from, to], sector) =>
    to - from === 360
      ? []
      : [
          { sector, end: 0 as const, azimuthDeg: from },
          { sector, end: 1 as const, azimuthDeg: to },
        ],
  );
}

/** 0 ≤ azimuth < 360, to a tenth of a degree: no finer than a hand can set it. */
export function settle(azimuthDeg: number): number {
  const turned = ((azimuthDeg % 360) + 360) % 360;
  return Number(turned.toFixed(1)) % 360;
}

/**
 * The sectors with one end moved. An end never comes to lie on the other one: the sector would be none, or all
 * round, which is said by typing 0–360.
 */
export function moveHandle(
  sectors: readonly SectorDeg[],
  { sector, end }: Pick<Handle, 'sector' | 'end'>,
  azimuthDeg: number,
): readonly SectorDeg[] {
  const settled = settle(azimuthDeg);
  return sectors.map((bounds, index): SectorDeg => {
    if (index !== sector || settled === bounds[end === 0 ? 1 : 0] % 360) return bounds;
    return end === 0 ? [settled, bounds[1]] : [bounds[0], settled];
  });
}

/** The step that an arrow key means, or undefined for any other key. Right and up turn clockwise. */
export function arrowStep(key: string, fine: boolean): number | undefined {
  const sign = { ArrowRight: 1, ArrowUp: 1, ArrowLeft: -1, ArrowDown: -1 }[key];
  return sign === undefined ? undefined : sign * (fine ? 0.1 : 1);
}
