import { formatNumber } from '#contract/format.ts';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import type { CriterionColumn } from '../columns.ts';
import type { ScatterPoint } from './scatter.ts';

const MOST = 200;

interface ScatterTableProps {
  points: readonly ScatterPoint[];
  across: CriterionColumn;
  up: CriterionColumn;
}

/** The same figures as a table; of a long list the first, the export has them all. */
export function ScatterTable({ points, across, up }: ScatterTableProps) {
  return (
    <TableScroll label={`${across.criterion.name} and ${up.criterion.name}`}>
      <table className="table" data-dense="">
        <thead>
          <tr>
            <th scope="col">Site</th>
            {[across, up].map(({ criterion }, at) => (
              <th key={at} scope="col" className="num">
                {criterion.name}
                <span className="unit">{criterion.unit}</span>
              </th>
            ))}
            <th scope="col">Standing</th>
          </tr>
        </thead>
        <tbody>
          {points.slice(0, MOST).map(({ siteId, name, x, y, standing, onEdge }) => (
            <tr key={siteId}>
              <th scope="row">{name}</th>
              <td className="num">{formatNumber(x, across.decimals)}</td>
              <td className="num">{formatNumber(y, up.decimals)}</td>
              <td>
                {[
                  ...(standing === 'leader' ? ['leads'] : []),
                  ...(onEdge ? ['on the edge'] : []),
                  ...(standing === 'apart' ? ['not ranked'] : []),
                ].join(', ') || '–'}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {points.length > MOST && (
        <p className="caption pt-2">
          First {formatNumber(MOST)} of {formatNumber(points.length)} sites; the CSV export has every figure.
        </p>
      )}
    </TableScroll>
  );
}
