import { useState } from 'react';
import { IconButton } from '#components/ui/Button.tsx';
import { formatNumber } from '#contract/format.ts';
import { weighing } from '#contract/weighing.ts';
import { levelsOf, type Siblings } from '#core/decision/statement.ts';
import type { EditorProps } from './editor.ts';
import { levelInWords, nameIn } from './words.ts';

/** Level by level, the most important first: by dragging, by the buttons, or with arrow keys on an item's name. */
export function OrderEditor(props: EditorProps) {
  const { items, statement, say, names } = props;
  const levels = levelsOf(items);
  const grouped = levels.length > 1;
  const ordered = (level: Siblings): string[] => orderIn(level, statement.order);
  const move = (level: Siblings, order: readonly string[]): void =>
    say({
      ...statement,
      order: levels.flatMap((one) => (one.groupId === level.groupId ? order : ordered(one))),
    });
  return (
    <div className="wt-levels">
      {levels
        .filter(({ ids }) => ids.length > 1)
        .map((level) => (
          <section key={level.groupId ?? 'top'}>
            <h3 className="wt-level">{levelInWords(level.groupId, names, grouped)}</h3>
            <OrderLevel
              {...props}
              level={level}
              order={ordered(level)}
              onOrder={(order) => move(level, order)}
            />
          </section>
        ))}
    </div>
  );
}

/** As said, and what the order does not name yet after it. */
function orderIn({ ids }: Siblings, order: readonly string[]): string[] {
  const said = order.filter((id) => ids.includes(id));
  return [...said, ...ids.filter((id) => !said.includes(id))];
}

function moved(order: readonly string[], from: number, to: number): string[] {
  const rest = order.filter((_, place) => place !== from);
  return [...rest.slice(0, to), order[from] ?? '', ...rest.slice(to)];
}

interface LevelProps extends EditorProps {
  level: Siblings;
  order: readonly string[];
  onOrder: (order: readonly string[]) => void;
}

function OrderLevel({ level, order, onOrder, items, statement, names, locked }: LevelProps) {
  const [dragged, setDragged] = useState<string | null>(null);
  const [told, tell] = useState('');
  const present = weighing(items, statement).levels.find(({ groupId }) => groupId === level.groupId);
  const step = (from: number, to: number): void => {
    if (locked || to < 0 || to >= order.length) return;
    onOrder(moved(order, from, to));
    tell(`${nameIn(names, order[from] ?? '')} is now ${to + 1} of ${order.length}.`);
  };
  const over = (to: number): void => {
    const from = dragged === null ? -1 : order.indexOf(dragged);
    if (from >= 0 && from !== to) step(from, to);
  };
  return (
    <>
      <ol className="wt-order">
        {order.map((id, place) => {
          const name = nameIn(names, id);
          const unjudged = present?.unjudged.includes(id);
          return (
            <li
              key={id}
              draggable={!locked}
              data-dragged={dragged === id ? '' : undefined}
              onDragStart={(event) => {
                event.dataTransfer.effectAllowed = 'move';
                event.dataTransfer.setData('text/plain', name);
                setDragged(id);
              }}
              onDragOver={(event) => {
                if (dragged === null) return;
                event.preventDefault();
                over(place);
              }}
              onDrop={(event) => event.preventDefault()}
              onDragEnd={() => setDragged(null)}
            >
              <span className="num wt-place">{formatNumber(place + 1)}</span>
              <button
                type="button"
                className="wt-grip"
                aria-label={`${name}, ${place + 1} of ${order.length}`}
                aria-roledescription="item to move with the arrow keys"
                aria-disabled={locked || undefined}
                onKeyDown={(event) => {
                  if (event.key !== 'ArrowUp' && event.key !== 'ArrowDown') return;
                  event.preventDefault();
                  step(place, place + (event.key === 'ArrowUp' ? -1 : 1));
                }}
              >
                {name}
                {unjudged && <span className="sub">not in the order yet: weight 0</span>}
              </button>
              <span className="num">{formatNumber(present?.weights?.[id] ?? 0, 3)}</span>
              {!locked && (
                <span className="cr-order">
                  <IconButton
                    icon="up"
                    label={`Put ${name} higher`}
                    aria-disabled={place === 0 || undefined}
                    onClick={() => step(place, place - 1)}
                  />
                  <IconButton
                    icon="down"
                    label={`Put ${name} lower`}
                    aria-disabled={place === order.length - 1 || undefined}
                    onClick={() => step(place, place + 1)}
                  />
                </span>
              )}
            </li>
          );
        })}
      </ol>
      <p className="caption">Rank-order centroid weights of this level, summing to 1.</p>
      <p className="sr-only" role="status">
        {told}
      </p>
    </>
  );
}
