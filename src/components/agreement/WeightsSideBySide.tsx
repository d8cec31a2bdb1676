import type { Sheet } from '#components/ranking/columns.ts';
import { Panel } from '#components/ui/Finding.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import { METHOD_WAYS } from '#components/weights/words.ts';
import type { Judged, MembersAgreement } from '#contract/agreement-model.ts';
import { formatNumber } from '#contract/format.ts';
import type { RankingModel } from '#contract/ranking-model.ts';
import { closedSums } from '#core/printed/closing.ts';

interface WeightsProps {
  members: MembersAgreement;
  sheet: Sheet;
  /** The ranking under the weights chosen. */
  model: RankingModel;
}

const DECIMALS = 2;

/** Each member's weight on each criterion, each column adding up to 1 as printed; bars on one scale. */
export function WeightsSideBySide({ members, sheet, model }: WeightsProps) {
  const { judges, agreement } = members;
  const sets = judges.map((one) => Array.from(one.model.weights));
  const closed = closedSums(
    [...sets, Array.from(model.weights)].map((parts) => ({
      parts,
      total: parts.reduce((sum, part) => sum + part, 0),
    })),
    DECIMALS,
  );
  const printed = closed.sums.map(({ parts }) => parts);
  const most = Math.max(...sets.flat(), Number.EPSILON);
  return (
    <Panel title="Weights side by side" caption="Each column adds up to 1.">
      <TableScroll label="Members’ weights side by side">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Criterion</th>
              {judges.map((one) => (
                <th scope="col" className="num" key={one.userId}>
                  {nameOf(one)}
                  <span className="unit">by {METHOD_WAYS[one.method]}</span>
                </th>
              ))}
              <th scope="col" className="num">
                {sheet.ranking.weights === 'mine' ? 'Yours' : 'The study’s'}
              </th>
            </tr>
          </thead>
          <tbody>
            {sheet.columns.map(({ criterion, letter, place }) => (
              <tr key={criterion.id}>
                <th scope="row">
                  <KeyLetter letter={letter} /> {criterion.name}
                  {agreement?.criterion?.place === place && <span className="sub">furthest apart</span>}
                </th>
                {judges.map((one, judge) => (
                  <td className="num" key={one.userId}>
                    {formatNumber(printed[judge]?.[place] ?? 0, closed.decimals)}
                    <WeightBar share={(sets[judge]?.[place] ?? 0) / most} />
                  </td>
                ))}
                <td className="num">{formatNumber(printed[judges.length]?.[place] ?? 0, closed.decimals)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
    </Panel>
  );
}

export const nameOf = ({ name, mine }: Judged): string => (mine ? `${name} (you)` : name);

const BAR = 48;

function WeightBar({ share }: { share: number }) {
  return (
    <svg className="ag-bar" width={BAR} height="4" aria-hidden="true">
      <rect className="fill-3" width={BAR * share} height="4" />
    </svg>
  );
}
