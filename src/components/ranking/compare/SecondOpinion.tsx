import { useMemo, useState } from 'react';
import { formatFull, formatNumber } from '#contract/format.ts';
import { secondOpinionOf } from '#contract/sensitivity-model.ts';
import type { Subject } from '#contract/sensitivity-subject.ts';
import { secondOpinionInWords, type Names } from '#contract/sensitivity-words.ts';
import { Button } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';

const STEP = 20;
const CLOSENESS_DECIMALS = 3;

/** The order by closeness to the ideal beside that by additive value, and where they differ. */
export function SecondOpinion({
  subject,
  names,
  decimals,
}: {
  subject: Subject;
  names: Names;
  decimals: number;
}) {
  const [shown, setShown] = useState(STEP);
  const opinion = useMemo(() => secondOpinionOf(subject), [subject]);
  const ranked = subject.sites.map(({ siteId }, site) => ({ siteId, rank: subject.ranks[site] ?? 0 }));
  const { fact, behind } = secondOpinionInWords(ranked, opinion, names);
  const bySite = new Map(opinion.map((one) => [one.siteId, one]));
  return (
    <Panel
      title={fact}
      caption={`A second opinion on the same values and weights: closeness to the ideal, 0 to 1 (TOPSIS). ${behind}`}
    >
      <TableScroll label="Ranks by additive value and by closeness to the ideal">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Candidate site</th>
              <th scope="col" className="num">
                Overall value<span className="unit">additive</span>
              </th>
              <th scope="col" className="num">
                Rank
              </th>
              <th scope="col" className="num">
                Closeness<span className="unit">TOPSIS</span>
              </th>
              <th scope="col" className="num">
                Rank
              </th>
              <th scope="col">Where they differ</th>
            </tr>
          </thead>
          <tbody>
            {ranked.slice(0, shown).map(({ siteId, rank }, site) => {
              const own = bySite.get(siteId);
              if (!own) return null;
              return (
                <tr key={siteId} data-lead={rank === 1 ? '' : undefined}>
                  <th scope="row">{names.site(siteId)}</th>
                  <td className="num">
                    <span className="lead-figure">{formatNumber(subject.totals[site] ?? 0, decimals)}</span>
                  </td>
                  <td className="num">{formatNumber(rank)}</td>
                  <td className="num" title={formatFull(own.closeness)}>
                    {formatNumber(own.closeness, CLOSENESS_DECIMALS)}
                  </td>
                  <td className="num">{formatNumber(own.rank)}</td>
                  <td>{differenceInWords(rank, own.rank)}</td>
                </tr>
              );
            })}
          </tbody>
        </table>
      </TableScroll>
      {shown < ranked.length && (
        <p className="pt-3">
          <Button size="small" onClick={() => setShown(shown + 5 * STEP)}>
            Show {formatNumber(Math.min(5 * STEP, ranked.length - shown))} more of{' '}
            {formatNumber(ranked.length)} sites
          </Button>
        </p>
      )}
    </Panel>
  );
}

function differenceInWords(here: number, there: number): string {
  if (here === there) return '–';
  return `${formatNumber(Math.abs(here - there))} ${there < here ? 'higher' : 'lower'} by closeness`;
}
