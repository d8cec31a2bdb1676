import { memo } from 'react';
import type { PlacedLabel, ScatterPoint } from './scatter.ts';

type Placed = ScatterPoint & { px: number; py: number };

interface ScatterMarksProps {
  points: readonly Placed[];
  edge: readonly ScatterPoint[];
  atX: (figure: number) => number;
  atY: (figure: number) => number;
  labels: readonly PlacedLabel[];
  /** The site the pointer is on. */
  read: ScatterPoint | null;
}

const SMALL = 3;
const LARGE = 4.5;

/** Points, edge and names; the many are one path a kind, so that thousands cost little. */
export function ScatterMarks({ points, edge, atX, atY, labels, read }: ScatterMarksProps) {
  return (
    <g aria-hidden="true">
      <Many points={points} />
      <path className="sv-edge" d={stepped(edge, atX, atY)} />
      {points
        .filter(({ onEdge, standing }) => onEdge || standing === 'leader')
        .map(({ siteId, px, py, standing, onEdge }) => (
          <circle
            key={siteId}
            className={standing === 'leader' ? (onEdge ? 'fill-signal' : 'sv-leader-open') : 'fill-1'}
            cx={px}
            cy={py}
            r={LARGE}
          />
        ))}
      {labels.map(({ siteId, name, x, y, anchor }) => (
        <text
          key={siteId}
          className={points[0]?.siteId === siteId ? 'halo signal-text' : 'halo'}
          x={x}
          y={y}
          textAnchor={anchor}
        >
          {name}
        </text>
      ))}
      {read && <circle className="sv-read" cx={atX(read.x)} cy={atY(read.y)} r={LARGE + 3.5} />}
    </g>
  );
}

const circle = (px: number, py: number): string =>
  `M${px.toFixed(1)} ${py.toFixed(1)}m${-SMALL} 0a${SMALL} ${SMALL} 0 1 0 ${2 * SMALL} 0a${SMALL} ${SMALL} 0 1 0 ${-2 * SMALL} 0`;
const cross = (px: number, py: number): string =>
  `M${(px - SMALL).toFixed(1)} ${(py - SMALL).toFixed(1)}l${2 * SMALL} ${2 * SMALL}m0 ${-2 * SMALL}l${-2 * SMALL} ${2 * SMALL}`;

/** Ranked sites off the edge as circles, the others as crosses. */
const Many = memo(function Many({ points }: { points: readonly Placed[] }) {
  const ranked = points.filter(({ standing }) => standing === 'ranked');
  const apart = points.filter(({ standing }) => standing === 'apart');
  return (
    <>
      <path className="sv-apart" d={apart.map(({ px, py }) => cross(px, py)).join('')} />
      <path className="candidate" d={ranked.map(({ px, py }) => circle(px, py)).join('')} />
    </>
  );
});

/** The border of what the edge's sites outdo: from one straight to the next one's reach, then along it. */
function stepped(
  edge: readonly ScatterPoint[],
  atX: (figure: number) => number,
  atY: (figure: number) => number,
): string {
  return edge.map(({ x, y }, at) => (at === 0 ? `M${atX(x)} ${atY(y)}` : `H${atX(x)}V${atY(y)}`)).join('');
}
