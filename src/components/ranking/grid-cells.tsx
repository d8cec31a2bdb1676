import type { CustomCellEditorProps, CustomCellRendererProps, CustomInnerHeaderProps } from 'ag-grid-react';
import { createContext, useContext } from 'react';
import { FigureEditor } from '#components/figures/FigureEditor.tsx';
import { knownAt } from '#components/figures/known.ts';
import type { FigureDesk } from '#components/figures/use-figure-desk.tsx';
import { failsAt, OverallCell, RankCell, SetAsideBand, SiteCell } from './cells.tsx';
import { ColumnHead, OverallHead } from './ColumnHead.tsx';
import type { Sheet } from './columns.ts';
import { FigureCell } from './FigureCell.tsx';
import { figureAt, rowOfLine, type GridLine } from './grid-rows.ts';

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
      known={data?.kind === 'site' ? knownAt(data.model.figures, data.listed.site, column.place) : undefined}
      step={
        contribution.figure === null
          ? undefined
          : (column.criterion.steps?.[contribution.figure] ?? undefined)
      }
    />
  );
}

export const FigureDeskContext = createContext<FigureDesk | null>(null);

/** The editor of an entered figure, over its cell. */
export function FigureCellEditor({
  data,
  column: gridColumn,
  eventKey,
  stopEditing,
  api,
  node,
}: CustomCellEditorProps<GridLine>) {
  const desk = useContext(FigureDeskContext);
  if (!desk || data.kind !== 'site') return null;
  const { figures } = data.model;
  const place = figures.criteria.findIndex(({ id }) => id === gridColumn.getColId());
  const criterion = figures.criteria[place];
  const site = figures.sites[data.listed.site];
  if (!criterion || !site) return null;
  const known = knownAt(figures, data.listed.site, place)?.particulars ?? {};
  const focusCell = (): void => {
    if (node.rowIndex !== null) api.setFocusedCell(node.rowIndex, gridColumn);
  };
  const leave = (): void => {
    stopEditing();
    // The editor goes in the next frame, and would take the focus with it.
    requestAnimationFrame(focusCell);
  };
  /** A saved figure may move its site to another rank; the keyboard goes with it, unless it is elsewhere by then. */
  const followRow = (): void => {
    const follow = (): void => {
      api.removeEventListener('modelUpdated', follow);
      if (document.activeElement === document.body) focusCell();
    };
    api.addEventListener('modelUpdated', follow);
  };
  return (
    <FigureEditor
      studyId={desk.studyId}
      site={site}
      criterion={criterion}
      shown={{ value: figureAt(data, place) ?? null, known }}
      pressed={eventKey}
      onSaved={(saved, entry) => {
        desk.onSaved(criterion.id, saved, entry);
        leave();
        followRow();
      }}
      onLeave={leave}
      onOpen={() => {
        stopEditing();
        desk.onOpen(site.siteId, criterion.id);
      }}
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
