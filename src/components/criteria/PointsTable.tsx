import { IconButton } from '#components/ui/index.ts';
import { formatNumber } from '#contract/format.ts';
import type { Knot } from '#core/decision/shape.ts';
import { FigureField } from './FigureField.tsx';
import { figureAt, knotRange, moveKnot, positionOf, removeKnot, type Levels } from './shape-editing.ts';
import { figureInWords } from './words.ts';

type Knots = [number, number][];

interface PointsTableProps {
  knots: readonly Knot[];
  levels: Levels;
  unit: string;
  /** Left out where they may not be changed. */
  onChange?: ((knots: Knots) => void) | undefined;
}

/** The points of a value function, from the worst level to the best: figures in the criterion's unit, values 0 to 1. */
export function PointsTable({ knots, levels, unit, onChange }: PointsTableProps) {
  return (
    <table className="mt-3 table" data-dense="">
      <thead>
        <tr>
          <th scope="col">Point</th>
          <th scope="col" className="num">
            Figure{unit && <span className="unit">{unit}</span>}
          </th>
          <th scope="col" className="num">
            Value<span className="unit">0 to 1</span>
          </th>
          {onChange && (
            <th scope="col">
              <span className="sr-only">Remove</span>
            </th>
          )}
        </tr>
      </thead>
      <tbody>
        {knots.map((knot, index) => {
          const inner = index > 0 && index < knots.length - 1;
          return (
            // A point is known by its place: it is moved, not exchanged.
            <tr key={index}>
              <th scope="row">{pointName(index, knots.length)}</th>
              {inner && onChange ? (
                <PointFields knots={knots} levels={levels} index={index} onChange={onChange} />
              ) : (
                <>
                  <td className="num">{figureInWords(figureAt(levels, knot[0]))}</td>
                  <td className="num">{formatNumber(knot[1], 3)}</td>
                  {onChange && <td />}
                </>
              )}
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}

function pointName(index: number, count: number): string {
  if (index === 0) return 'Worst level';
  return index === count - 1 ? 'Best level' : `Point ${index + 1}`;
}

interface PointProps {
  knots: readonly Knot[];
  levels: Levels;
  index: number;
  onChange: (knots: Knots) => void;
}

function PointFields({ knots, levels, index, onChange }: PointProps) {
  const [position = 0, value = 0] = knots[index] ?? [];
  const { from, to } = knotRange(knots, index);
  const name = `point ${index + 1}`;
  const figureFault = (figure: number): string | null => {
    const at = positionOf(levels, figure);
    const neighbours = [index - 1, index + 1].map((near) => figureAt(levels, knots[near]?.[0] ?? 0));
    return at >= from[0] && at <= to[0]
      ? null
      : `It lies between its neighbours, ${figureInWords(Math.min(...neighbours))} and ${figureInWords(Math.max(...neighbours))}.`;
  };
  const valueFault = (typed: number): string | null =>
    typed >= from[1] && typed <= to[1]
      ? null
      : `It lies from ${formatNumber(from[1], 3)} to ${formatNumber(to[1], 3)}, the values beside it.`;
  return (
    <>
      <td className="num">
        <FigureField
          label={`Figure of ${name}`}
          labelHidden
          shown={figureInWords(figureAt(levels, position))}
          fault={figureFault}
          onRead={(figure) => onChange(moveKnot(knots, index, [positionOf(levels, figure), value]))}
        />
      </td>
      <td className="num">
        <FigureField
          label={`Value of ${name}`}
          labelHidden
          shown={formatNumber(value, 3)}
          fault={valueFault}
          onRead={(typed) => onChange(moveKnot(knots, index, [position, typed]))}
        />
      </td>
      <td>
        <IconButton
          icon="remove"
          label={`Remove ${name}`}
          onClick={() => onChange(removeKnot(knots, index))}
        />
      </td>
    </>
  );
}
