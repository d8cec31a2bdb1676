import { useMemo, useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import type { MembersAgreement } from '#contract/agreement-model.ts';
import { formatNumber } from '#contract/format.ts';
import type { RankingModel } from '#contract/ranking-model.ts';
import type { Listed } from '#core/decision/listing.ts';
import { nameOf } from './WeightsSideBySide.tsx';

interface RanksProps {
  members: MembersAgreement;
  /** The ranking under the weights chosen; its order is the table's. */
  model: RankingModel;
}

const STEP = 20;

/** Each site's rank by each member's weights, in the order of the ranking on the screen. */
export function RanksSideBySide({ members, model }: RanksProps) {
  const { judges, agreement } = members;
  const [shown, setShown] = useState(STEP);
  const rows = useMemo(() => rowsBySite(model.rows), [model]);
  const byJudge = useMemo(() => judges.map((one) => rowsBySite(one.model.rows)), [judges]);
  // Without weights of its own the screen lists no site; then the first member's order serves.
  const order = model.state === 'ranked' ? model.rows : (judges[0]?.model.rows ?? []);
  const { sites } = model.figures;
  return (
    <Panel
      title="Rankings side by side"
      caption="The rank each member’s weights give; tied sites share a rank."
    >
      <TableScroll label="Members’ rankings side by side">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Candidate site</th>
              {judges.map((one) => (
                <th scope="col" className="num" key={one.userId}>
                  {nameOf(one)}
                </th>
              ))}
              <th scope="col" className="num">
                Here
              </th>
            </tr>
          </thead>
          <tbody>
            {order.slice(0, shown).map(({ site }) => (
              <tr key={sites[site]?.siteId}>
                <th scope="row">
                  {sites[site]?.name}
                  {agreement?.site?.place === site && <span className="sub">furthest apart</span>}
                </th>
                {judges.map((one, judge) => (
                  <td className="num" key={one.userId}>
                    {standing(byJudge[judge]?.get(site))}
                  </td>
                ))}
                <td className="num">{standing(rows.get(site))}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
      {shown < order.length && (
        <div className="mt-3">
          <Button size="small" onClick={() => setShown(shown + 5 * STEP)}>
            Show {formatNumber(Math.min(5 * STEP, order.length - shown))} more of {formatNumber(order.length)}{' '}
            sites
          </Button>
        </div>
      )}
    </Panel>
  );
}

const rowsBySite = (rows: readonly Listed[]): Map<number, Listed> =>
  new Map(rows.map((row) => [row.site, row]));

function standing(row: Listed | undefined): string {
  if (!row) return '–';
  if (row.kind === 'ranked') return formatNumber(row.rank);
  if (row.kind === 'set-aside') return 'set aside';
  return row.bestRank === row.worstRank
    ? formatNumber(row.bestRank)
    : `${formatNumber(row.bestRank)}–${formatNumber(row.worstRank)}`;
}
