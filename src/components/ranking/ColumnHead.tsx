import { formatNumber } from '#contract/format.ts';
import { KeyLetter } from '#components/ui/States.tsx';
import type { CriterionColumn } from './columns.ts';

/** The heading of a criterion's column: letter, name, unit, direction with its word, weight. */
export function ColumnHead({ column }: { column: CriterionColumn }) {
  const { criterion, letter, weight, weightDecimals } = column;
  return (
    <span className="rk-head">
      <KeyLetter letter={letter} />
      <span className="rk-head-name">{criterion.name}</span>
      {criterion.unit && <span className="unit">{criterion.unit}</span>}
      <span className="unit rk-head-weight">
        {criterion.direction === 'more' ? '↑ more' : '↓ less'}{' '}
        <b className="num">
          <span className="sr-only">weight </span>
          {formatNumber(weight, weightDecimals)}
        </b>
      </span>
    </span>
  );
}

const TICKS = [0, 0.5, 1];

/** The heading of the overall value, with the scale of the bars under it. */
export function OverallHead({ width }: { width: number }) {
  return (
    <span className="rk-overall-head">
      Overall value, and what it is made of
      <span className="rk-scale">
        <span className="unit">0 to 1</span>
        <svg className="chart" width={width} height="14" aria-hidden="true">
          {TICKS.map((tick) => (
            <text key={tick} className="tick" x={tick * (width - 2)} y="11" textAnchor={anchorOf(tick)}>
              {tick}
            </text>
          ))}
        </svg>
      </span>
    </span>
  );
}

const anchorOf = (tick: number): 'start' | 'middle' | 'end' =>
  tick === 0 ? 'start' : tick === 1 ? 'end' : 'middle';
