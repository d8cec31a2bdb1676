import { scaleLinear } from 'd3-scale';
import { useMemo, useState, type PointerEvent } from 'react';
import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import { Chart, XAxis, YAxis } from '#components/ui/chart.tsx';
import { Select } from '#components/ui/Field.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { EmptyState } from '#components/ui/States.tsx';
import { decimalsNeeded } from '#core/printed/figure.ts';
import type { CriterionColumn } from '../columns.ts';
import { useViewParam } from '../use-view-param.ts';
import type { RankingViewProps } from '../views.ts';
import { placeLabels, scatterPoints, type ScatterPoint } from './scatter.ts';
import { ScatterMarks } from './ScatterMarks.tsx';
import { ScatterTable } from './ScatterTable.tsx';

const WIDTH = 640;
const HEIGHT = 430;
const FRAME = { left: 64, right: WIDTH - 12, top: 24, bottom: HEIGHT - 56 };
/** How near the pointer has to come to a point to read it, px. */
const REACH = 18;

/** Any two criteria against each other, with the edge of sites that none beats on both. */
export function Scatter({ model, sheet }: Pick<RankingViewProps, 'model' | 'sheet'>) {
  const { columns } = sheet;
  const [x, setX] = useViewParam('x');
  const [y, setY] = useViewParam('y');
  const heaviest = [...columns].sort((a, b) => b.criterion.weight - a.criterion.weight || a.place - b.place);
  const across = columns.find(({ criterion }) => criterion.id === x) ?? heaviest[0];
  const up =
    columns.find(({ criterion }) => criterion.id === y) ?? heaviest.find((one) => one !== across) ?? across;
  if (!across || !up) return null;
  const choices = columns.map(({ criterion, letter }) => ({
    value: criterion.id,
    name: `${letter} ${criterion.name}`,
  }));
  return (
    <Panel
      title="Two criteria against each other"
      caption="Filled: no ranked site is better on one without being worse on the other. The stepped line joins them."
    >
      <div className="sv-picks">
        <Select
          label="Across"
          choices={choices}
          value={across.criterion.id}
          onChange={(event) => setX(event.target.value)}
        />
        <Select
          label="Up"
          choices={choices}
          value={up.criterion.id}
          onChange={(event) => setY(event.target.value)}
        />
      </div>
      <Plot model={model} across={across} up={up} />
    </Panel>
  );
}

interface PlotProps {
  model: RankingViewProps['model'];
  across: CriterionColumn;
  up: CriterionColumn;
}

function Plot({ model, across, up }: PlotProps) {
  const [read, setRead] = useState<ScatterPoint | null>(null);
  const found = useMemo(() => scatterPoints(model, across.place, up.place), [model, across.place, up.place]);
  const { points, edge, unplaced } = found;
  const drawn = useMemo(() => drawingOf(points), [points]);
  if (points.length === 0) {
    return (
      <EmptyState fact="No site has both figures.">
        Choose two criteria that sites have figures for.
      </EmptyState>
    );
  }
  const { atX, atY, ticksX, ticksY, placed, labels } = drawn;
  const reading = (event: PointerEvent<SVGRectElement>): void => {
    const box = event.currentTarget.getBoundingClientRect();
    const scale = (FRAME.right - FRAME.left) / box.width;
    const px = FRAME.left + (event.clientX - box.left) * scale;
    const py = FRAME.top + (event.clientY - box.top) * scale;
    setRead(nearestTo(placed, px, py));
  };
  return (
    <>
      <Chart
        label={inWords(found, across, up)}
        width={WIDTH}
        height={HEIGHT}
        table={<ScatterTable points={points} across={across} up={up} />}
      >
        <XAxis
          ticks={ticksX}
          at={atX}
          decimals={decimalsNeeded(ticksX)}
          from={FRAME.top}
          to={FRAME.bottom}
          labelY={FRAME.bottom + 18}
        />
        <YAxis
          ticks={ticksY}
          at={atY}
          decimals={decimalsNeeded(ticksY)}
          from={FRAME.left}
          to={FRAME.right}
          labelX={FRAME.left - 8}
        />
        <path className="axis" d={`M${FRAME.left} ${FRAME.top}V${FRAME.bottom}H${FRAME.right}`} />
        <text className="strong" x={FRAME.right} y={FRAME.bottom + 42} textAnchor="end">
          {titleOf(across, { more: 'better →', less: '← better' })}
        </text>
        <text className="strong" x={4} y={FRAME.top - 10}>
          {titleOf(up, { more: '↑ better', less: '↓ better' })}
        </text>
        <BetterCorner across={across} up={up} />
        <ScatterMarks points={placed} edge={edge} atX={atX} atY={atY} labels={labels} read={read} />
        <rect
          x={FRAME.left}
          y={FRAME.top}
          width={FRAME.right - FRAME.left}
          height={FRAME.bottom - FRAME.top}
          fill="transparent"
          onPointerMove={reading}
          onPointerDown={reading}
          onPointerLeave={() => setRead(null)}
        />
      </Chart>
      <p className="caption sv-reading" aria-hidden="true">
        {read
          ? `${read.name}: ${figureOf(across, read.x)}, ${figureOf(up, read.y)}`
          : unplaced > 0
            ? `${formatCount(unplaced, 'site')} without one of the two figures ${unplaced === 1 ? 'is' : 'are'} not drawn.`
            : 'Point at a site to read its figures.'}
      </p>
    </>
  );
}

type Placed = ScatterPoint & { px: number; py: number };

function drawingOf(points: readonly ScatterPoint[]) {
  const scaleOf = (figures: number[], from: number, to: number) => {
    const [least, most] = [Math.min(...figures), Math.max(...figures)];
    const pad = (most - least) * 0.06 || Math.abs(most) * 0.06 || 1;
    return scaleLinear()
      .domain([least - pad, most + pad])
      .range([from, to]);
  };
  const scaleX = scaleOf(
    points.map(({ x }) => x),
    FRAME.left,
    FRAME.right,
  );
  const scaleY = scaleOf(
    points.map(({ y }) => y),
    FRAME.bottom,
    FRAME.top,
  );
  const placed = points.map((point): Placed => ({ ...point, px: scaleX(point.x), py: scaleY(point.y) }));
  return {
    atX: (value: number): number => scaleX(value),
    atY: (value: number): number => scaleY(value),
    ticksX: scaleX.ticks(6),
    ticksY: scaleY.ticks(6),
    placed,
    labels: placeLabels(placed, FRAME),
  };
}

function nearestTo(placed: readonly Placed[], px: number, py: number): ScatterPoint | null {
  let nearest: ScatterPoint | null = null;
  let least = REACH ** 2;
  for (const point of placed) {
    const distance = (point.px - px) ** 2 + (point.py - py) ** 2;
    if (distance <= least) [nearest, least] = [point, distance];
  }
  return nearest;
}

const titleOf = ({ criterion }: CriterionColumn, better: Record<'more' | 'less', string>): string =>
  `${criterion.name}${criterion.unit ? `, ${criterion.unit}` : ''}, ${better[criterion.direction]}`;

const figureOf = ({ criterion, decimals }: CriterionColumn, figure: number): string =>
  [criterion.name, formatNumber(figure, decimals), criterion.unit].filter(Boolean).join(' ');

/** The corner where both criteria are at their best. */
function BetterCorner({ across, up }: { across: CriterionColumn; up: CriterionColumn }) {
  const right = across.criterion.direction === 'more';
  const top = up.criterion.direction === 'more';
  const x = right ? FRAME.right : FRAME.left;
  const y = top ? FRAME.top : FRAME.bottom;
  const [toX, toY] = [right ? -1 : 1, top ? 1 : -1];
  return (
    <g aria-hidden="true">
      <path className="sv-corner" d={`M${x} ${y}h${toX * 46}L${x} ${y + toY * 46}Z`} />
      <text className="label-2" x={x + toX * 6} y={y + (top ? 15 : -7)} textAnchor={right ? 'end' : 'start'}>
        best
      </text>
    </g>
  );
}

function inWords(
  { points, edge }: ReturnType<typeof scatterPoints>,
  across: CriterionColumn,
  up: CriterionColumn,
): string {
  const names = edge.map(({ name }) => name);
  const shown = names.length > 5 ? [...names.slice(0, 4), `${formatNumber(names.length - 4)} others`] : names;
  const none =
    names.length === 0
      ? 'No ranked site has both figures'
      : `On the non-dominated edge: ${listInWords(shown)}`;
  return `${formatCount(points.length, 'site')} by ${across.criterion.name} and ${up.criterion.name}. ${none}.`;
}
