import {
  CellStyleModule,
  ClientSideRowModelApiModule,
  ClientSideRowModelModule,
  ColumnApiModule,
  CustomEditorModule,
  EventApiModule,
  ModuleRegistry,
  NumberFilterModule,
  RowApiModule,
  RowSelectionModule,
  RowStyleModule,
  ScrollApiModule,
  TextFilterModule,
  type GridApi,
  type GridOptions,
  type IRowNode,
} from 'ag-grid-community';
import { AgGridReact } from 'ag-grid-react';
import { useEffect, useMemo, useRef, useState } from 'react';
import { isEntered } from '#components/figures/figure.ts';
import type { FigureDesk } from '#components/figures/use-figure-desk.tsx';
import type { RankingModel } from '#contract/ranking-model.ts';
import type { Sheet } from './columns.ts';
import { BAND_HEIGHT, DrawnBand, FigureDeskContext, GridSheetContext, ROW_HEIGHT } from './grid-cells.tsx';
import { criterionColumn, defaultColumn, fixedColumns } from './grid-columns.ts';
import { gridLines, keepGroups, type GridLine } from './grid-rows.ts';
import { gridTheme } from './grid-theme.ts';
import { applyGridView, gridViewOf, type GridView } from './grid-view.ts';

ModuleRegistry.registerModules([
  CellStyleModule,
  ClientSideRowModelApiModule,
  ClientSideRowModelModule,
  ColumnApiModule,
  CustomEditorModule,
  EventApiModule,
  NumberFilterModule,
  RowApiModule,
  RowSelectionModule,
  RowStyleModule,
  ScrollApiModule,
  TextFilterModule,
]);

interface RankingGridProps {
  model: RankingModel;
  sheet: Sheet;
  nonce: string;
  barWidth: number;
  /** Ids of criteria whose columns are hidden. */
  hidden: ReadonlySet<string>;
  filtersShown: boolean;
  view: GridView;
  onView: (view: GridView) => void;
  /** Id of the site chosen. */
  chosen: string | null;
  onChoose: (siteId: string | null) => void;
  /** Told how to ask for the sites in sight, in their order; null when the grid goes. */
  onShown: (ask: (() => string[]) | null) => void;
  desk: FigureDesk;
}

/** Up to here every row is drawn and the page scrolls; beyond, the grid scrolls and draws what is in sight. */
const MOST_DRAWN = 40;

const isBand = (node: IRowNode<GridLine>): boolean => node.data?.kind === 'band';
const kindIs =
  (kind: string) =>
  ({ data }: { data: GridLine | undefined }): boolean =>
    data?.kind === 'site' && data.listed.kind === kind;
const rowClasses = {
  'rk-row-lead': ({ data }: { data: GridLine | undefined }) =>
    data?.kind === 'site' && data.listed.kind === 'ranked' && data.listed.rank === 1,
  'rk-row-incomplete': kindIs('incomplete'),
  'rk-row-aside': kindIs('set-aside'),
};

/** Given as the same objects every time, so that a new model alone makes the grid sort and draw. */
const STEADY: GridOptions<GridLine> = {
  getRowId: ({ data }) => data.id,
  getRowHeight: ({ data }) => (data?.kind === 'band' ? BAND_HEIGHT : ROW_HEIGHT),
  isFullWidthRow: ({ rowNode }) => isBand(rowNode as IRowNode<GridLine>),
  postSortRows: ({ nodes }) => keepGroups(nodes),
  rowSelection: {
    mode: 'singleRow',
    checkboxes: false,
    enableClickSelection: true,
    isRowSelectable: (node) => !isBand(node),
  },
};

export default function RankingGrid(props: RankingGridProps) {
  const { model, sheet, barWidth, hidden, filtersShown, chosen, onChoose, onView, onShown, desk } = props;
  const typed = desk.locked === undefined;
  const [api, setApi] = useState<GridApi<GridLine> | null>(null);
  const [asideShown, setAsideShown] = useState(true);
  const lines = useMemo(() => gridLines(model, asideShown), [model, asideShown]);
  const tall = lines.length > MOST_DRAWN;
  const drawing = useMemo(() => ({ sheet, barWidth }), [sheet, barWidth]);
  const { criteria } = model.figures;
  const columns = useMemo(
    () => [
      ...fixedColumns(barWidth),
      ...criteria.map((criterion, place) => ({
        ...criterionColumn(criterion, place, typed),
        hide: hidden.has(criterion.id),
      })),
    ],
    [barWidth, criteria, hidden, typed],
  );
  const defaults = useMemo(() => ({ ...defaultColumn, floatingFilter: filtersShown }), [filtersShown]);
  useChosenRow(api, chosen, lines);
  const firstView = useRef(props.view);

  const start = (ready: GridApi<GridLine>): void => {
    setApi(ready);
    applyGridView(ready, firstView.current);
    onShown(() => siteIdsIn(ready));
  };
  const tellView = (ready: GridApi<GridLine>): void => onView(gridViewOf(ready));
  const takeFilter = (ready: GridApi<GridLine>): void => {
    setAsideShown(showsAside(ready));
    tellView(ready);
  };
  return (
    <FigureDeskContext value={desk}>
      <GridSheetContext value={drawing}>
        <div className={tall ? 'rk-grid rk-grid-tall' : 'rk-grid'}>
          <AgGridReact<GridLine>
            theme={gridTheme}
            styleNonce={props.nonce}
            rowData={lines}
            columnDefs={columns}
            defaultColDef={defaults}
            {...STEADY}
            domLayout={tall ? 'normal' : 'autoHeight'}
            suppressRowVirtualisation={!tall}
            suppressColumnVirtualisation={!tall}
            headerHeight={HEADER_HEIGHT}
            floatingFiltersHeight={FILTER_HEIGHT}
            fullWidthCellRenderer={DrawnBand}
            alwaysPassFilter={isBand}
            rowClassRules={rowClasses}
            animateRows={!matchMedia('(prefers-reduced-motion: reduce)').matches}
            ensureDomOrder
            suppressCellFocus={false}
            onGridReady={(event) => start(event.api)}
            onGridPreDestroyed={() => onShown(null)}
            onFilterChanged={(event) => takeFilter(event.api)}
            onSortChanged={(event) => tellView(event.api)}
            onSelectionChanged={(event) => {
              if (event.source === 'rowClicked' || event.source === 'spaceKey')
                onChoose(event.api.getSelectedNodes()[0]?.id ?? null);
            }}
            onCellKeyDown={(pressed) => {
              const { event, node } = pressed;
              if (!(event instanceof KeyboardEvent) || event.key !== 'Enter' || node.data?.kind !== 'site')
                return;
              const columnId = 'column' in pressed ? pressed.column.getColId() : '';
              const figure = criteria.find(({ id }) => id === columnId);
              if (!figure) onChoose(node.data.id);
              else if (event.shiftKey || !typed || !isEntered(figure)) desk.onOpen(node.data.id, figure.id);
            }}
            onCellDoubleClicked={({ node, column }) => {
              const figure = criteria.find(({ id }) => id === column.getColId());
              if (figure && node.data?.kind === 'site' && !(typed && isEntered(figure)))
                desk.onOpen(node.data.id, figure.id);
            }}
          />
        </div>
      </GridSheetContext>
    </FigureDeskContext>
  );
}

const HEADER_HEIGHT = 116;
const FILTER_HEIGHT = 42;

/** Brings the row chosen elsewhere (by n and p, by the address) to the grid. */
function useChosenRow(
  api: GridApi<GridLine> | null,
  chosen: string | null,
  lines: readonly GridLine[],
): void {
  useEffect(() => {
    if (!api) return;
    if (chosen === null) {
      api.deselectAll('all', 'api');
      return;
    }
    const node = api.getRowNode(chosen);
    if (!node) return;
    node.setSelected(true, true, 'api');
    api.ensureNodeVisible(node);
  }, [api, chosen, lines]);
}

/** Whether any set-aside site passes the filters: without one its band would stand over nothing. */
function showsAside(api: GridApi<GridLine>): boolean {
  let shows = false;
  api.forEachNodeAfterFilter(({ data }) => {
    shows ||= data?.kind === 'site' && data.listed.kind === 'set-aside';
  });
  return shows;
}

function siteIdsIn(api: GridApi<GridLine>): string[] {
  const ids: string[] = [];
  api.forEachNodeAfterFilterAndSort(({ data }) => {
    if (data?.kind === 'site') ids.push(data.id);
  });
  return ids;
}
