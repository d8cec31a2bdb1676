import type { ReactNode } from 'react';
import { formatNumber } from '#contract/format.ts';

/** The seven parts of a contribution bar, told apart by pattern and letter, not by colour. */
export const PART_LETTERS = ['A', 'B', 'C', 'D', 'E', 'F', 'G'] as const;

const PART_FILL = ['fill-1', 'ruled', 'hatched', 'fill-2', 'dotted', 'fill-3', 'fill-open'] as const;

/** The paint of part `index` (0 = A): a class for a tint, a fill for a pattern. Spread on a <rect>. */
export function partPaint(index: number, patterns: string): { className?: string; fill?: string } {
  const paint = PART_FILL[index % PART_FILL.length] ?? 'fill-open';
  return paint.startsWith('fill-')
    ? { className: paint }
    : { className: 'part-outline', fill: `url(#${patterns}-${paint})` };
}

/** Also for other bars: `url(#${patterns}-hatched)`, `-ruled`, `-dotted`, `-crossed`, `-cut`. */
export function ChartPatterns({ id }: { id: string }) {
  return (
    <defs>
      <pattern id={`${id}-ruled`} width="4" height="4" patternUnits="userSpaceOnUse">
        <rect width="4" height="4" fill="var(--sheet)" />
        <path d="M0 1H4" stroke="var(--tint-1)" strokeWidth="1.6" />
      </pattern>
      <pattern
        id={`${id}-hatched`}
        width="6"
        height="6"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <rect width="6" height="6" fill="var(--sheet)" />
        <path d="M1 0V6" stroke="var(--tint-1)" strokeWidth="1.8" />
      </pattern>
      <pattern id={`${id}-dotted`} width="4" height="4" patternUnits="userSpaceOnUse">
        <rect width="4" height="4" fill="var(--sheet)" />
        <rect x="1" y="1" width="1.8" height="1.8" fill="var(--tint-1)" />
      </pattern>
      <pattern
        id={`${id}-crossed`}
        width="5"
        height="5"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <rect width="5" height="5" fill="var(--sheet)" />
        <path d="M0 1H5M1 0V5" stroke="var(--tint-1)" strokeWidth="1.4" />
      </pattern>
      <pattern
        id={`${id}-cut`}
        width="6"
        height="6"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <path d="M0 0V6" stroke="var(--field)" strokeWidth="1" />
      </pattern>
    </defs>
  );
}

interface AxisProps {
  ticks: readonly number[];
  /** Place of a tick's value along the axis, px. */
  at: (value: number) => number;
  decimals?: number;
  /** Where the grid lines run to, px, across the axis. */
  from: number;
  to: number;
}

/** Ticks above or below a chart with vertical grid lines from `from` to `to`; `labelY` is their baseline. */
export function XAxis({ ticks, at, decimals = 0, from, to, labelY }: AxisProps & { labelY: number }) {
  return (
    <g aria-hidden="true">
      {ticks.map((tick) => (
        <g key={tick}>
          <path className="grid-line" d={`M${at(tick)} ${from}V${to}`} />
          <text className="tick" x={at(tick)} y={labelY} textAnchor="middle">
            {formatNumber(tick, decimals)}
          </text>
        </g>
      ))}
    </g>
  );
}

/** Ticks at the left, right-aligned to `labelX`, with horizontal grid lines from `from` to `to`. */
export function YAxis({ ticks, at, decimals = 0, from, to, labelX }: AxisProps & { labelX: number }) {
  return (
    <g aria-hidden="true">
      {ticks.map((tick) => (
        <g key={tick}>
          <path className="grid-line" d={`M${from} ${at(tick)}H${to}`} />
          <text className="tick" x={labelX} y={at(tick) + 4} textAnchor="end">
            {formatNumber(tick, decimals)}
          </text>
        </g>
      ))}
    </g>
  );
}

interface ChartProps {
  /** A sentence that says what the chart shows and finds. */
  label: string;
  width: number;
  height: number;
  children: ReactNode;
  /** The same figures as a table; it stands behind "as a table". */
  table?: ReactNode;
}

export function Chart({ label, width, height, children, table }: ChartProps) {
  return (
    <>
      {/* On a narrow screen a chart keeps its size, so that its words stay readable, and scrolls in its place. */}
      <div className="chart-scroll" role="region" aria-label={`Chart: ${label}`} tabIndex={0}>
        <svg
          className="chart"
          role="img"
          aria-label={label}
          width={width}
          height={height}
          viewBox={`0 0 ${width} ${height}`}
        >
          {children}
        </svg>
      </div>
      {table && (
        <details className="chart-as-table">
          <summary>As a table</summary>
          {table}
        </details>
      )}
    </>
  );
}
