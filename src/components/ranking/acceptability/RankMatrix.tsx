import { useState } from 'react';
import { formatNumber } from '#contract/format.ts';
import type { AcceptabilityOf, SiteAcceptability } from '#contract/sensitivity.ts';
import type { Names } from '#contract/sensitivity-words.ts';
import { errorFigure, shareFigure, underOneIn } from '#contract/share-words.ts';
import { Button } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';

const FIRST_RANKS = 12;
const FIRST_SITES = 20;
const BAR = 30;

/** The share of draws in which each site has each rank, with its standard error. */
export function RankMatrix({ answer, names }: { answer: AcceptabilityOf; names: Names }) {
  const [whole, setWhole] = useState(false);
  const { sites, samples } = answer;
  const shown = whole ? sites : sites.slice(0, FIRST_SITES);
  const ranks = sites.slice(0, whole ? sites.length : FIRST_RANKS).map((_, rank) => rank);
  const more = sites.length > ranks.length || sites.length > shown.length;
  return (
    <Panel
      title="Rank acceptability"
      caption={`Percent of ${formatNumber(samples)} draws at each rank, and under it the standard error in percentage points; · is ${underOneIn(samples)}.`}
    >
      <TableScroll label="Rank acceptability of every site">
        <table className="sv-matrix table">
          <thead>
            <tr>
              <th scope="col">Percent at rank</th>
              {ranks.map((rank) => (
                <th key={rank} scope="col" className="num">
                  {rank + 1}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {shown.map((site, place) => (
              <tr key={site.siteId} data-lead={place === 0 ? '' : undefined}>
                <th scope="row">{names.site(site.siteId)}</th>
                {ranks.map((rank) => (
                  <td key={rank} className="num">
                    <ShareCell site={site} rank={rank} samples={samples} signal={place === 0 && rank === 0} />
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
      {more && (
        <p className="pt-3">
          <Button size="small" onClick={() => setWhole(true)}>
            Show every rank of {formatNumber(sites.length)} sites
          </Button>
        </p>
      )}
    </Panel>
  );
}

interface ShareCellProps {
  site: SiteAcceptability;
  rank: number;
  samples: number;
  signal: boolean;
}

function ShareCell({ site, rank, samples, signal }: ShareCellProps) {
  const share = site.shares[rank] ?? 0;
  if (share === 0) {
    return (
      <>
        <span aria-hidden="true">·</span>
        <span className="sr-only">{underOneIn(samples)}</span>
      </>
    );
  }
  const height = Math.max(share * BAR, 1);
  return (
    <>
      <svg className="sv-share" width="34" height={BAR} aria-hidden="true">
        <rect className={signal ? 'fill-signal' : 'fill-2'} y={BAR - height} width="34" height={height} />
      </svg>
      <span className={signal ? 'sv-percent lead-figure' : 'sv-percent'}>{shareFigure(share, samples)}</span>
      <span className="sv-error">
        <span className="sr-only">standard error </span>
        {errorFigure(share, samples)}
      </span>
    </>
  );
}
