import { formatNumber, formatShare } from '#contract/format.ts';
import { missingInWords } from '#contract/ranking-words.ts';
import type { RankingRow } from '#contract/ranking-rows.ts';
import { ButtonLink } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import { closedSums } from '#core/printed/closing.ts';
import { Reasons } from './cells.tsx';
import type { Sheet } from './columns.ts';
import { FigureText, saysInWords } from './FigureCell.tsx';

interface ContributionsProps {
  row: RankingRow;
  sheet: Sheet;
  studyId: string;
}

/** One site's overall value, term by term, so that it can be added up by hand. */
export function Contributions({ row, sheet, studyId }: ContributionsProps) {
  const terms = row.contributions.map(({ term }) => term ?? 0);
  const total = terms.reduce((sum, term) => sum + term, 0);
  const { sums, decimals } = closedSums([{ parts: terms, total }], sheet.decimals);
  const [printed] = sums;
  return (
    <Panel title={`What ${row.name} is made of`} caption={captionOf(row, sheet)}>
      <table className="table" data-dense="">
        <thead>
          <tr>
            <th scope="col">Criterion</th>
            <th scope="col" className="num">
              Figure
            </th>
            <th scope="col" className="num">
              Value<span className="unit">0 to 1</span>
            </th>
            <th scope="col" className="num">
              × weight
            </th>
            <th scope="col" className="num">
              = term
            </th>
          </tr>
        </thead>
        <tbody>
          {sheet.columns.map(({ criterion, place, letter, ...column }) => {
            const contribution = row.contributions[place];
            if (!contribution) return null;
            return (
              <tr key={criterion.id}>
                <th scope="row">
                  <KeyLetter letter={letter} /> {criterion.name}
                </th>
                <td className="num">
                  <FigureText contribution={contribution} decimals={column.decimals} />
                  {contribution.value !== null && !saysInWords(contribution) && (
                    <span className="rk-unit"> {criterion.unit}</span>
                  )}
                </td>
                <td className="num">{contribution.value === null ? '–' : formatShare(contribution.value)}</td>
                <td className="num">{formatNumber(column.weight, column.weightDecimals)}</td>
                <td className="num" title={String(contribution.term ?? '')}>
                  {contribution.term === null ? '–' : formatNumber(printed?.parts[place] ?? 0, decimals)}
                </td>
              </tr>
            );
          })}
        </tbody>
        <tfoot>
          <tr className="rk-sum">
            <th scope="row" colSpan={4}>
              Overall value{row.kind === 'incomplete' && ', missing values at 0'}
            </th>
            <td className="num">{formatNumber(printed?.total ?? total, decimals)}</td>
          </tr>
        </tfoot>
      </table>
      <p className="pt-3">
        <ButtonLink size="small" kind="text" href={`/studies/${studyId}/sites?site=${row.code}`}>
          Open {row.name} in Sites
        </ButtonLink>
      </p>
    </Panel>
  );
}

function captionOf(row: RankingRow, sheet: Sheet) {
  if (row.kind === 'set-aside') return <Reasons reasons={row.reasons} />;
  if (row.kind === 'incomplete') return `Incomplete: ${missingInWords(sheet.ranking, row.missing)}.`;
  return 'Overall value = sum of value × weight. Full figures stand in the CSV.';
}
