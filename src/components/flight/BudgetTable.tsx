import { useId } from 'react';
import { ChartPatterns } from '#components/ui/index.ts';
import { formatFull, formatNumber } from '#contract/format.ts';
import type { VehicleInput } from '#contract/vehicle.ts';
import { BAR_WIDTH, BudgetBar, barAt } from './BudgetBar.tsx';
import { budgetScale, type BudgetScale } from './budget.ts';
import type { FlightRow } from './rows.ts';
import { turnCostMps, wayInWords } from './words.ts';
import { SiteHead } from './SiteHead.tsx';

interface BudgetTableProps {
  rows: readonly FlightRow[];
  losses: VehicleInput['lossesMps'] | null;
  hasVehicle: boolean;
  chosenCode: string;
  onChoose: (code: string) => void;
}

function Figure({ value, decimals = 0 }: { value: number | null; decimals?: number }) {
  return value === null ? <>–</> : <span title={formatFull(value)}>{formatNumber(value, decimals)}</span>;
}

function Payload({ result }: { result: FlightRow['result'] }) {
  if (result.shortfallMps !== null)
    return <span className="fails font-sans">falls short by {formatNumber(result.shortfallMps)} m/s</span>;
  return result.way === 'out-of-reach' ? (
    <span className="font-sans">out of reach</span>
  ) : (
    <Figure value={result.payloadKg} />
  );
}

function BarAxis({ scale }: { scale: BudgetScale }) {
  return (
    <svg
      className="chart mt-1"
      width={BAR_WIDTH}
      height={14}
      viewBox={`0 0 ${BAR_WIDTH} 14`}
      aria-hidden="true"
    >
      {scale.ticks.map((tick) => (
        <text
          key={tick}
          className="tick"
          x={barAt(scale, tick)}
          y="11"
          textAnchor={tick === scale.high ? 'end' : 'middle'}
        >
          {formatNumber(tick)}
        </text>
      ))}
    </svg>
  );
}

function Head({ scale, hasVehicle }: { scale: BudgetScale; hasVehicle: boolean }) {
  return (
    <thead>
      <tr>
        <th scope="col">Site</th>
        <th scope="col" className="max-tablet:hidden">
          Way flown
        </th>
        <th scope="col" className="num max-tablet:hidden">
          Launch azimuth<span className="unit">°</span>
        </th>
        <th scope="col" className="num max-tablet:hidden">
          Rotation gain<span className="unit">m/s</span>
        </th>
        <th scope="col" className="num max-tablet:hidden">
          Required speed<span className="unit">m/s</span>
        </th>
        <th scope="col" className="num max-phone:hidden">
          Turn<span className="unit">m/s</span>
        </th>
        <th scope="col" className="max-sheet:hidden">
          Δv budget<span className="unit">m/s, axis cut at {formatNumber(scale.low)}</span>
          <BarAxis scale={scale} />
        </th>
        <th scope="col" className="num">
          Total Δv<span className="unit">m/s</span>
        </th>
        {hasVehicle && (
          <th scope="col" className="num">
            Payload<span className="unit">kg</span>
          </th>
        )}
      </tr>
    </thead>
  );
}

/** Sites for one orbit, cheapest first: the way flown, the Δv budget as bars, the numbers beside. */
export function BudgetTable({ rows, losses, hasVehicle, chosenCode, onChoose }: BudgetTableProps) {
  const patterns = useId();
  const scale = budgetScale(rows.map(({ result }) => result));
  return (
    <div className="table-scroll mt-5">
      <svg width="0" height="0" aria-hidden="true" className="absolute">
        <ChartPatterns id={patterns} />
      </svg>
      <table className="table" data-hover="">
        <Head scale={scale} hasVehicle={hasVehicle} />
        <tbody>
          {rows.map(({ site, result }) => (
            <tr
              key={site.siteId}
              aria-selected={site.code === chosenCode}
              data-set-aside={result.way === 'out-of-reach' ? '' : undefined}
            >
              <th scope="row">
                <SiteHead site={site} onChoose={onChoose} />
                <span className="sub tablet:hidden">{wayInWords(result)}</span>
              </th>
              <td className="whitespace-nowrap text-ink-2 max-tablet:hidden">{wayInWords(result)}</td>
              <td className="num max-tablet:hidden">
                <Figure value={result.launchAzimuthDeg} decimals={1} />
              </td>
              <td className="num max-tablet:hidden">
                <Figure value={result.rotationGainMps} />
              </td>
              <td className="num max-tablet:hidden">
                <Figure value={result.requiredSpeedMps} />
              </td>
              <td className="num max-phone:hidden">
                <Figure value={turnCostMps(result)} />
              </td>
              <td className="max-sheet:hidden">
                <BudgetBar result={result} losses={losses} scale={scale} patterns={patterns} />
              </td>
              <td className="num font-medium">
                <Figure value={result.deltaVMps.total} />
              </td>
              {hasVehicle && (
                <td className="num font-medium">
                  <Payload result={result} />
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
