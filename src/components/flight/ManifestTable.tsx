import { useState } from 'react';
import { Button } from '#components/ui/index.ts';
import type { OrbitResult } from '#contract/evaluate.ts';
import { formatCount, formatFull, formatNumber } from '#contract/format.ts';
import type { InputOrbit } from '#contract/study-inputs.ts';
import type { ManifestRow } from './rows.ts';
import { nameOf, wayInWords } from './words.ts';
import { SiteHead } from './SiteHead.tsx';

const ROWS_AT_FIRST = 50;

interface ManifestTableProps {
  rows: readonly ManifestRow[];
  orbits: readonly InputOrbit[];
  hasVehicle: boolean;
  chosenCode: string;
  onChoose: (code: string) => void;
}

function Cell({ result, hasVehicle }: { result: OrbitResult | undefined; hasVehicle: boolean }) {
  if (!result || result.way === 'out-of-reach') return <>out of reach</>;
  const figure = hasVehicle ? result.payloadKg : result.deltaVMps.total;
  return (
    <>
      {figure === null ? (
        <span className="fails">falls short by {formatNumber(result.shortfallMps ?? 0)} m/s</span>
      ) : (
        <span title={formatFull(figure)}>{formatNumber(figure)}</span>
      )}
      <span className="sub font-sans">{wayInWords(result)}</span>
    </>
  );
}

/** Every site for every orbit of the manifest, the largest payload a year first. */
export function ManifestTable({ rows, orbits, hasVehicle, chosenCode, onChoose }: ManifestTableProps) {
  const [count, setCount] = useState(ROWS_AT_FIRST);
  return (
    <>
      <div className="table-scroll mt-5">
        <table className="table" data-hover="">
          <thead>
            <tr>
              <th scope="col">Site</th>
              <th scope="col" className="num">
                Payload a year<span className="unit">t</span>
              </th>
              {orbits.map((orbit) => (
                <th key={orbit.code} scope="col" className="num">
                  {nameOf(orbit)}
                  <span className="unit">{hasVehicle ? 'kg a flight' : 'Δv, m/s'}</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.slice(0, count).map(({ site, results, payloadPerYearKg }) => (
              <tr key={site.siteId} aria-selected={site.code === chosenCode}>
                <th scope="row">
                  <SiteHead site={site} onChoose={onChoose} />
                </th>
                <td className="num font-medium">
                  {payloadPerYearKg === null ? '–' : formatNumber(payloadPerYearKg / 1000, 1)}
                </td>
                {orbits.map((orbit, i) => (
                  <td key={orbit.code} className="num">
                    <Cell result={results[i]} hasVehicle={hasVehicle} />
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {rows.length > count && (
        <div className="mt-3 flex items-center gap-4">
          <Button onClick={() => setCount(count + 200)}>Show 200 more sites</Button>
          <span className="caption">
            {formatNumber(count)} of {formatCount(rows.length, 'site')}, largest payload first
          </span>
        </div>
      )}
    </>
  );
}
