import type { CriterionColumn } from '#components/ranking/columns.ts';
import { PointsField } from '#components/ranking/WeightSliders.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import { formatNumber } from '#contract/format.ts';
import { MOST_POINTS } from '#contract/points.ts';
import { pointsOfShares, weighing } from '#contract/weighing.ts';
import { pointsStatement, type WeightStatement } from '#contract/weights.ts';
import { levelsOf, type WeighItem } from '#core/decision/statement.ts';

/** Points that a statement stands for: its own, or for another method those equal to its weights. */
export function pointsOf(items: readonly WeighItem[], statement: WeightStatement): Record<string, number> {
  if (statement.method === 'points') return { ...statement.points };
  const { shares } = weighing(items, statement);
  if (!shares) return {};
  const exact = Object.entries(pointsOfShares(items, shares));
  return Object.fromEntries(exact.map(([id, points]) => [id, Math.round(points * 100) / 100]));
}

interface WhatIfWeightsProps {
  /** The statement that counts here. */
  statement: WeightStatement;
  study: readonly CriterionColumn[];
  here: readonly CriterionColumn[];
  groupNames: ReadonlyMap<string, string>;
  locked: string | undefined;
  onChange: (of: { id: string; name: string }, statement: WeightStatement) => void;
}

/** Points for every criterion and group, beside the weight each has in the study and here. */
export function WhatIfWeights(props: WhatIfWeightsProps) {
  const { statement, study, here, groupNames, locked, onChange } = props;
  const items = here.map(({ criterion }) => criterion);
  const points = pointsOf(items, statement);
  const [top, ...groups] = levelsOf(items);
  const field = (id: string, name: string) => (
    <PointsField
      name={name}
      points={points[id] ?? 0}
      locked={locked !== undefined}
      onChange={(given) => onChange({ id, name }, pointsStatement({ ...points, [id]: given }))}
    />
  );
  const row = (id: string, alone: boolean) => {
    const place = items.findIndex((item) => item.id === id);
    const column = here[place];
    if (!column) return null;
    const { criterion, letter, weight, weightDecimals } = column;
    const was = study[place];
    return (
      <tr key={id} data-within={criterion.groupId ? '' : undefined}>
        <th scope="row">
          <KeyLetter letter={letter} /> {criterion.name}
        </th>
        <td>{alone ? <span className="sub">alone in its group</span> : field(id, criterion.name)}</td>
        <td className="num">{was && formatNumber(was.weight, was.weightDecimals)}</td>
        <td className="num">{formatNumber(weight, weightDecimals)}</td>
      </tr>
    );
  };
  return (
    <TableScroll label="Weights of the what-if">
      <table className="wi-weights table" data-dense="">
        <thead>
          <tr>
            <th scope="col">Criterion</th>
            <th scope="col">
              Points<span className="unit">0 to {MOST_POINTS}</span>
            </th>
            <th scope="col" className="num">
              Study<span className="unit">weight</span>
            </th>
            <th scope="col" className="num">
              Here<span className="unit">weight</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {(top?.ids ?? []).flatMap((id) => {
            const group = groups.find(({ groupId }) => groupId === id);
            if (!group) return [row(id, false)];
            const name = groupNames.get(id) ?? 'Group';
            return [
              <tr key={id} className="band">
                <th scope="rowgroup">{name}</th>
                <td colSpan={3}>{field(id, name)}</td>
              </tr>,
              ...group.ids.map((one) => row(one, group.ids.length === 1)),
            ];
          })}
        </tbody>
      </table>
    </TableScroll>
  );
}
