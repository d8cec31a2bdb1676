import type { AscentFigures } from '#contract/ascent-job.ts';
import { formatFull, formatNumber } from '#contract/format.ts';
import { closedSums } from '#core/printed/closing.ts';
import { ACCOUNT_LINES, accountOf } from './results.ts';

interface AccountTableProps {
  /** One flight, or two to be compared. */
  flights: readonly { code: string; name: string; figures: AscentFigures }[];
}

const MORE = [
  { name: 'Payload', unit: 'kg', read: (f: AscentFigures) => f.payloadKg, decimals: 0 },
  { name: 'Burn-out after', unit: 's', read: (f: AscentFigures) => f.burnOutS, decimals: 0 },
  { name: 'Launch heading flown', unit: '°', read: (f: AscentFigures) => f.launchHeadingDeg, decimals: 1 },
  { name: 'Inclination flown', unit: '°', read: (f: AscentFigures) => f.flownInclinationDeg, decimals: 1 },
  {
    name: 'Greatest dynamic pressure',
    unit: 'kPa',
    read: (f: AscentFigures) => (f.maxDynamicPressurePa === null ? null : f.maxDynamicPressurePa / 1000),
    decimals: 1,
  },
];

/** Where the ideal Δv of a flight went, line by line to its sum, and what else there is to know of it. */
export function AccountTable({ flights }: AccountTableProps) {
  const { decimals, sums } = closedSums(
    flights.flatMap(({ figures }) => accountOf(figures) ?? []),
    0,
  );
  return (
    <table className="table" data-dense="">
      <thead>
        <tr>
          <th scope="col">To injection, along the air-relative velocity</th>
          {flights.map(({ code, name }) => (
            <th key={code} scope="col" className="num" title={name}>
              {flights.length > 1 ? code : name}
              <span className="unit">m/s</span>
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {ACCOUNT_LINES.map((name, at) => (
          <tr key={name}>
            <th scope="row">
              <span className="inline-block first-letter:uppercase">{name}</span>
            </th>
            {flights.map(({ code }, which) => (
              <td key={code} className="num" title={formatFull(sums[which]?.parts[at] ?? 0)}>
                {formatNumber(sums[which]?.parts[at] ?? 0, decimals)}
              </td>
            ))}
          </tr>
        ))}
        <tr>
          <th scope="row" className="font-medium">
            Ideal Δv
          </th>
          {flights.map(({ code }, which) => (
            <td key={code} className="num font-medium">
              {formatNumber(sums[which]?.total ?? 0, decimals)}
            </td>
          ))}
        </tr>
      </tbody>
      <tbody>
        {MORE.map(({ name, unit, read, decimals: digits }) => (
          <tr key={name}>
            <th scope="row">
              {name}, {unit}
            </th>
            {flights.map(({ code, figures }) => {
              const value = read(figures);
              return (
                <td key={code} className="num" title={value === null ? undefined : formatFull(value)}>
                  {value === null ? '–' : formatNumber(value, digits)}
                </td>
              );
            })}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
