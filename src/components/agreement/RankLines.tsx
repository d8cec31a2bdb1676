import { Chart } from '#components/ui/chart.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import type { MembersAgreement } from '#contract/agreement-model.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { RankingModel } from '#contract/ranking-model.ts';
import type { Agreement } from '#core/decision/agreement.ts';
import { agreementInWords, rankInFigures } from './words.ts';

interface LinesProps {
  members: MembersAgreement;
  agreement: Agreement;
  model: RankingModel;
}

const MOST_LINES = 12;
const ROW = 28;
const TOP = 34;
const NAMES = 150;
const STEP = 150;

/** Each site's rank from member to member: the flatter the lines, the more they agree. */
export function RankLines({ members, agreement, model }: LinesProps) {
  const { judges } = members;
  const { sites, ranks } = agreement;
  const sumOf = (place: number): number => ranks.reduce((sum, row) => sum + (row[place] ?? 0), 0);
  const drawn = sites
    .map((site, place) => ({ site, place, sum: sumOf(place) }))
    .sort((a, b) => a.sum - b.sum)
    .slice(0, MOST_LINES);
  // Sites left out may stand between those drawn: ranks among the drawn keep the picture small.
  const rows = ranks.map((row) => ranksAmong(drawn.map(({ place }) => row[place] ?? 0)));
  const leader = model.rows[0]?.kind === 'ranked' ? model.rows[0].site : null;
  const x = (judge: number): number => NAMES + judge * STEP;
  const y = (rank: number): number => TOP + (rank - 1) * ROW;
  const nameOf = (site: number): string => model.figures.sites[site]?.name ?? '';
  const last = judges.length - 1;
  return (
    <Panel
      title="How ranks move from member to member"
      caption={
        drawn.length < sites.length
          ? `The ${formatNumber(drawn.length)} sites that all together rank first, of ${formatCount(sites.length, 'site')}; ranks as each member gives them.`
          : 'Ranks among the sites that every member ranks.'
      }
    >
      <Chart
        label={`Ranks of ${formatCount(drawn.length, 'site')} by ${formatCount(judges.length, 'member')}. ${agreementInWords(members)}`}
        width={x(last) + NAMES}
        height={y(drawn.length) + 24}
      >
        {judges.map(({ userId, name }, judge) => (
          <text key={userId} className="label-2" x={x(judge)} y="12" textAnchor="middle">
            {name}
          </text>
        ))}
        {drawn.map(({ site, place }, line) => {
          const leads = site === leader;
          const at = rows.map((row, judge) => [x(judge), y(row[line] ?? 1)] as const);
          return (
            <g key={site}>
              <path className={leads ? 'signal-line ag-leads' : 'line-2'} fill="none" d={curve(at)} />
              {at.map(([cx, cy], judge) => (
                <g key={judges[judge]?.userId}>
                  <circle className={leads ? 'fill-signal' : 'ag-circle'} cx={cx} cy={cy} r="11" />
                  <text
                    className={leads ? 'tick ag-on-signal' : 'tick'}
                    x={cx}
                    y={cy + 4}
                    textAnchor="middle"
                  >
                    {rankInFigures(ranks[judge]?.[place] ?? 0)}
                  </text>
                </g>
              ))}
              <text
                className={leads ? 'signal-text' : undefined}
                x={NAMES - 18}
                y={(at[0]?.[1] ?? 0) + 4}
                textAnchor="end"
              >
                {nameOf(site)}
              </text>
              <text
                className={leads ? 'signal-text' : undefined}
                x={x(last) + 18}
                y={(at[last]?.[1] ?? 0) + 4}
              >
                {nameOf(site)}
              </text>
            </g>
          );
        })}
      </Chart>
    </Panel>
  );
}

/** 1, 2, 3… by figure; equal ones one after the other, so that no two circles lie on each other. */
function ranksAmong(figures: readonly number[]): number[] {
  const order = figures.map((_, place) => place).sort((a, b) => (figures[a] ?? 0) - (figures[b] ?? 0));
  const ranks: number[] = [];
  order.forEach((place, rank) => {
    ranks[place] = rank + 1;
  });
  return ranks;
}

const curve = (points: readonly (readonly [number, number])[]): string =>
  points
    .map(([x, y], at) => {
      const before = points[at - 1];
      if (!before) return `M${x} ${y}`;
      const bend = (before[0] + x) / 2;
      return `C${bend} ${before[1]} ${bend} ${y} ${x} ${y}`;
    })
    .join('');
