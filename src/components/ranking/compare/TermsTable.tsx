import { useState } from 'react';
import { formatNumber } from '#contract/format.ts';
import { rowOf } from '#contract/ranking-rows.ts';
import { Button } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import { closedSums } from '#core/printed/closing.ts';
import type { RankingViewProps } from '../views.ts';

const STEP = 12;

/** Every ranked site's terms in one row that adds up to its overall value. */
export function TermsTable({ model, sheet }: Pick<RankingViewProps, 'model' | 'sheet'>) {
  const [shown, setShown] = useState(STEP);
  const ranked = model.rows.filter(({ kind }) => kind === 'ranked');
  const rows = ranked.slice(0, shown).map((listed) => rowOf(model, listed));
  const sums = rows.map(({ contributions }) => {
    const parts = contributions.map(({ term }) => term ?? 0);
    return { parts, total: parts.reduce((sum, term) => sum + term, 0) };
  });
  const closed = closedSums(sums, sheet.decimals);
  const figure = (value: number | undefined): string => formatNumber(value ?? 0, closed.decimals);
  return (
    <Panel
      title="What each overall value adds up to"
      caption={`Terms, value × weight, of ${formatNumber(rows.length)} of ${formatNumber(ranked.length)} ranked sites; each row adds up to its overall value in the printed digits${closed.adjusted ? ', some terms rounded by one step to do so' : ''}.`}
    >
      <TableScroll label="Terms of every overall value">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Rank</th>
              <th scope="col">Candidate site</th>
              {sheet.columns.map(({ criterion, letter, weight, weightDecimals }) => (
                <th key={criterion.id} scope="col" className="num">
                  <KeyLetter letter={letter} /> {criterion.name}
                  <span className="unit">weight {formatNumber(weight, weightDecimals)}</span>
                </th>
              ))}
              <th scope="col" className="num">
                Overall value<span className="unit">sum</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row, at) => (
              <tr key={row.siteId} data-lead={row.kind === 'ranked' && row.rank === 1 ? '' : undefined}>
                <td className="num">{row.kind === 'ranked' && formatNumber(row.rank)}</td>
                <th scope="row">{row.name}</th>
                {sheet.columns.map(({ criterion, place }) => (
                  <td key={criterion.id} className="num">
                    {row.contributions[place]?.term == null ? '–' : figure(closed.sums[at]?.parts[place])}
                  </td>
                ))}
                <td className="num">
                  <b className="lead-figure">{figure(closed.sums[at]?.total)}</b>
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
      {shown < ranked.length && (
        <p className="pt-3">
          <Button size="small" onClick={() => setShown(shown + 4 * STEP)}>
            Show {formatNumber(Math.min(4 * STEP, ranked.length - shown))} more of{' '}
            {formatNumber(ranked.length)} sites
          </Button>
        </p>
      )}
    </Panel>
  );
}
