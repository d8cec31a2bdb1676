import { scaleLinear } from 'd3-scale';
import type { ReactNode } from 'react';
import { formatNumber, formatSigned } from '#contract/format.ts';
import type { TornadoBarOf, TornadoOf } from '#contract/sensitivity.ts';
import type { Names } from '#contract/sensitivity-words.ts';
import { Chart } from '#components/ui/chart.tsx';
import { decimalsNeeded } from '#core/printed/figure.ts';
import type { CriterionColumn, Sheet } from '../columns.ts';
import { PATTERNS } from '../ValueBar.tsx';
import { shortened } from './shorten.ts';

const WIDTH = 640;
const LEFT = 252;
const RIGHT = WIDTH - 16;
const TOP = 22;
const ROW = 34;
const BAR = 16;
const NAME_LENGTH = 34;

interface TornadoChartProps {
  tornado: TornadoOf;
  names: Names;
  sheet: Sheet;
  table: ReactNode;
}

export function TornadoChart({ tornado: { margin, bars }, names, sheet, table }: TornadoChartProps) {
  const ends = [0, margin, ...bars.flatMap(({ atLow, atHigh }) => [atLow, atHigh])];
  const [least, most] = [Math.min(...ends), Math.max(...ends)];
  const pad = (most - least || 0.1) * 0.08;
  // Where the lead is lost the figure stands left of its bar.
  const before = least < 0 ? 2.5 * pad : pad;
  const scale = scaleLinear()
    .domain([least - before, most + pad])
    .range([LEFT, RIGHT]);
  const at = (value: number): number => Math.round(scale(value) * 10) / 10;
  const ticks = scale.ticks(5);
  const decimals = decimalsNeeded(ticks);
  const bottom = TOP + bars.length * ROW;
  const columns = new Map(sheet.columns.map((column) => [column.criterion.id, column]));
  const figure = (value: number): string => formatSigned(value, sheet.decimals);
  return (
    <Chart label={inWords(margin, bars, names, figure)} width={WIDTH} height={bottom + 24} table={table}>
      <rect
        x={LEFT}
        y={TOP - 4}
        width={at(0) - LEFT}
        height={bottom - TOP + 8}
        fill={`url(#${PATTERNS}-cut)`}
      />
      <g aria-hidden="true">
        {ticks.map((tick) => (
          <g key={tick}>
            <path className={tick === 0 ? 'axis' : 'grid-line'} d={`M${at(tick)} ${TOP - 4}V${bottom + 4}`} />
            <text className="tick" x={at(tick)} y={TOP - 10} textAnchor="middle">
              {formatSigned(tick, tick === 0 ? 0 : decimals)}
            </text>
          </g>
        ))}
      </g>
      {bars.map((bar, place) => (
        <BarRow
          key={`${bar.siteId} ${bar.criterionId}`}
          bar={bar}
          column={columns.get(bar.criterionId)}
          site={names.site(bar.siteId)}
          y={TOP + place * ROW}
          margin={margin}
          at={at}
          figure={figure}
        />
      ))}
      <path className="signal-line" d={`M${at(margin)} ${TOP - 4}V${bottom + 6}`} />
      <text className="signal-text figure halo" x={at(margin)} y={bottom + 20} textAnchor="middle">
        {figure(margin)} now
      </text>
      {at(0) - LEFT > LOST_WIDTH && (
        <text className="label-2" x={at(0) - 6} y={bottom + 20} textAnchor="end">
          lead lost
        </text>
      )}
    </Chart>
  );
}

/** Room that "lead lost" needs left of zero. */
const LOST_WIDTH = 60;

interface BarRowProps {
  bar: TornadoBarOf;
  column: CriterionColumn | undefined;
  site: string;
  y: number;
  margin: number;
  at: (value: number) => number;
  figure: (value: number) => string;
}

function BarRow({ bar, column, site, y, margin, at, figure }: BarRowProps) {
  const { low, high, atLow, atHigh } = bar;
  const range = [
    formatNumber(low, column?.decimals ?? 0),
    'to',
    formatNumber(high, column?.decimals ?? 0),
    column?.criterion.unit,
  ];
  const parts = [
    { end: atLow, paint: 'fill-open' },
    { end: atHigh, paint: 'fill-2' },
    // Where both ends lie on one side the shorter bar must not hide behind the longer.
  ].sort((a, b) => Math.abs(b.end - margin) - Math.abs(a.end - margin));
  const lost = Math.min(atLow, atHigh);
  return (
    <g>
      <text x="0" y={y + 12} className="strong">
        {shortened(`${column?.letter ?? ''} ${site}`, NAME_LENGTH)}
      </text>
      <text x="0" y={y + 26} className="tick">
        {shortened(`${column?.criterion.name ?? ''} ${range.filter(Boolean).join(' ')}`, NAME_LENGTH + 4)}
      </text>
      {parts.map(({ end, paint }) => (
        <rect
          key={paint}
          className={paint}
          x={Math.min(at(end), at(margin))}
          y={y + (ROW - BAR) / 2 - 1}
          width={Math.abs(at(end) - at(margin))}
          height={BAR}
        />
      ))}
      {lost < 0 && (
        <text className="halo figure strong" x={at(lost) - 4} y={y + 20} textAnchor="end">
          {figure(lost)}
        </text>
      )}
    </g>
  );
}

function inWords(
  margin: number,
  bars: readonly TornadoBarOf[],
  names: Names,
  figure: (value: number) => string,
): string {
  const said = bars.map(
    ({ siteId, criterionId, atLow, atHigh }) =>
      `${names.criterion(criterionId)} at ${names.site(siteId)}: ${figure(atLow)} at its low, ${figure(atHigh)} at its high`,
  );
  return `Margin now ${figure(margin)}. ${said.join('; ')}.`;
}
