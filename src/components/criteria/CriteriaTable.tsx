import type { CriterionColumn } from '#components/ranking/columns.ts';
import type { WeightSet } from '#components/ranking/use-weight-set.ts';
import { PointsField } from '#components/ranking/WeightSliders.tsx';
import { IconButton } from '#components/ui/Button.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import type { Criterion } from '#contract/criterion.ts';
import { formatNumber } from '#contract/format.ts';
import { MOST_POINTS } from '#contract/points.ts';
import { directionInWords, levelsInWords, limitInWords, sourceInWords } from './words.ts';

interface CriteriaTableProps {
  /** Text criteria too, in their order. */
  items: readonly Criterion[];
  columns: readonly CriterionColumn[];
  weights: WeightSet;
  weightsLocked: string | undefined;
  inputsLocked: string | undefined;
  chosen: string | null;
  onChoose: (criterionId: string) => void;
  onMove: (criterion: Criterion, position: number) => void;
}

/** Every criterion with its source, levels, limit and points. */
export function CriteriaTable(props: CriteriaTableProps) {
  const { items, columns, weightsLocked } = props;
  return (
    <>
      {weightsLocked && (
        <p className="caption pb-2" id="weights-locked">
          {weightsLocked}
        </p>
      )}
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
              <th scope="col">
                Points<span className="unit">0 to {MOST_POINTS}</span>
              </th>
              <th scope="col" className="num">
                Weight<span className="unit">sum 1</span>
              </th>
              <th scope="col">
                <span className="sr-only">Order</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {items.map((criterion) => (
              <CriterionRow
                key={criterion.id}
                {...props}
                criterion={criterion}
                column={columns.find((one) => one.criterion.id === criterion.id)}
              />
            ))}
          </tbody>
        </table>
      </div>
    </>
  );
}

interface RowProps extends CriteriaTableProps {
  criterion: Criterion;
  /** Undefined for a text criterion, and for one whose figures have not been read yet. */
  column: CriterionColumn | undefined;
}

function CriterionRow({ criterion, column, ...props }: RowProps) {
  const { weights, weightsLocked, chosen, onChoose } = props;
  const { id, name, unit } = criterion;
  return (
    <tr aria-selected={id === chosen}>
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
      <td>
        {criterion.source === 'text' ? (
          '–'
        ) : (
          <PointsField
            name={name}
            points={weights.points[id] ?? 0}
            onChange={(points) => weights.give({ [id]: points })}
            locked={weightsLocked !== undefined}
            describedBy={weightsLocked ? 'weights-locked' : undefined}
          />
        )}
      </td>
      <td className="num">{column ? formatNumber(column.weight, column.weightDecimals) : '–'}</td>
      <td className="cr-order">
        <OrderButtons criterion={criterion} {...props} />
      </td>
    </tr>
  );
}

function OrderButtons({ criterion, items, inputsLocked, onMove }: Omit<RowProps, 'column'>) {
  if (inputsLocked) return null;
  const place = items.findIndex(({ id }) => id === criterion.id);
  return (
    <>
      <IconButton
        icon="up"
        label={`Move ${criterion.name} up`}
        aria-disabled={place === 0 || undefined}
        onClick={() => place > 0 && onMove(criterion, place - 1)}
      />
      <IconButton
        icon="down"
        label={`Move ${criterion.name} down`}
        aria-disabled={place === items.length - 1 || undefined}
        onClick={() => place < items.length - 1 && onMove(criterion, place + 1)}
      />
    </>
  );
}
