import type { ColDef } from 'ag-grid-community';
import { formatFull } from '#contract/format.ts';
import { isEntered } from '#components/figures/figure.ts';
import type { Criterion } from '#contract/criterion.ts';
import {
  DrawnColumnHead,
  DrawnFigure,
  DrawnOverall,
  DrawnOverallHead,
  DrawnRank,
  DrawnSite,
  FigureCellEditor,
} from './grid-cells.tsx';
import { compareFigures, figureAt, rowOfLine, type GridLine } from './grid-rows.ts';

/** The printed value beside the bar, with its padding. */
const VALUE_WIDTH = 98;

const placeOf = (line: GridLine | undefined): number | undefined =>
  line?.kind === 'site' ? line.place : undefined;

const totalOf = (line: GridLine | undefined): number | undefined =>
  line?.kind === 'site' && line.listed.kind !== 'set-aside'
    ? line.model.table.totals[line.listed.site]
    : undefined;

/** What holds for every column. A line that changes is drawn again whole: its words depend on more than its number. */
export const defaultColumn: ColDef<GridLine> = {
  sortable: true,
  resizable: false,
  suppressMovable: true,
  autoHeaderHeight: true,
  suppressHeaderMenuButton: true,
  suppressHeaderFilterButton: true,
  equals: () => false,
};

/** Rank, site and overall value: they can neither be hidden nor moved. */
export function fixedColumns(barWidth: number): ColDef<GridLine>[] {
  return [
    {
      colId: 'rank',
      headerName: 'Rank',
      width: 72,
      pinned: 'left',
      valueGetter: ({ data }) => placeOf(data),
      comparator: compareFigures,
      cellRenderer: DrawnRank,
      cellClass: 'rk-cell-rank',
    },
    {
      colId: 'site',
      headerName: 'Candidate site',
      width: 208,
      pinned: 'left',
      resizable: true,
      filter: 'agTextColumnFilter',
      valueGetter: ({ data }) => {
        const row = rowOfLine(data);
        return row && `${row.name} ${row.code}`;
      },
      cellRenderer: DrawnSite,
    },
    {
      colId: 'overall',
      headerName: 'Overall value',
      width: barWidth + VALUE_WIDTH,
      valueGetter: ({ data }) => totalOf(data),
      comparator: compareFigures,
      filter: 'agNumberColumnFilter',
      headerComponentParams: { innerHeaderComponent: DrawnOverallHead },
      cellRenderer: DrawnOverall,
      cellClass: 'rk-cell-overall',
    },
  ];
}

/**
 * A criterion's figures with their values under them.
 * @param typed whether this person may type figures here
 */
export function criterionColumn(
  criterion: Pick<Criterion, 'id' | 'name' | 'source'>,
  place: number,
  typed: boolean,
): ColDef<GridLine> {
  const { id, name } = criterion;
  return {
    editable: ({ data }) => typed && isEntered(criterion) && data?.kind === 'site',
    cellEditor: FigureCellEditor,
    cellEditorPopup: true,
    // The editor writes by itself; the grid's lines come back with what was saved.
    valueSetter: () => false,
    suppressKeyboardEvent: ({ event, editing }) => editing || (event.key === 'Enter' && event.shiftKey),
    colId: id,
    headerName: name,
    width: 104,
    minWidth: 96,
    flex: 1,
    type: 'rightAligned',
    filter: 'agNumberColumnFilter',
    valueGetter: ({ data }) => figureAt(data, place),
    valueFormatter: ({ value }) => (typeof value === 'number' ? formatFull(value) : ''),
    comparator: compareFigures,
    headerComponentParams: { innerHeaderComponent: DrawnColumnHead },
    cellRenderer: DrawnFigure,
    cellClass: 'rk-cell-figure',
  };
}
