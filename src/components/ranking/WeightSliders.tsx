import { useId, useMemo, useState, type ReactNode } from 'react';
import { formatFull, formatNumber, readTypedNumber } from '#contract/format.ts';
import { MOST_POINTS } from '#contract/points.ts';
import { weighing } from '#contract/weighing.ts';
import type { WeightsOf } from '#contract/weights.ts';
import { ButtonLink } from '#components/ui/Button.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import { useNames } from '#components/weights/use-names.ts';
import { METHOD_WAYS, nameIn, unjudgedInWords } from '#components/weights/words.ts';
import type { CriterionColumn } from './columns.ts';
import type { WeightSet } from './use-weight-set.ts';

interface WeightSlidersProps {
  studyId: string;
  columns: readonly CriterionColumn[];
  set: WeightSet;
  /** Why these weights cannot be changed here; undefined where they can. */
  locked?: string | undefined;
}

/** Weights beside a ranking: by points with a slider for each; those set another way are shown, and set in Criteria. */
export function WeightSliders({ studyId, columns, set, locked }: WeightSlidersProps) {
  const note = useId();
  const weighed = useMemo(() => columns.map(({ criterion }) => criterion), [columns]);
  const names = useNames(studyId, weighed);
  const { levels } = useMemo(() => weighing(weighed, set.statement), [weighed, set.statement]);
  const byPoints = set.statement.method === 'points';
  const field = (id: string, name: string) => (
    <PointsField
      name={name}
      points={set.points[id] ?? 0}
      onChange={(points) => set.give({ [id]: points })}
      locked={locked !== undefined}
      describedBy={locked ? note : undefined}
    />
  );
  const [top, ...groups] = levels;
  const rowsOf = (ids: readonly string[], grouped: boolean): ReactNode[] =>
    ids.flatMap((id) => {
      const inside = groups.find(({ groupId }) => groupId === id);
      if (inside) {
        const row = (
          <tr key={id} className="cr-group">
            <th scope="rowgroup">{nameIn(names, id)}</th>
            {byPoints && <td>{field(id, `the group ${nameIn(names, id)}`)}</td>}
            <td className="num">{formatNumber(top?.weights?.[id] ?? 0, 2)}</td>
          </tr>
        );
        return [row, ...rowsOf(inside.ids, true)];
      }
      const column = columns.find(({ criterion }) => criterion.id === id);
      if (!column) return [];
      const { criterion, letter, weight, weightDecimals } = column;
      return [
        <tr key={id} className={grouped ? 'cr-grouped' : undefined}>
          <th scope="row">
            <KeyLetter letter={letter} /> {criterion.name}
          </th>
          {byPoints && <td>{field(id, criterion.name)}</td>}
          <td className="num">{formatNumber(weight, weightDecimals)}</td>
        </tr>,
      ];
    });
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
            {byPoints && (
              <th scope="col">
                Points<span className="unit">0 to {MOST_POINTS}</span>
              </th>
            )}
            <th scope="col" className="num">
              Weight<span className="unit">sum 1</span>
            </th>
          </tr>
        </thead>
        <tbody>{rowsOf(top?.ids ?? [], false)}</tbody>
      </table>
      <p className="caption pt-2">
        {unjudgedInWords(levels, names)} {!byPoints && <>Set by {METHOD_WAYS[set.statement.method]}. </>}
        <ButtonLink kind="text" size="small" href={criteriaAddress(studyId, set.kept.weights)}>
          {byPoints ? 'Other ways to set weights' : 'Change them in Criteria'}
        </ButtonLink>
      </p>
    </>
  );
}

const criteriaAddress = (studyId: string, whose: WeightsOf): string =>
  `/studies/${studyId}/criteria${whose === 'mine' ? '?weights=mine' : ''}`;

interface PointsFieldProps {
  name: string;
  /** Undefined where none have been given yet. */
  points: number | undefined;
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
          value={points ?? 0}
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
          value={typed ?? shortly(points)}
          title={points === undefined ? undefined : formatFull(points)}
          placeholder={points === undefined ? '–' : undefined}
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

/** Points that came of a mean have many digits: two decimals stand in the field, all of them in its tooltip. */
const shortly = (points: number | undefined): string =>
  points === undefined ? '' : String(Math.round(points * 100) / 100);
