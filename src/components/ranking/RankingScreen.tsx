import { useCallback, useMemo, useRef } from 'react';
import { useAddressParam } from '#components/live/address.ts';
import { useFinding } from '#components/live/hooks.ts';
import { Button } from '#components/ui/Button.tsx';
import { ChartPatterns } from '#components/ui/chart.tsx';
import { Finding } from '#components/ui/Finding.tsx';
import { Segmented } from '#components/ui/Segmented.tsx';
import { Stale } from '#components/ui/States.tsx';
import { evenStatement } from '#components/weights/statement.ts';
import { countsInWords, findingText, rankingFinding, rankingWhy } from '#contract/ranking-words.ts';
import type { RankingStart, RankingState } from '#contract/ranking.ts';
import { sheetOf } from './columns.ts';
import { exportLabel, rankingCsv, saveCsv } from './export.ts';
import { fileNameOf } from './file-name.ts';
import { BeforeRanks, ConnectionNote, EstimatesCaution, FiguresNotRead } from './Notices.tsx';
import { RankingSheets, type RankingAddress } from './RankingSheets.tsx';
import { RankingViews } from './RankingViews.tsx';
import { useRanking, type LiveRanking } from './use-ranking.ts';
import { PATTERNS } from './ValueBar.tsx';
import { lockOf, type Viewer } from './viewer.ts';

interface RankingScreenProps {
  studyId: string;
  title: string;
  start: RankingStart;
  viewer: Viewer;
  address: RankingAddress;
  nonce: string;
}

export function RankingScreen({ studyId, title, start, viewer, address, nonce }: RankingScreenProps) {
  const [whoseParam, setWhose] = useAddressParam('weights', address.weights);
  const [view, setView] = useAddressParam('view', address.view);
  const whose = whoseParam === 'mine' ? 'mine' : 'study';
  const live = useRanking(studyId, start, whose);
  const shown = useRef<(() => string[]) | null>(null);
  const onShown = useCallback((ask: (() => string[]) | null) => {
    shown.current = ask;
  }, []);
  const { ranking, model, weights, staleRevision, error } = live;
  const sheet = useMemo(() => sheetOf(ranking, model), [ranking, model]);
  const locked = lockOf(viewer, whose);
  useFinding(findingText(ranking));
  const exportFile = (): void => {
    if (!model) return;
    const all = model.rows.map(({ site }) => model.figures.sites[site]?.siteId ?? '');
    saveCsv(`${fileNameOf(title)} ranking.csv`, rankingCsv(model, shown.current?.() ?? all));
  };
  const even = (): void => weights.state(evenStatement(ranking.criteria));
  const onEven = locked === undefined ? even : undefined;
  const beforeRanks = (state: Exclude<RankingState, 'ranked'>) => (
    <BeforeRanks state={state} studyId={studyId} onEven={onEven} />
  );
  const bar = (
    <>
      <Segmented
        legend="Weights"
        value={whose}
        onChange={(value) => setWhose(value === 'mine' ? 'mine' : null)}
        segments={[
          { value: 'study', name: 'Study’s weights' },
          {
            value: 'mine',
            name: 'Mine',
            notYet: viewer.role === 'reader' ? 'A reader keeps no weights of their own.' : undefined,
          },
        ]}
      />
      {staleRevision !== null && <Stale revision={staleRevision} />}
      <ConnectionNote />
      <span className="rk-bar-rest">{ranking.state === 'ranked' && countsInWords(ranking.counts)}</span>
    </>
  );
  return (
    <>
      <svg className="rk-patterns" width="0" height="0" aria-hidden="true">
        <ChartPatterns id={PATTERNS} />
      </svg>
      <RankingHead live={live} onExport={model?.rows.length ? exportFile : undefined} />
      {error && <FiguresNotRead error={error} onAgain={live.again} />}
      {ranking.state !== 'no-sites' && ranking.criteria.length > 0 ? (
        <RankingViews
          {...{ studyId, title, live, sheet, whose, viewer, onEven, bar }}
          param={view}
          onView={setView}
        >
          {ranking.state !== 'ranked' && beforeRanks(ranking.state)}
          <RankingSheets {...{ studyId, live, sheet, address, nonce, locked, viewer, shown, onShown, bar }} />
        </RankingViews>
      ) : (
        <>
          {ranking.state !== 'ranked' && beforeRanks(ranking.state)}
          <div className="rk-bar">{bar}</div>
        </>
      )}
      <div className="mt-9">
        <EstimatesCaution />
      </div>
    </>
  );
}

function RankingHead({ live, onExport }: { live: LiveRanking; onExport: (() => void) | undefined }) {
  const { leads, rest } = rankingFinding(live.ranking);
  const why = rankingWhy(live.ranking);
  return (
    <>
      <Finding
        why={why && <p>{why}</p>}
        actions={
          <Button
            icon="export"
            notYet={onExport ? undefined : 'There is nothing to export yet.'}
            onClick={onExport}
          >
            {live.model ? exportLabel(live.model.rows.length) : 'Export as CSV'}
          </Button>
        }
      >
        {leads !== null && <em>{leads}</em>}
        {rest}
      </Finding>
      <p className="sr-only" role="status">
        {leads}
        {rest}
      </p>
    </>
  );
}
