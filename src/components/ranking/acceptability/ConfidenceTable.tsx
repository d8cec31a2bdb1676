import { useState } from 'react';
import { formatNumber } from '#contract/format.ts';
import type { AcceptabilityOf, SiteAcceptability } from '#contract/sensitivity.ts';
import type { Names } from '#contract/sensitivity-words.ts';
import { errorFigure, shareFigure } from '#contract/share-words.ts';
import { Button } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';

const STEP = 20;

/** How often each site is first, and how sure it would be if its own central weights were agreed. */
export function ConfidenceTable({ answer, names }: { answer: AcceptabilityOf; names: Names }) {
  const [shown, setShown] = useState(STEP);
  const { sites, samples, uncertainFigures } = answer;
  const fixed = uncertainFigures === 0;
  return (
    <Panel
      title="How sure each site would be"
      caption={`Confidence: percent of draws of the figures in which the site leads under its own central weights${fixed ? '; without uncertain figures nothing is drawn, so it is exact' : ''}.`}
    >
      <TableScroll label="First rank and confidence factors">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Candidate site</th>
              {['First', 'Confidence'].flatMap((name) => [
                <th key={name} scope="col" className="num">
                  {name}
                  <span className="unit">%</span>
                </th>,
                <th key={`${name} error`} scope="col" className="num">
                  <span className="sr-only">{name}: </span>Std error<span className="unit">points</span>
                </th>,
              ])}
            </tr>
          </thead>
          <tbody>
            {sites.slice(0, shown).map((site, place) => (
              <tr key={site.siteId} data-lead={place === 0 ? '' : undefined}>
                <th scope="row">{names.site(site.siteId)}</th>
                <td className="num">{shareFigure(site.shares[0] ?? 0, samples)}</td>
                <td className="num">{errorFigure(site.shares[0] ?? 0, samples)}</td>
                <ConfidenceCells site={site} samples={samples} fixed={fixed} />
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
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

interface ConfidenceCellsProps {
  site: SiteAcceptability;
  samples: number;
  /** No figure is uncertain: the factor is exact. */
  fixed: boolean;
}

function ConfidenceCells({ site: { confidence }, samples, fixed }: ConfidenceCellsProps) {
  if (confidence === null) {
    return (
      <>
        <td className="num">never leads</td>
        <td className="num">–</td>
      </>
    );
  }
  return (
    <>
      <td className="num">{fixed ? formatNumber(confidence * 100, 1) : shareFigure(confidence, samples)}</td>
      <td className="num">{fixed ? '–' : errorFigure(confidence, samples)}</td>
    </>
  );
}
