import { useState } from 'react';
import { formatNumber } from '#contract/format.ts';
import type { AcceptabilityOf } from '#contract/sensitivity.ts';
import type { Names } from '#contract/sensitivity-words.ts';
import { errorFigure, shareFigure, underOneIn } from '#contract/share-words.ts';
import { Button } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import { closedSums } from '#core/printed/closing.ts';
import type { Sheet } from '../columns.ts';

const STEP = 20;
const DECIMALS = 3;

/** What somebody would have to weigh for a site to lead, and how sure it then leads. */
export function CentralWeights({
  answer,
  names,
  sheet,
}: {
  answer: AcceptabilityOf;
  names: Names;
  sheet: Sheet;
}) {
  const [shown, setShown] = useState(STEP);
  const { sites, samples, uncertainFigures } = answer;
  const ids = Object.keys(sites.find(({ centralWeights }) => centralWeights)?.centralWeights ?? {});
  const columns = sheet.columns.filter(({ criterion }) => ids.includes(criterion.id));
  return (
    <Panel
      title="What each site would need"
      caption={`Central weights: the mean of the weights under which the site leads. Confidence: percent of draws of the figures in which it leads under those weights${uncertainFigures === 0 ? '; without uncertain figures it is 0 or 100' : ', with its standard error'}.`}
    >
      <TableScroll label="Central weights and confidence factors">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Candidate site</th>
              <th scope="col" className="num">
                First<span className="unit">%</span>
              </th>
              <th scope="col" className="num">
                Confidence<span className="unit">%</span>
              </th>
              <th scope="col" className="num">
                Error<span className="unit">points</span>
              </th>
              {columns.map(({ criterion, letter }) => (
                <th key={criterion.id} scope="col" className="num">
                  <KeyLetter letter={letter} />
                  <span className="sr-only"> {criterion.name}</span>
                  <span className="unit">weight</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {sites.slice(0, shown).map((site, place) => (
              <tr key={site.siteId} data-lead={place === 0 ? '' : undefined}>
                <th scope="row">{names.site(site.siteId)}</th>
                <td className="num">{shareFigure(site.shares[0] ?? 0, samples)}</td>
                {site.confidence === null || site.centralWeights === null ? (
                  <td className="num" colSpan={columns.length + 2}>
                    never leads
                  </td>
                ) : (
                  <>
                    <td className="num">
                      {uncertainFigures === 0
                        ? formatNumber(site.confidence * 100, 1)
                        : shareFigure(site.confidence, samples)}
                    </td>
                    <td className="num">
                      {uncertainFigures === 0 ? '–' : errorFigure(site.confidence, samples)}
                    </td>
                    <WeightCells
                      weights={columns.map(({ criterion }) => site.centralWeights?.[criterion.id] ?? 0)}
                    />
                  </>
                )}
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
      <p className="caption pt-2">“{underOneIn(samples)}” where no draw showed it.</p>
      {shown < sites.length && (
        <p className="pt-3">
          <Button size="small" onClick={() => setShown(shown + 2 * STEP)}>
            Show {formatNumber(Math.min(2 * STEP, sites.length - shown))} more of {formatNumber(sites.length)}{' '}
            sites
          </Button>
        </p>
      )}
    </Panel>
  );
}

/** Printed so that they add up to 1. */
function WeightCells({ weights }: { weights: readonly number[] }) {
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const { sums } = closedSums([{ parts: weights, total }], DECIMALS, DECIMALS);
  return (sums[0]?.parts ?? weights).map((weight, place) => (
    <td key={place} className="num">
      {formatNumber(weight, DECIMALS)}
    </td>
  ));
}
