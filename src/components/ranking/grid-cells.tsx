import type { CustomInnerHeaderProps, CustomCellRendererProps } from 'ag-grid-react';
import { createContext, useContext } from 'react';
import { failsAt, OverallCell, RankCell, SetAsideBand, SiteCell } from './cells.tsx';
import { ColumnHead, OverallHead } from './ColumnHead.tsx';
import type { Sheet } from './columns.ts';
import { FigureCell } from './FigureCell.tsx';
import { rowOfLine, type GridLine } from './grid-rows.ts';

export const ROW_HEIGHT = 54;
export const BAND_HEIGHT = 36;

/** What cells and headings draw by; it reaches into the grid, so that column definitions stay as weights move. */
export interface GridSheet {
  sheet: Sheet;
  barWidth: number;
}
export const GridSheetContext = createContext<GridSheet | null>(null);

type Cell = CustomCellRendererProps<GridLine>;

export function DrawnRank({ data }: Cell) {
  const row = rowOfLine(data);
  return row && <RankCell row={row} />;
}

export function DrawnSite({ data }: Cell) {
  const drawing = useContext(GridSheetContext);
  const row = rowOfLine(data);
  return row && drawing && <SiteCell row={row} sheet={drawing.sheet} />;
}

export function DrawnOverall({ data }: Cell) {
  const drawing = useContext(GridSheetContext);
  const row = rowOfLine(data);
  if (!row || !drawing) return null;
  return (
    <OverallCell
      row={row}
      sheet={drawing.sheet}
      width={drawing.barWidth}
      height={ROW_HEIGHT - 2}
      lettered={data?.kind === 'site' && data.place === 0}
    />
  );
}

export function DrawnFigure({ data, column: gridColumn }: Cell) {
  const drawing = useContext(GridSheetContext);
  const row = rowOfLine(data);
  const column = drawing?.sheet.columns.find(({ criterion }) => criterion.id === gridColumn?.getColId());
  const contribution = column && row?.contributions[column.place];
  if (!row || !contribution) return null;
  return (
    <FigureCell
      contribution={contribution}
      decimals={column.decimals}
      fails={failsAt(row, column.criterion.id)}
    />
  );
}

export const DrawnBand = () => (
  <div className="rk-band" role="gridcell" tabIndex={-1}>
    <SetAsideBand />
  </div>
);

export function DrawnOverallHead() {
  const drawing = useContext(GridSheetContext);
  return drawing && <OverallHead width={drawing.barWidth} />;
}

export function DrawnColumnHead({ column: gridColumn }: CustomInnerHeaderProps) {
  const drawing = useContext(GridSheetContext);
  const column = drawing?.sheet.columns.find(({ criterion }) => criterion.id === gridColumn.getColId());
  return column && <ColumnHead column={column} />;
}
