import { useState } from 'react';
import { formatNumber } from '#contract/format.ts';
import type { AcceptabilityOf } from '#contract/sensitivity.ts';
import type { Names } from '#contract/sensitivity-words.ts';
import { weightFigures } from '#contract/share-words.ts';
import { Button } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import type { Sheet } from '../columns.ts';

const STEP = 20;

interface CentralWeightsProps {
  answer: AcceptabilityOf;
  names: Names;
  sheet: Sheet;
}

/** What somebody would have to weigh for a site to lead. */
export function CentralWeights({ answer, names, sheet }: CentralWeightsProps) {
  const [shown, setShown] = useState(STEP);
  const leading = answer.sites.filter(({ centralWeights }) => centralWeights !== null);
  const never = answer.sites.length - leading.length;
  const known = leading[0]?.centralWeights ?? {};
  const columns = sheet.columns.filter(({ criterion }) => criterion.id in known);
  return (
    <Panel
      title="Weights under which each site leads"
      caption={`Central weights: the mean of the weights drawn under which the site leads; each row adds up to 1.${never > 0 ? ` ${formatNumber(never)} ${never === 1 ? 'site leads' : 'sites lead'} in no draw.` : ''}`}
    >
      <TableScroll label="Central weights">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Candidate site</th>
              {columns.map(({ criterion, letter, weight, weightDecimals }) => (
                <th key={criterion.id} scope="col" className="num">
                  <KeyLetter letter={letter} /> {criterion.name}
                  <span className="unit">now {formatNumber(weight, weightDecimals)}</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {leading.slice(0, shown).map(({ siteId, centralWeights }) => (
              <tr key={siteId} data-lead={siteId === answer.sites[0]?.siteId ? '' : undefined}>
                <th scope="row">{names.site(siteId)}</th>
                <WeightCells weights={columns.map(({ criterion }) => centralWeights?.[criterion.id] ?? 0)} />
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
      {shown < leading.length && (
        <p className="pt-3">
          <Button size="small" onClick={() => setShown(shown + 2 * STEP)}>
            Show {formatNumber(Math.min(2 * STEP, leading.length - shown))} more of{' '}
            {formatNumber(leading.length)} sites
          </Button>
        </p>
      )}
    </Panel>
  );
}

/** Printed so that they add up to 1. */
function WeightCells({ weights }: { weights: readonly number[] }) {
  return weightFigures(weights).map((weight, place) => (
    <td key={place} className="num">
      {weight}
    </td>
  ));
}
