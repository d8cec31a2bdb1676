import { lazy, Suspense, useDeferredValue, useMemo, useState, type ReactNode, type RefObject } from 'react';
import { useAddressParam } from '#components/live/address.ts';
import { useStep } from '#components/live/hooks.ts';
import { figureLockOf } from '#components/figures/lock.ts';
import { useFigureDesk } from '#components/figures/use-figure-desk.tsx';
import { Button } from '#components/ui/Button.tsx';
import { formatNumber } from '#contract/format.ts';
import { rowOf, rowsOf, type RankingRow } from '#contract/ranking-rows.ts';
import { ColumnChooser } from './ColumnChooser.tsx';
import type { Sheet } from './columns.ts';
import { Contributions } from './Contributions.tsx';
import { RankingList } from './RankingList.tsx';
import { RankingTable } from './RankingTable.tsx';
import type { LiveRanking } from './use-ranking.ts';
import type { Viewer } from './viewer.ts';
import { useBarWidth, useGridFits } from './use-wide.ts';
import { WeightPanel } from './WeightPanel.tsx';

const RankingGrid = lazy(() => import('./RankingGrid.tsx'));

/** What of the screen the address holds. */
export interface RankingAddress {
  view: string | null;
  weights: string | null;
  site: string | null;
  hide: string | null;
  sort: string | null;
  filter: string | null;
}

interface SheetsProps {
  studyId: string;
  live: LiveRanking;
  sheet: Sheet;
  address: RankingAddress;
  nonce: string;
  locked: string | undefined;
  viewer: Viewer;
  /** Asks the grid for the sites in sight; null without one. */
  shown: RefObject<(() => string[]) | null>;
  onShown: (ask: (() => string[]) | null) => void;
  /** What stands at the left of the columns and filter buttons. */
  bar: ReactNode;
}

const LIST_STEP = 50;

/** The ranking itself, as grid, table or list, with the weights and the chosen site's terms under it. */
export function RankingSheets(props: SheetsProps) {
  const { studyId, live, sheet, address, nonce, locked, shown, onShown, bar } = props;
  const { ranking, weights } = live;
  const { desk, sheet: figureSheet } = useFigureDesk(studyId, live, figureLockOf(props.viewer));
  // The sliders must not wait for a long grid: it follows a moment later.
  const model = useDeferredValue(live.model);
  const [code, setCode] = useAddressParam('site', address.site);
  const [hide, setHide] = useAddressParam('hide', address.hide);
  const [sort, setSort] = useAddressParam('sort', address.sort);
  const [filter, setFilter] = useAddressParam('filter', address.filter);
  const [filtersShown, setFiltersShown] = useState(address.filter !== null);
  const [listed, setListed] = useState(LIST_STEP);
  const hidden = useMemo(() => new Set(hide ? hide.split(',') : []), [hide]);
  const gridFits = useGridFits();
  const barWidth = useBarWidth();

  const sites = model?.figures.sites ?? [];
  const chosenId = sites.find((site) => site.code === code)?.siteId ?? null;
  const choose = (siteId: string | null): void =>
    setCode(sites.find((site) => site.siteId === siteId)?.code ?? null);
  useStep((step) => {
    const order = shown.current?.() ?? model?.rows.map(({ site }) => sites[site]?.siteId ?? '') ?? [];
    if (order.length === 0) return;
    const here = chosenId === null ? (step > 0 ? -1 : 0) : order.indexOf(chosenId);
    choose(order[(here + step + order.length) % order.length] ?? null);
  });

  const plain = rowsOf(ranking);
  const total = model?.rows.length ?? plain.length;
  const listRows = model ? model.rows.slice(0, listed).map((row) => rowOf(model, row)) : plain;
  const inView = detailRow(live, plain, code);
  return (
    <>
      <div className="rk-bar">
        {bar}
        <div className="rk-tools">
          <ColumnChooser
            columns={sheet.columns}
            hidden={hidden}
            onHide={(next) => setHide(next.size > 0 ? [...next].join(',') : null)}
          />
          <Button
            size="small"
            icon="filter"
            aria-pressed={filtersShown}
            onClick={() => setFiltersShown(!filtersShown)}
          >
            {filter ? 'Filter, in use' : 'Filter'}
          </Button>
        </div>
      </div>
      <div className="rk-desk">
        {gridFits && model && plain.length > 0 ? (
          <Suspense fallback={<RankingTable sheet={sheet} chosen={code} />}>
            <RankingGrid
              model={model}
              sheet={sheet}
              nonce={nonce}
              barWidth={barWidth}
              hidden={hidden}
              filtersShown={filtersShown}
              view={{ sort, filter }}
              onView={(view) => {
                setSort(view.sort);
                setFilter(view.filter);
              }}
              chosen={chosenId}
              onChoose={choose}
              onShown={onShown}
              desk={desk}
            />
          </Suspense>
        ) : (
          <RankingTable sheet={sheet} chosen={code} />
        )}
        {gridFits && model && (
          <p className="caption rk-keys">
            {desk.locked === undefined
              ? 'Enter or a double click on an entered figure types it: 300, or low / likely / high. '
              : ''}
            Shift Enter opens a figure’s source and evidence.
          </p>
        )}
      </div>
      <div className="rk-phone">
        <RankingList sheet={sheet} rows={listRows} chosen={code} />
        {listRows.length < total && (
          <Button onClick={() => setListed(listed + LIST_STEP)}>
            Show {formatNumber(Math.min(LIST_STEP, total - listRows.length))} more of {formatNumber(total)}{' '}
            sites
          </Button>
        )}
      </div>
      <div className="rk-panels">
        <WeightPanel studyId={studyId} columns={sheet.columns} set={weights} locked={locked} />
        {inView && <Contributions row={inView} sheet={sheet} studyId={studyId} />}
      </div>
      {figureSheet}
    </>
  );
}

/** The site chosen, or the first one listed. */
function detailRow(
  { model }: LiveRanking,
  plain: readonly RankingRow[],
  code: string | null,
): RankingRow | undefined {
  const drawn = plain.find((row) => row.code === code);
  if (drawn || code === null || !model) return drawn ?? plain[0];
  const listed = model.rows.find(({ site }) => model.figures.sites[site]?.code === code);
  return listed ? rowOf(model, listed) : plain[0];
}
