import { useState } from 'react';
import { Button, TableScroll } from '#components/ui/index.ts';
import { formatCount, formatFull, formatNumber } from '#contract/format.ts';
import { closedSums } from '#core/printed/closing.ts';
import { ACCOUNT_LINES, accountOf, type FlownRow } from './results.ts';
import { stateInWords } from './words.ts';
import { SiteHead } from '../SiteHead.tsx';

const ROWS_AT_FIRST = 50;

interface FlownTableProps {
  rows: readonly FlownRow[];
  /** Names the table: "Flown ascents to Station supply". */
  label: string;
  /** What the closed form gives with entered losses, by site; null where it gives none. */
  enteredKg: ReadonlyMap<string, number | null>;
  chosenCode: string;
  onChoose: (code: string) => void;
}

function Head() {
  return (
    <thead>
      <tr>
        <th scope="col">Site</th>
        <th scope="col" className="num">
          Payload, flown<span className="unit">kg</span>
        </th>
        <th scope="col" className="num max-phone:hidden">
          With entered losses<span className="unit">kg</span>
        </th>
        {ACCOUNT_LINES.map((name) => (
          <th key={name} scope="col" className="num max-tablet:hidden">
            <span className="inline-block first-letter:uppercase">{name}</span>
            <span className="unit">m/s</span>
          </th>
        ))}
        <th scope="col" className="num">
          Ideal Δv to injection<span className="unit">m/s</span>
        </th>
      </tr>
    </thead>
  );
}

/** Every site's ascent to one orbit: payload, and where the ideal Δv went, line by line. */
export function FlownTable({ rows, label, enteredKg, chosenCode, onChoose }: FlownTableProps) {
  const [count, setCount] = useState(ROWS_AT_FIRST);
  const shown = rows.slice(0, count);
  const accounts = shown.map(({ ascent }) => accountOf(ascent?.figures));
  const { decimals, sums } = closedSums(
    accounts.flatMap((account) => account ?? []),
    0,
  );
  let next = 0;
  const printed = accounts.map((account) => (account ? sums[next++] : undefined));
  return (
    <>
      <TableScroll label={label}>
        <table className="table" data-hover="">
          <Head />
          <tbody>
            {shown.map(({ site, ascent }, i) => {
              const sum = printed[i];
              const payload = ascent?.figures?.payloadKg ?? null;
              const entered = enteredKg.get(site.siteId) ?? null;
              const words = ascent ? stateInWords(ascent) : 'Not read yet.';
              return (
                <tr
                  key={site.siteId}
                  aria-selected={site.code === chosenCode}
                  data-stale={ascent?.figuresAreStale ? '' : undefined}
                >
                  <th scope="row">
                    <SiteHead site={site} onChoose={onChoose} />
                    {words && <span className="sub max-w-72">{words}</span>}
                  </th>
                  <td className="num font-medium" title={payload === null ? undefined : formatFull(payload)}>
                    {payload === null ? '–' : formatNumber(payload)}
                  </td>
                  <td className="num max-phone:hidden">{entered === null ? '–' : formatNumber(entered)}</td>
                  {ACCOUNT_LINES.map((name, line) => (
                    <td key={name} className="num max-tablet:hidden">
                      {sum ? formatNumber(sum.parts[line] ?? 0, decimals) : '–'}
                    </td>
                  ))}
                  <td className="num font-medium">{sum ? formatNumber(sum.total, decimals) : '–'}</td>
                </tr>
              );
            })}
          </tbody>
        </table>
      </TableScroll>
      {rows.length > count && (
        <div className="mt-3 flex items-center gap-4">
          <Button onClick={() => setCount(count + 200)}>Show 200 more sites</Button>
          <span className="caption">
            {formatNumber(count)} of {formatCount(rows.length, 'site')}, largest flown payload first
          </span>
        </div>
      )}
    </>
  );
}
