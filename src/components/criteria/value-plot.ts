/* The frame a value function is drawn in, shared by its line, its candidates and its handles. */
import { scaleLinear } from 'd3-scale';
import { valueOf } from '#core/decision/value.ts';
import type { Shape } from '#core/decision/shape.ts';
import { figureAt, type Levels } from './shape-editing.ts';

export const WIDTH = 520;
export const HEIGHT = 270;
export const LEFT = 44;
export const RIGHT = 12;
/** Under the leader's note, which stands clear of the line and its handles. */
export const TOP = 34;
export const FLOOR = 188;
/** Room left and right of the outermost figure, as a share of the span. */
const MARGIN = 0.06;
const CURVE_STEPS = 60;

export type Scale = (value: number) => number;

export interface Plot {
  x: Scale & { invert: Scale; ticks: (count: number) => number[] };
  y: Scale & { invert: Scale };
  low: number;
  high: number;
}

/** Wide enough for the levels and every candidate. */
export function plotOf({ worst, best }: Levels, figures: readonly number[]): Plot {
  const ends = [worst, best, ...figures];
  const [least, most] = [Math.min(...ends), Math.max(...ends)];
  const room = (most - least) * MARGIN;
  const [low, high] = [least - room, most + room];
  return {
    x: scaleLinear([low, high], [LEFT, WIDTH - RIGHT]),
    y: scaleLinear([0, 1], [FLOOR, TOP]),
    low,
    high,
  };
}

export const round = (place: number): number => Math.round(place * 10) / 10;

/** Positions between the levels at which a shape's line is drawn. */
function positionsOf(shape: Shape): number[] {
  if (shape.kind === 'straight') return [0, 1];
  if (shape.kind === 'piecewise') return shape.knots.map(([s]) => s);
  return Array.from({ length: CURVE_STEPS + 1 }, (_, step) => step / CURVE_STEPS);
}

/** The line of a shape, level beyond its levels, as an SVG path. */
export function linePath({ x, y, low, high }: Plot, levels: Levels, shape: Shape): string {
  const span = { kind: 'span', ...levels } as const;
  const inner = positionsOf(shape).map((s) => figureAt(levels, s));
  const figures = [low, ...inner, high].sort((a, b) => a - b);
  const places = figures.map((figure) => `${round(x(figure))} ${round(y(valueOf(figure, span, shape)))}`);
  return `M${places.join('L')}`;
}

/** The straight line between the levels, for comparison. */
export const straightPath = ({ x, y }: Plot, { worst, best }: Levels): string =>
  `M${round(x(worst))} ${round(y(0))}L${round(x(best))} ${round(y(1))}`;
