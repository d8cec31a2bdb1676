import { formatNumber } from '#contract/format.ts';
import { rowsOf, type RankingRow } from '#contract/ranking-rows.ts';
import { failsAt, isLeading, OverallCell, RankCell, SetAsideBand, SiteCell } from './cells.tsx';
import { ColumnHead, OverallHead } from './ColumnHead.tsx';
import type { Sheet } from './columns.ts';
import { FigureCell } from './FigureCell.tsx';

const BAR_WIDTH = 286;
const ROW = 54;
const FIRST_ROW = 68;

/** The ranking as plain HTML: what the page draws, and what stays until the grid is there. */
export function RankingTable({ sheet, chosen }: { sheet: Sheet; chosen: string | null }) {
  const rows = rowsOf(sheet.ranking);
  const { ranked, incomplete, setAside } = sheet.ranking.counts;
  const total = ranked + incomplete + setAside;
  return (
    // Focusable, because it scrolls sideways where it is wider than its place.
    <div className="table-scroll" role="region" aria-label="Ranking" tabIndex={0}>
      <table className="rk-table table">
        <thead>
          <tr>
            <th scope="col">Rank</th>
            <th scope="col">Candidate site</th>
            <th scope="col">
              <OverallHead width={BAR_WIDTH} />
            </th>
            {sheet.columns.map((column) => (
              <th key={column.criterion.id} scope="col" className="num">
                <ColumnHead column={column} />
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row, index) => [
            row.kind === 'set-aside' && rows[index - 1]?.kind !== 'set-aside' && (
              <tr key="band" className="band">
                <td colSpan={sheet.columns.length + 3}>
                  <SetAsideBand />
                </td>
              </tr>
            ),
            <TableRow
              key={row.siteId}
              row={row}
              sheet={sheet}
              first={index === 0}
              chosen={row.code === chosen}
            />,
          ])}
        </tbody>
      </table>
      {rows.length < total && (
        <p className="caption py-2">
          First {formatNumber(rows.length)} of {formatNumber(total)} sites; the others follow in a moment.
        </p>
      )}
    </div>
  );
}

interface TableRowProps {
  row: RankingRow;
  sheet: Sheet;
  first: boolean;
  chosen: boolean;
}

function TableRow({ row, sheet, first, chosen }: TableRowProps) {
  return (
    <tr
      data-lead={isLeading(row) ? '' : undefined}
      data-set-aside={row.kind === 'set-aside' ? '' : undefined}
      data-incomplete={row.kind === 'incomplete' ? '' : undefined}
      data-chosen={chosen ? '' : undefined}
    >
      <td>
        <RankCell row={row} />
      </td>
      <th scope="row">
        <SiteCell row={row} sheet={sheet} />
      </th>
      <td className="rk-overall-cell">
        <OverallCell
          row={row}
          sheet={sheet}
          width={BAR_WIDTH}
          height={first ? FIRST_ROW : ROW}
          lettered={first}
        />
      </td>
      {sheet.columns.map(({ criterion, place, decimals }) => {
        const contribution = row.contributions[place];
        return (
          <td key={criterion.id} className="num">
            {contribution && (
              <FigureCell
                contribution={contribution}
                decimals={decimals}
                fails={failsAt(row, criterion.id)}
              />
            )}
          </td>
        );
      })}
    </tr>
  );
}
