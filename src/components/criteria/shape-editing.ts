/* What dragging, arrow keys and typing do to a value function; nothing of it draws or saves. */
import { MOST_CURVATURE, type CriterionShape } from '#contract/criterion.ts';
import { curvatureThrough } from '#core/decision/curvature.ts';
import { MOST_KNOTS, shapedValue, type Knot } from '#core/decision/shape.ts';

export type ShapeKind = CriterionShape['kind'];
type Knots = [number, number][];

/** What a value runs between, in the criterion's unit; the worst level may be the greater figure. */
export interface Levels {
  worst: number;
  best: number;
}

/** Knots do not come closer than the finest step of a key, so that each can be told and moved. */
export const LEAST_GAP = 0.001;
const COARSE = 0.01;
const FINE = 0.001;

export const figureAt = ({ worst, best }: Levels, position: number): number =>
  worst + position * (best - worst);

/** Where a figure lies from the worst level (0) to the best (1), unclamped. */
export const positionOf = ({ worst, best }: Levels, figure: number): number =>
  (figure - worst) / (best - worst);

const clamp = (value: number, least: number, most: number): number => Math.min(Math.max(value, least), most);
const toStep = (value: number, step: number): number => Math.round(value / step) * step;
/** Without the digits that adding steps leaves behind. */
const tidy = (value: number): number => Number(value.toFixed(9));

/** Where a knot may go: beyond the one before it, short of the one after, and not falling. */
export function knotRange(knots: readonly Knot[], index: number): { from: Knot; to: Knot } {
  const [before = [0, 0], after = [1, 1]] = [knots[index - 1], knots[index + 1]];
  return { from: [before[0] + LEAST_GAP, before[1]], to: [after[0] - LEAST_GAP, after[1]] };
}

const isInner = (knots: readonly Knot[], index: number): boolean => index > 0 && index < knots.length - 1;
const kept = (knots: readonly Knot[]): Knots => knots.map(([s, v]) => [s, v]);

/** One knot put as near to a place as its neighbours let it; the ends are the levels and stay. */
export function moveKnot(knots: readonly Knot[], index: number, [s, v]: Knot): Knots {
  if (!isInner(knots, index)) return kept(knots);
  const { from, to } = knotRange(knots, index);
  // Kept closer together by other means than this screen's: there is no room to move in.
  if (from[0] > to[0]) return kept(knots);
  return knots.map(([position, value], at) =>
    at === index ? [tidy(clamp(s, from[0], to[0])), tidy(clamp(v, from[1], to[1]))] : [position, value],
  );
}

/** The same to whole steps of 1 %, or of 0.1 % where it is moved finely, as a hand can set it. */
export const dragKnot = (knots: readonly Knot[], index: number, [s, v]: Knot, fine: boolean): Knots => {
  const step = fine ? FINE : COARSE;
  return moveKnot(knots, index, [toStep(s, step), toStep(v, step)]);
};

/**
 * What an arrow key means, as [figure, value] steps of 1 %, or 0.1 % where `fine`; undefined for any other key. Right is
 * towards greater figures, whichever level they lead to.
 */
export function arrowMove(key: string, fine: boolean, levels: Levels): Knot | undefined {
  const step = fine ? FINE : COARSE;
  const right = levels.best > levels.worst ? step : -step;
  const moves: Readonly<Record<string, Knot>> = {
    ArrowRight: [right, 0],
    ArrowLeft: [-right, 0],
    ArrowUp: [0, step],
    ArrowDown: [0, -step],
  };
  return moves[key];
}

export function nudgeKnot(knots: readonly Knot[], index: number, [ds, dv]: Knot): Knots {
  const [s, v] = knots[index] ?? [0, 0];
  return moveKnot(knots, index, [s + ds, v + dv]);
}

export const canAddKnot = (knots: readonly Knot[]): boolean => knots.length < MOST_KNOTS;

/** A further knot on the line, half way along its longest piece: it changes no value until it is moved. */
export function addKnot(knots: readonly Knot[]): Knots {
  if (!canAddKnot(knots)) return kept(knots);
  let at = 1;
  const gap = (index: number): number => (knots[index]?.[0] ?? 0) - (knots[index - 1]?.[0] ?? 0);
  for (let index = 2; index < knots.length; index++) if (gap(index) > gap(at) + 1e-12) at = index;
  const [before = [0, 0], after = [1, 1]] = [knots[at - 1], knots[at]];
  const middle: [number, number] = [(before[0] + after[0]) / 2, (before[1] + after[1]) / 2];
  return kept([...knots.slice(0, at), middle, ...knots.slice(at)]);
}

/** @returns the knots without one; the ends stay. */
export const removeKnot = (knots: readonly Knot[], index: number): Knots =>
  kept(isInner(knots, index) ? knots.filter((_, at) => at !== index) : knots);

/** The curvature of a curve through a value half way, to a hundredth and within what a curvature may be. */
export function bend(middle: number): number {
  const within = clamp(middle, 1e-6, 1 - 1e-6);
  return tidy(toStep(clamp(curvatureThrough(within), -MOST_CURVATURE, MOST_CURVATURE), COARSE));
}

/** The value of a shape half way between the levels: where a curve's handle stands. */
export const middleOf = (shape: CriterionShape): number => shapedValue(0.5, shape);

/** An arrow on the curve's handle: its middle moves by as much, unless the curvature is at its end. */
export const nudgeCurve = (curvature: number, dv: number): number =>
  bend(middleOf({ kind: 'exponential', curvature }) + dv);

const SAMPLES = [0.25, 0.5, 0.75];

/** The nearest shape of another kind, so that choosing one moves values as little as may be. */
export function shapeAs(kind: ShapeKind, shape: CriterionShape): CriterionShape {
  if (kind === shape.kind) return shape;
  if (kind === 'straight') return { kind };
  if (kind === 'exponential') return { kind, curvature: bend(middleOf(shape)) };
  const inner = shape.kind === 'straight' ? [0.5] : SAMPLES;
  const knots: Knots = inner.map((s) => [s, Number(shapedValue(s, shape).toFixed(3))]);
  return { kind, knots: [[0, 0], ...knots, [1, 1]] };
}
