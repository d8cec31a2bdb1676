import type { CriterionColumn } from '#components/ranking/columns.ts';
import type { WeightSet } from '#components/ranking/use-weight-set.ts';
import { PointsField } from '#components/ranking/WeightSliders.tsx';
import { IconButton } from '#components/ui/Button.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import { nameIn, type Names } from '#components/weights/words.ts';
import type { Criterion } from '#contract/criterion.ts';
import { formatNumber } from '#contract/format.ts';
import { MOST_POINTS } from '#contract/points.ts';
import type { WeightLevel } from '#contract/weights.ts';
import { tableRows, type TableRow } from './table-rows.ts';
import { directionInWords, levelsInWords, limitInWords, sourceInWords } from './words.ts';

/** Id of what says why weights are locked. */
export const LOCK_NOTE = 'weights-locked';

interface CriteriaTableProps {
  /** Text criteria too, in their order. */
  items: readonly Criterion[];
  columns: readonly CriterionColumn[];
  weights: WeightSet;
  levels: readonly WeightLevel[];
  /** Of criteria and groups. */
  names: Names;
  /** Whether weights are set by points, here in the table. */
  pointsShown: boolean;
  /** Why weights cannot be changed; the element `LOCK_NOTE` says it, over the table. */
  weightsLocked: string | undefined;
  inputsLocked: string | undefined;
  chosen: string | null;
  onChoose: (criterionId: string) => void;
  onMove: (criterion: Criterion, position: number) => void;
}

/** Every criterion, under its group, with its source, levels, limit and weight. */
export function CriteriaTable(props: CriteriaTableProps) {
  const { items, columns, pointsShown } = props;
  return (
    <div className="table-scroll" role="region" aria-label="Criteria" tabIndex={0}>
      <table className="table">
        <thead>
          <tr>
            <th scope="col">Criterion</th>
            <th scope="col" className="cr-wide-only">
              Levels<span className="unit">value 0 to 1</span>
            </th>
            <th scope="col" className="cr-wide-only">
              Limit
            </th>
            {pointsShown && (
              <th scope="col">
                Points<span className="unit">0 to {MOST_POINTS}</span>
              </th>
            )}
            <th scope="col" className="num">
              Weight<span className="unit">sum 1</span>
            </th>
            <th scope="col">
              <span className="sr-only">Order</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {tableRows(items).map((row) =>
            row.kind === 'group' ? (
              <GroupRow key={row.groupId} {...props} groupId={row.groupId} />
            ) : (
              <CriterionRow
                key={row.criterion.id}
                {...props}
                row={row}
                column={columns.find((one) => one.criterion.id === row.criterion.id)}
              />
            ),
          )}
        </tbody>
      </table>
    </div>
  );
}

/** A group's own points and weight; its criteria follow. */
function GroupRow({ groupId, ...props }: CriteriaTableProps & { groupId: string }) {
  const { names, levels, weights, pointsShown, weightsLocked } = props;
  const name = nameIn(names, groupId);
  const weight = levels[0]?.weights?.[groupId] ?? 0;
  return (
    <tr className="cr-group">
      <th scope="rowgroup">
        <span className="name">{name}</span>
        <span className="sub">group; its weight is shared out among its criteria</span>
      </th>
      <td className="cr-wide-only" />
      <td className="cr-wide-only" />
      {pointsShown && (
        <td>
          <PointsField
            name={`the group ${name}`}
            points={weights.points[groupId] ?? 0}
            onChange={(points) => weights.give({ [groupId]: points })}
            locked={weightsLocked !== undefined}
            describedBy={weightsLocked ? LOCK_NOTE : undefined}
          />
        </td>
      )}
      <td className="num">{formatNumber(weight, 2)}</td>
      <td />
    </tr>
  );
}

interface RowProps extends CriteriaTableProps {
  row: Extract<TableRow, { kind: 'criterion' }>;
  /** Undefined for a text criterion, and for one whose figures have not been read yet. */
  column: CriterionColumn | undefined;
}

function CriterionRow({ row, column, ...props }: RowProps) {
  const { weights, weightsLocked, pointsShown, chosen, onChoose } = props;
  const { criterion } = row;
  const { id, name, unit } = criterion;
  return (
    <tr aria-selected={id === chosen} className={row.grouped ? 'cr-grouped' : undefined}>
      <th scope="row">
        <button type="button" className="cr-open" aria-pressed={id === chosen} onClick={() => onChoose(id)}>
          {column && <KeyLetter letter={column.letter} />}
          <span className="name">
            {name}
            {unit && <span className="cr-unit"> {unit}</span>}
          </span>
          <span className="sub">
            {criterion.source !== 'text' && <>{directionInWords(criterion.direction)}, </>}
            {sourceInWords(criterion)}
          </span>
        </button>
      </th>
      <td className="cr-wide-only">{column ? levelsInWords(column.criterion) : '–'}</td>
      <td className="cr-wide-only">{criterion.source === 'text' ? '–' : limitInWords(criterion)}</td>
      {pointsShown && (
        <td>
          {criterion.source === 'text' ? (
            '–'
          ) : (
            <PointsField
              name={name}
              points={weights.points[id] ?? 0}
              onChange={(points) => weights.give({ [id]: points })}
              locked={weightsLocked !== undefined}
              describedBy={weightsLocked ? LOCK_NOTE : undefined}
            />
          )}
        </td>
      )}
      <td className="num">{column ? formatNumber(column.weight, column.weightDecimals) : '–'}</td>
      <td className="cr-order">
        <OrderButtons row={row} {...props} />
      </td>
    </tr>
  );
}

function OrderButtons({ row, inputsLocked, onMove }: Omit<RowProps, 'column'>) {
  if (inputsLocked) return null;
  const { criterion, up, down } = row;
  return (
    <>
      <IconButton
        icon="up"
        label={`Move ${criterion.name} up`}
        aria-disabled={up === null || undefined}
        onClick={() => up !== null && onMove(criterion, up)}
      />
      <IconButton
        icon="down"
        label={`Move ${criterion.name} down`}
        aria-disabled={down === null || undefined}
        onClick={() => down !== null && onMove(criterion, down)}
      />
    </>
  );
}
