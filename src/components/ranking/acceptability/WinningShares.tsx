import { useState } from 'react';
import { formatNumber } from '#contract/format.ts';
import type { AcceptabilityOf } from '#contract/sensitivity.ts';
import type { Names } from '#contract/sensitivity-words.ts';
import { errorFigure, shareFigure, underOneIn } from '#contract/share-words.ts';
import { Button } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';

const FIRST = 12;

/** In how many draws each site stands above each other. */
export function WinningShares({
  answer,
  names,
  codes,
}: {
  answer: AcceptabilityOf;
  names: Names;
  codes: ReadonlyMap<string, string>;
}) {
  const [shown, setShown] = useState(FIRST);
  const { sites, samples } = answer;
  const some = sites.slice(0, shown);
  return (
    <Panel
      title="Which site stands above which"
      caption={`Percent of ${formatNumber(samples)} draws in which the site of the row stands above that of the column; a tie counts a half. Under it the standard error in percentage points; · is ${underOneIn(samples)}.`}
    >
      <TableScroll label="Pairwise winning shares">
        <table className="sv-matrix table">
          <thead>
            <tr>
              <th scope="col">Stands above</th>
              {some.map(({ siteId }) => (
                <th key={siteId} scope="col" className="num" title={names.site(siteId)}>
                  {codes.get(siteId)}
                  <span className="sr-only"> {names.site(siteId)}</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {some.map(({ siteId, wins }, place) => (
              <tr key={siteId} data-lead={place === 0 ? '' : undefined}>
                <th scope="row">
                  {names.site(siteId)} <span className="rk-unit">{codes.get(siteId)}</span>
                </th>
                {some.map((other, column) => {
                  const share = wins[column] ?? null;
                  return share === null ? (
                    <td key={other.siteId} className="num">
                      –
                    </td>
                  ) : (
                    <td key={other.siteId} className="num">
                      <WinCell share={share} samples={samples} />
                    </td>
                  );
                })}
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
      {shown < sites.length && (
        <p className="pt-3">
          <Button size="small" onClick={() => setShown(sites.length)}>
            Show all {formatNumber(sites.length)} sites
          </Button>
        </p>
      )}
    </Panel>
  );
}

function WinCell({ share, samples }: { share: number; samples: number }) {
  if (share === 0) {
    return (
      <>
        <span aria-hidden="true">·</span>
        <span className="sr-only">{underOneIn(samples)}</span>
      </>
    );
  }
  return (
    <>
      <span className="sv-percent">{shareFigure(share, samples)}</span>
      <span className="sv-error">
        <span className="sr-only">standard error </span>
        {errorFigure(share, samples)}
      </span>
    </>
  );
}
