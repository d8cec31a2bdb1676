import { useEffect, useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import type { CriterionShape } from '#contract/criterion.ts';
import { formatNumber } from '#contract/format.ts';
import {
  arrowMove,
  bend,
  dragKnot,
  figureAt,
  middleOf,
  nudgeCurve,
  nudgeKnot,
  positionOf,
  type Levels,
} from './shape-editing.ts';
import { HEIGHT, round, WIDTH, type Plot } from './value-plot.ts';
import type { ShapeEdit } from './ValueFunction.tsx';
import { figureInWords } from './words.ts';

const HANDLE = 10;
const HIT = 28;
/** Arrow presses that follow each other within this are one change. */
const KEY_PAUSE_MS = 700;

interface HandlesProps {
  plot: Plot;
  levels: Levels;
  shape: CriterionShape;
  unit: string;
  edit: ShapeEdit;
}

interface Handle {
  key: string;
  name: string;
  position: number;
  value: number;
  /** The shape with this handle dragged to a place, and pushed by an arrow. */
  dragged: (position: number, value: number, fine: boolean) => CriterionShape;
  pushed: (step: readonly [number, number]) => CriterionShape;
}

function handlesOf(shape: CriterionShape): Handle[] {
  if (shape.kind === 'straight') return [];
  if (shape.kind === 'exponential') {
    const { kind, curvature } = shape;
    return [
      {
        key: 'middle',
        name: 'Middle of the curve',
        position: 0.5,
        value: middleOf(shape),
        dragged: (_, value) => ({ kind, curvature: bend(value) }),
        pushed: ([, dv]) => ({ kind, curvature: dv === 0 ? curvature : nudgeCurve(curvature, dv) }),
      },
    ];
  }
  const { kind, knots } = shape;
  return knots.slice(1, -1).map(([position, value], at) => ({
    key: `${at + 1}`,
    name: `Point ${at + 2} of ${knots.length}`,
    position,
    value,
    dragged: (s, v, fine) => ({ kind, knots: dragKnot(knots, at + 1, [s, v], fine) }),
    pushed: (step) => ({ kind, knots: nudgeKnot(knots, at + 1, step) }),
  }));
}

/** What can be taken hold of, laid over the drawing: a point each, or the middle of the curve. */
export function ShapeHandles({ plot, levels, shape, unit, edit }: HandlesProps) {
  const frame = useRef<SVGSVGElement>(null);
  const [active, setActive] = useState<string | null>(null);
  const pause = useRef<number | undefined>(undefined);
  useEffect(() => () => window.clearTimeout(pause.current), []);
  const handles = handlesOf(shape);
  if (handles.length === 0) return null;

  const drag = (event: PointerEvent<SVGGElement>, handle: Handle): void => {
    if (!event.currentTarget.hasPointerCapture(event.pointerId) || !frame.current) return;
    const box = frame.current.getBoundingClientRect();
    const figure = plot.x.invert(((event.clientX - box.left) * WIDTH) / box.width);
    const value = plot.y.invert(((event.clientY - box.top) * HEIGHT) / box.height);
    edit.onDraw(handle.dragged(positionOf(levels, figure), value, event.shiftKey));
  };
  const push = (event: KeyboardEvent, handle: Handle): void => {
    const step = arrowMove(event.key, event.shiftKey, levels);
    if (!step) return;
    event.preventDefault();
    edit.onDraw(handle.pushed(step));
    window.clearTimeout(pause.current);
    pause.current = window.setTimeout(edit.onSettle, KEY_PAUSE_MS);
  };
  const leave = (): void => {
    window.clearTimeout(pause.current);
    setActive(null);
    edit.onSettle();
  };
  return (
    <svg
      ref={frame}
      className="vf-handles"
      role="group"
      aria-label="Handles of the value function"
      width={WIDTH}
      height={HEIGHT}
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
    >
      {handles.map((handle) => {
        const figure = figureAt(levels, handle.position);
        const [x, y] = [round(plot.x(figure)), round(plot.y(handle.value))];
        return (
          <g
            key={handle.key}
            className="vf-handle"
            data-active={active === handle.key ? '' : undefined}
            role="slider"
            tabIndex={0}
            aria-label={handle.name}
            aria-orientation="vertical"
            aria-valuemin={0}
            aria-valuemax={1}
            aria-valuenow={handle.value}
            aria-valuetext={`value ${formatNumber(handle.value, 3)} at ${figureInWords(figure)} ${unit}`.trim()}
            onPointerDown={(event) => event.currentTarget.setPointerCapture(event.pointerId)}
            onPointerMove={(event) => drag(event, handle)}
            onPointerUp={edit.onSettle}
            onKeyDown={(event) => push(event, handle)}
            onFocus={() => setActive(handle.key)}
            onBlur={leave}
          >
            <rect className="vf-hit" x={x - HIT / 2} y={y - HIT / 2} width={HIT} height={HIT} />
            <rect
              className="vf-square"
              x={x - HANDLE / 2}
              y={y - HANDLE / 2}
              width={HANDLE}
              height={HANDLE}
            />
          </g>
        );
      })}
    </svg>
  );
}
