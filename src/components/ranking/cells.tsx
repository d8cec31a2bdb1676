import { formatLatitude, formatLongitude, formatNumber } from '#contract/format.ts';
import { missingInWords, rankRange } from '#contract/ranking-words.ts';
import type { RankingRow } from '#contract/ranking-rows.ts';
import type { RankingSite } from '#contract/ranking.ts';
import { Icon } from '#components/ui/Icon.tsx';
import type { Sheet } from './columns.ts';
import { ValueBar } from './ValueBar.tsx';

export const isLeading = (row: RankingRow): boolean => row.kind === 'ranked' && row.rank === 1;

/** "PV, 4.72° S 37.05° W" */
export const whereabouts = ({ code, latitudeDeg, longitudeDeg }: RankingSite): string =>
  `${code}, ${formatLatitude(latitudeDeg)} ${formatLongitude(longitudeDeg)}`;

export function RankCell({ row }: { row: RankingRow }) {
  if (row.kind === 'ranked') return <span className="rk-rank lead-figure">{formatNumber(row.rank)}</span>;
  if (row.kind === 'incomplete')
    return <span className="rk-rank rk-range">{rankRange(row).replace(' to ', '–')}</span>;
  return (
    <>
      <Icon name="set-aside" />
      <span className="sr-only">set aside</span>
    </>
  );
}

export function SiteCell({ row, sheet }: { row: RankingRow; sheet: Sheet }) {
  return (
    <>
      <span className="name">{row.name}</span>
      <span className="sub">
        {isLeading(row) && (
          <>
            <b className="lead-word">Leads</b>,{' '}
          </>
        )}
        {row.kind === 'incomplete' ? (
          <span title={missingInWords(sheet.ranking, row.missing)}>
            <b>Incomplete</b>, rank could be {rankRange(row)}
          </span>
        ) : (
          whereabouts(row)
        )}
      </span>
    </>
  );
}

interface OverallCellProps {
  row: RankingRow;
  sheet: Sheet;
  width: number;
  height: number;
  lettered?: boolean;
}

/** The overall value with its bar, or why the site has none. */
export function OverallCell({ row, sheet, width, height, lettered = false }: OverallCellProps) {
  if (row.kind === 'set-aside') return <Reasons reasons={row.reasons} />;
  const { decimals, names, leaderValue } = sheet;
  const figure = (value: number): string => formatNumber(value, decimals);
  return (
    <span className="rk-overall">
      {row.kind === 'ranked' ? (
        <span className="rk-total lead-figure" title={String(row.value)}>
          {figure(row.value)}
        </span>
      ) : (
        <span className="rk-total rk-total-range">
          {figure(row.value)}
          <span className="sr-only"> to </span>
          <br />
          {figure(row.bestValue)}
        </span>
      )}
      <ValueBar
        contributions={row.contributions}
        names={names}
        value={row.value}
        bestValue={row.kind === 'incomplete' ? row.bestValue : undefined}
        leaderValue={leaderValue}
        width={width}
        height={height}
        lettered={lettered}
        decimals={decimals}
      />
    </span>
  );
}

export function Reasons({ reasons }: { reasons: readonly { criterionId: string; message: string }[] }) {
  return (
    <span className="rk-reasons">
      {reasons.map(({ criterionId, message }) => (
        <span key={criterionId}>{message}</span>
      ))}
    </span>
  );
}

/** What stands over the sites that are set aside. */
export function SetAsideBand() {
  return (
    <span>
      <b>Set aside: each fails a must-meet limit.</b> They stay listed and keep their figures, but take no
      rank.
    </span>
  );
}

export const failsAt = (row: RankingRow, criterionId: string): boolean =>
  row.kind === 'set-aside' && row.reasons.some((reason) => reason.criterionId === criterionId);
