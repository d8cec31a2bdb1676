import { useId } from 'react';
import { ChartPatterns } from '#components/ui/index.ts';
import type { VehicleInput } from '#contract/vehicle.ts';
import { formatNumber } from '#contract/format.ts';
import { closedSums } from '#core/printed/closing.ts';
import { partFill } from './BudgetBar.tsx';
import { BUDGET_LINES, budgetParts } from './budget.ts';
import type { FlightRow } from './rows.ts';

/** What each part of a bar stands for, by pattern and word. */
export function BudgetKey() {
  const patterns = useId();
  return (
    <ul className="caption flex flex-wrap gap-x-5 gap-y-1" aria-label="Parts of a Δv bar, from the left">
      {BUDGET_LINES.map(({ name, paint }) => (
        <li key={name} className="flex items-center gap-2">
          <svg className="chart" width="22" height="12" aria-hidden="true">
            <ChartPatterns id={patterns} />
            <rect x="0.5" y="0.5" width="21" height="11" {...partFill(paint, patterns)} />
          </svg>
          {name}
        </li>
      ))}
    </ul>
  );
}

interface BudgetLinesProps {
  rows: readonly FlightRow[];
  losses: VehicleInput['lossesMps'] | null;
}

/** Every line of every budget, rounded so that each printed total is the sum of the digits beside it. */
export function BudgetLines({ rows, losses }: BudgetLinesProps) {
  const flown = rows.flatMap(({ site, result }) =>
    result.way === 'out-of-reach'
      ? []
      : [{ site, total: result.deltaVMps.total, parts: budgetParts(result, losses) }],
  );
  const { decimals, sums } = closedSums(
    flown.map(({ parts, total }) => ({ parts: parts.map(({ mps }) => mps), total })),
    0,
  );
  return (
    <details className="chart-as-table">
      <summary>Budgets line by line, as a table</summary>
      <div className="table-scroll mt-3">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Site</th>
              {BUDGET_LINES.map(({ name }) => (
                <th key={name} scope="col" className="num">
                  {name}
                  <span className="unit">m/s</span>
                </th>
              ))}
              <th scope="col" className="num">
                Total Δv<span className="unit">m/s</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {flown.map(({ site }, i) => (
              <tr key={site.siteId}>
                <th scope="row">{site.name}</th>
                {sums[i]?.parts.map((mps, line) => (
                  <td key={BUDGET_LINES[line]?.name} className="num">
                    {formatNumber(mps, decimals)}
                  </td>
                ))}
                <td className="num font-medium">{formatNumber(sums[i]?.total ?? 0, decimals)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}
