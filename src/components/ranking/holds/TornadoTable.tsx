import { formatNumber, formatSigned } from '#contract/format.ts';
import type { TornadoOf } from '#contract/sensitivity.ts';
import type { Names } from '#contract/sensitivity-words.ts';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import type { Sheet } from '../columns.ts';

const MOST = 200;

interface TornadoTableProps {
  tornado: TornadoOf;
  names: Names;
  sheet: Sheet;
}

/** Every uncertain figure with the margin at either end, those that move nothing too. */
export function TornadoTable({ tornado: { bars }, names, sheet }: TornadoTableProps) {
  const columns = new Map(sheet.columns.map((column) => [column.criterion.id, column]));
  return (
    <TableScroll label="Margin with each uncertain figure at its low and high">
      <table className="table" data-dense="">
        <thead>
          <tr>
            <th scope="col">Figure</th>
            <th scope="col" className="num">
              Low
            </th>
            <th scope="col" className="num">
              Likely
            </th>
            <th scope="col" className="num">
              High
            </th>
            <th scope="col" className="num">
              Margin at low
            </th>
            <th scope="col" className="num">
              Margin at high
            </th>
            <th scope="col">Lead</th>
          </tr>
        </thead>
        <tbody>
          {bars.slice(0, MOST).map(({ siteId, criterionId, low, likely, high, atLow, atHigh }) => {
            const column = columns.get(criterionId);
            const figure = (value: number): string => formatNumber(value, column?.decimals ?? 0);
            return (
              <tr key={`${siteId} ${criterionId}`}>
                <th scope="row">
                  {names.criterion(criterionId)}
                  {column?.criterion.unit && <span className="rk-unit"> {column.criterion.unit}</span>}
                  <span className="sub">{names.site(siteId)}</span>
                </th>
                <td className="num">{figure(low)}</td>
                <td className="num">{figure(likely)}</td>
                <td className="num">{figure(high)}</td>
                <td className="num">{formatSigned(atLow, sheet.decimals)}</td>
                <td className="num">{formatSigned(atHigh, sheet.decimals)}</td>
                <td>{standing(Math.min(atLow, atHigh))}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
      {bars.length > MOST && (
        <p className="caption pt-2">
          The widest {formatNumber(MOST)} of {formatNumber(bars.length)} figures.
        </p>
      )}
    </TableScroll>
  );
}

function standing(least: number): string {
  if (least < 0) return 'lost';
  return least === 0 ? 'shared' : 'kept';
}
