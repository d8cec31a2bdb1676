import { useId, useState } from 'react';
import { formatNumber, readTypedNumber } from '#contract/format.ts';
import { MOST_POINTS } from '#contract/points.ts';
import { KeyLetter } from '#components/ui/States.tsx';
import type { CriterionColumn } from './columns.ts';
import type { WeightSet } from './use-weight-set.ts';

interface WeightSlidersProps {
  columns: readonly CriterionColumn[];
  set: WeightSet;
  /** Why these weights cannot be changed here; undefined where they can. */
  locked?: string | undefined;
}

/** Points for every criterion, by slider and by number; the share they come to stands beside them. */
export function WeightSliders({ columns, set, locked }: WeightSlidersProps) {
  const note = useId();
  return (
    <>
      {locked && (
        <p className="caption" id={note}>
          {locked}
        </p>
      )}
      <table className="table" data-dense="">
        <thead>
          <tr>
            <th scope="col">Criterion</th>
            <th scope="col">
              Points<span className="unit">0 to {MOST_POINTS}</span>
            </th>
            <th scope="col" className="num">
              Weight<span className="unit">sum 1</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {columns.map(({ criterion, letter, weight, weightDecimals }) => (
            <tr key={criterion.id}>
              <th scope="row">
                <KeyLetter letter={letter} /> {criterion.name}
              </th>
              <td>
                <PointsField
                  name={criterion.name}
                  points={set.points[criterion.id] ?? 0}
                  onChange={(points) => set.give({ [criterion.id]: points })}
                  locked={locked !== undefined}
                  describedBy={locked ? note : undefined}
                />
              </td>
              <td className="num">{formatNumber(weight, weightDecimals)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </>
  );
}

interface PointsFieldProps {
  name: string;
  points: number;
  onChange: (points: number) => void;
  locked: boolean;
  describedBy?: string | undefined;
}

/** A slider and its typed twin. What is typed counts on leaving the field or on Enter. */
export function PointsField({ name, points, onChange, locked, describedBy }: PointsFieldProps) {
  const errorId = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [error, setError] = useState<string | null>(null);
  const take = (): void => {
    if (typed === null) return;
    const read = readTypedNumber(typed);
    if (typeof read !== 'number' || read < 0 || read > MOST_POINTS) {
      setError(`${typed.trim() || 'Nothing'} is no number from 0 to ${MOST_POINTS}.`);
      return;
    }
    setError(null);
    setTyped(null);
    if (read !== points) onChange(read);
  };
  return (
    <>
      <span className="wt-points">
        <input
          type="range"
          min="0"
          max={MOST_POINTS}
          step="1"
          value={points}
          aria-disabled={locked || undefined}
          aria-label={`Points for ${name}`}
          aria-describedby={describedBy}
          onChange={(event) => {
            if (locked) return;
            setTyped(null);
            setError(null);
            onChange(Number(event.target.value));
          }}
        />
        <input
          type="text"
          inputMode="decimal"
          className="wt-number num"
          value={typed ?? String(points)}
          readOnly={locked}
          aria-label={`Points for ${name}, as a number`}
          aria-invalid={error !== null || undefined}
          aria-describedby={error ? errorId : describedBy}
          onChange={(event) => setTyped(event.target.value)}
          onBlur={take}
          onKeyDown={(event) => {
            if (event.key === 'Enter') take();
          }}
        />
      </span>
      {error && (
        <span className="fld-error" id={errorId}>
          {error}
        </span>
      )}
    </>
  );
}
