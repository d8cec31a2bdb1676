import { Reasons } from '#components/ranking/cells.tsx';
import type { Sheet } from '#components/ranking/columns.ts';
import { ValueBar } from '#components/ranking/ValueBar.tsx';
import { ButtonLink } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { formatCount, formatNumber } from '#contract/format.ts';
import { countsInWords, findingText, rankRange } from '#contract/ranking-words.ts';
import { rowsOf, type RankingRow } from '#contract/ranking-rows.ts';
import type { Ranking } from '#contract/ranking.ts';

const SHOWN = 12;
const BAR_WIDTH = 150;
const BAR_HEIGHT = 30;

interface EffectProps {
  studyId: string;
  sheet: Sheet;
  /** The ranking as it stood when the screen was opened. */
  before: Ranking;
}

/** What criteria and weights do to the ranking, and how far each site has moved since the screen was opened. */
export function Effect({ studyId, sheet, before }: EffectProps) {
  const { ranking } = sheet;
  const rows = rowsOf(ranking).slice(0, SHOWN);
  const total = ranking.counts.ranked + ranking.counts.incomplete + ranking.counts.setAside;
  const earlier = new Map(before.ranked.map(({ siteId, rank }) => [siteId, rank]));
  return (
    <Panel title="Effect on the ranking" caption={<span role="status">{findingText(ranking)}</span>}>
      {ranking.state === 'ranked' && (
        <div className="table-scroll" role="region" aria-label="Effect on the ranking" tabIndex={0}>
          <table className="table" data-dense="">
            <thead>
              <tr>
                <th scope="col">Rank</th>
                <th scope="col">Candidate site</th>
                <th scope="col">
                  Overall value<span className="unit">0 to 1</span>
                </th>
              </tr>
            </thead>
            <tbody>
              {rows.map((row, index) => (
                <EffectRow
                  key={row.siteId}
                  row={row}
                  sheet={sheet}
                  earlier={earlier.get(row.siteId)}
                  lettered={index === 0}
                />
              ))}
            </tbody>
          </table>
        </div>
      )}
      <p className="caption pt-2">
        {countsInWords(ranking.counts)}
        {rows.length < total && `; first ${formatNumber(rows.length)} of ${formatCount(total, 'site')} shown`}
        .{' '}
        <ButtonLink kind="text" size="small" href={`/studies/${studyId}/ranking`}>
          Open the ranking
        </ButtonLink>
      </p>
    </Panel>
  );
}

interface EffectRowProps {
  row: RankingRow;
  sheet: Sheet;
  earlier: number | undefined;
  lettered: boolean;
}

function EffectRow({ row, sheet, earlier, lettered }: EffectRowProps) {
  const leads = row.kind === 'ranked' && row.rank === 1;
  return (
    <tr data-lead={leads ? '' : undefined} data-set-aside={row.kind === 'set-aside' ? '' : undefined}>
      <td className="num lead-figure">{rankOf(row)}</td>
      <th scope="row">
        {row.name}
        <span className="sub">
          {leads && <b className="lead-word">Leads </b>}
          {row.kind === 'ranked' && moved(row.rank, earlier)}
          {row.kind === 'incomplete' && `Incomplete, rank could be ${rankRange(row)}`}
        </span>
      </th>
      <td>
        {row.kind === 'set-aside' ? (
          <Reasons reasons={row.reasons} />
        ) : (
          <span className="rk-overall">
            <span className="num lead-figure">{formatNumber(row.value, sheet.decimals)}</span>
            <ValueBar
              contributions={row.contributions}
              names={sheet.names}
              value={row.value}
              bestValue={row.kind === 'incomplete' ? row.bestValue : undefined}
              leaderValue={sheet.leaderValue}
              width={BAR_WIDTH}
              height={lettered ? BAR_HEIGHT + 8 : BAR_HEIGHT}
              lettered={lettered}
              decimals={sheet.decimals}
            />
          </span>
        )}
      </td>
    </tr>
  );
}

function rankOf(row: RankingRow): string {
  if (row.kind === 'ranked') return formatNumber(row.rank);
  return row.kind === 'incomplete' ? rankRange(row).replace(' to ', '–') : '–';
}

/** "up 2", "down 1": against the ranking as it stood when the screen was opened. */
function moved(rank: number, earlier: number | undefined): string {
  if (earlier === undefined || earlier === rank) return '';
  return earlier > rank ? `↑ up ${earlier - rank}` : `↓ down ${rank - earlier}`;
}
