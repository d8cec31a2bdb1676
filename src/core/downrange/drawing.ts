import { placed } from './corridor.ts';
import type { Corridor, Position } from './corridor.ts';
import { circleOutline, corridorOutline, exclusionOutline } from './outline.ts';
import { planarLines, planarRings } from './planar.ts';
import { halfWidthAt } from './shape.ts';
import { NAUTICAL_MILE, WIDTH_RANGES } from './vehicle-class.ts';

type Pieces = readonly (readonly Position[])[];

/** A corridor as it is drawn: everything in the plane of degrees, cut at the date line. */
export interface Drawing {
  /** Rings, counterclockwise, the first position not repeated. */
  readonly circle: Pieces;
  readonly exclusion: Pieces;
  readonly corridor: Pieces;
  readonly flightLine: Pieces;
  /** The published widths that the range takes in, each a line from the left side to the right. */
  readonly widths: readonly { readonly rangeNm: number; readonly lines: Pieces }[];
}

/** Even steps along a drawn line, so that a chart bends it as the Earth does. */
const LINE_STEPS = 100;

const along = (from: number, to: number): number[] =>
  Array.from({ length: LINE_STEPS + 1 }, (_, step) => from + (step / LINE_STEPS) * (to - from));

/** Everything of a corridor that a map shows. @see tests/core/downrange/corridor.test.ts */
export function drawCorridor(corridor: Corridor): Drawing {
  const { shape } = corridor;
  const rings = (outline: Parameters<typeof placed>[1]): Pieces => planarRings(placed(corridor, outline));
  const lines = (outline: Parameters<typeof placed>[1]): Pieces => planarLines(placed(corridor, outline));
  return {
    circle: rings(circleOutline(shape)),
    exclusion: rings(exclusionOutline(shape)),
    corridor: rings(corridorOutline(shape)),
    flightLine: lines(along(0, shape.range).map((s) => [s, 0])),
    widths: WIDTH_RANGES.filter((range) => range <= shape.range).map((range) => {
      const half = halfWidthAt(shape, range);
      return {
        rangeNm: Math.round(range / NAUTICAL_MILE),
        lines: lines(along(-half, half).map((y) => [range, y])),
      };
    }),
  };
}
