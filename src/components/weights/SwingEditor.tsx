import { useId } from 'react';
import { PointsField } from '#components/ranking/WeightSliders.tsx';
import { formatNumber, listInWords } from '#contract/format.ts';
import type { Siblings } from '#core/decision/statement.ts';
import { FULL_SWING, weightsFromSwing } from '#core/decision/swing.ts';
import { swingInWords } from './level-words.ts';
import { comparedLevels } from './statement.ts';
import type { EditorProps } from './editor.ts';
import { levelInWords, nameIn } from './words.ts';

/** Level by level: which swing matters most, and how much each of the others matters beside it. */
export function SwingEditor(props: EditorProps) {
  const levels = comparedLevels(props.items);
  const grouped = levels.length > 1 || props.items.some(({ groupId }) => groupId !== null);
  return (
    <div className="wt-levels">
      {levels.map((level) => (
        <section key={level.groupId ?? 'top'}>
          <h3 className="wt-level">{levelInWords(level.groupId, props.names, grouped)}</h3>
          <SwingLevel {...props} level={level} />
        </section>
      ))}
    </div>
  );
}

function SwingLevel({ level, ...props }: EditorProps & { level: Siblings }) {
  const { statement, say, names, locked } = props;
  const radio = useId();
  const { points } = statement;
  const top = level.ids.find((id) => points[id] === FULL_SWING);
  const give = (id: string, value: number): void => say({ ...statement, points: { ...points, [id]: value } });
  const whole = top !== undefined && level.ids.every((id) => Object.hasOwn(points, id));
  const weights = whole ? weightsFromSwing(level.ids.map((id) => points[id] ?? 0)) : null;
  return (
    <>
      <p className="caption" id={`${radio}-ask`}>
        {top === undefined
          ? 'Suppose all stood at their worst. Which would you raise to its best first?'
          : `${nameIn(names, top)} has ${FULL_SWING}. How much does each other swing matter beside it?`}
      </p>
      <div className="table-scroll" role="region" aria-label="Swings" tabIndex={0}>
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">Most</th>
              <th scope="col">From worst to best</th>
              <th scope="col">
                Points<span className="unit">0 to {FULL_SWING}</span>
              </th>
              <th scope="col" className="num">
                Weight<span className="unit">of this level</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {level.ids.map((id, place) => (
              <tr key={id}>
                <td>
                  <label className="wt-most">
                    <input
                      type="radio"
                      name={radio}
                      checked={id === top}
                      disabled={locked}
                      aria-label={`${nameIn(names, id)} matters most`}
                      onChange={() => give(id, FULL_SWING)}
                    />
                  </label>
                </td>
                <th scope="row">
                  {nameIn(names, id)}
                  <span className="sub">{swingOf(id, props)}</span>
                </th>
                <td>
                  {top === undefined || id === top ? (
                    <span className="num">{id === top ? FULL_SWING : '–'}</span>
                  ) : (
                    <PointsField
                      name={nameIn(names, id)}
                      points={points[id]}
                      onChange={(value) => give(id, value)}
                      locked={locked}
                    />
                  )}
                </td>
                <td className="num">{weights ? formatNumber(weights[place] ?? 0, 2) : '–'}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </>
  );
}

function swingOf(id: string, { columns, items, names }: EditorProps): string {
  const column = columns.find(({ criterion }) => criterion.id === id);
  if (column) return swingInWords(column);
  const inGroup = items.filter(({ groupId }) => groupId === id).map((one) => nameIn(names, one.id));
  return `all of ${listInWords(inGroup)}, each from worst to best`;
}
