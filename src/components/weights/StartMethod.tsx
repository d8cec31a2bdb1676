import { useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { ConfirmDialog } from '#components/ui/Dialog.tsx';
import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import type { WeightStatement } from '#contract/weights.ts';
import { MOST_COMPARED } from '#core/decision/pairwise.ts';
import { emptyStatement, evenStatement, fromPresent, missingOf, tooLong } from './statement.ts';
import type { MethodDesk } from './use-method-desk.ts';
import { levelInWords, METHOD_NAMES, METHOD_WAYS, type Names } from './words.ts';

interface StartProps {
  desk: MethodDesk;
  names: Names;
  locked: boolean;
}

/** Where the method on the desk has not been begun: what the weights rest on now, and how to begin. */
export function StartMethod({ desk, names, locked }: StartProps) {
  const { method, items, set } = desk;
  const [anew, setAnew] = useState(false);
  const now = set.statement;
  const present = fromPresent(method, items, now);
  const earlier = earlierOf(desk);
  const long = method === 'pairwise' ? tooLong(items) : [];
  const losing = losesPoints(desk);
  const fresh = method === 'points' ? evenStatement(items) : emptyStatement(method, now);
  const freshLabel = method === 'points' ? 'Begin with equal points' : 'Begin with nothing said';
  const begin = (statement: WeightStatement): void => {
    setAnew(false);
    // What lacks something is held; by order, nothing said yet is no start.
    if (missingOf(items, statement)) set.hold(method, statement);
    else desk.say(statement);
  };
  if (long.length > 0)
    return (
      <div className="box">
        <p className="box-fact">Too many to compare by pairs</p>
        <p className="box-text">
          Up to {MOST_COMPARED} can be compared with one another;{' '}
          {listInWords(
            long.map(
              ({ groupId, ids }) =>
                `“${levelInWords(groupId, names, true)}” holds ${formatNumber(ids.length)}`,
            ),
          )}
          . Put criteria into groups, or set weights another way.
        </p>
      </div>
    );
  return (
    <div className="box">
      <p className="box-fact">These weights are set by {METHOD_WAYS[now.method]}</p>
      <p className="box-text">
        {locked
          ? 'Nothing has been said by this way.'
          : 'They stay as they are until you begin here and nothing is missing.'}
      </p>
      {!locked && (
        <div className="box-acts">
          {present && (
            <Button size="small" onClick={() => begin(present)}>
              {presentLabel(desk)}
            </Button>
          )}
          {earlier && (
            <Button size="small" onClick={() => begin(earlier.statement)}>
              {earlier.label}
            </Button>
          )}
          {method !== 'centroid' && (
            <Button size="small" onClick={() => (losing ? setAnew(true) : begin(fresh))}>
              {freshLabel}
            </Button>
          )}
          {method === 'centroid' && !present && (
            <Button size="small" onClick={() => begin(asListed(desk))}>
              Start from the order listed
            </Button>
          )}
        </div>
      )}
      <ConfirmDialog
        open={anew}
        onClose={() => setAnew(false)}
        onConfirm={() => begin(fresh)}
        title={`${freshLabel}?`}
        confirm={freshLabel}
      >
        <p>
          {METHOD_NAMES.points} and {METHOD_NAMES.swing.toLowerCase()} share one list of figures. The{' '}
          {METHOD_WAYS[now.method]} of this set{' '}
          {method === 'points'
            ? 'are replaced at once.'
            : 'are replaced once all swings are judged; until then they count as before.'}
        </p>
      </ConfirmDialog>
    </div>
  );
}

const LABELS = {
  points: 'Start from the present weights',
  swing: 'Start from the present weights',
  pairwise: 'Start from the present weights, in whole judgements',
  centroid: 'Start from the present order',
} as const;
const presentLabel = ({ method }: MethodDesk): string => LABELS[method];

const bySum = (method: string): boolean => method === 'points' || method === 'swing';

/** Points and swings stand in one list, so that either takes the other’s place. */
const losesPoints = ({ method, set }: MethodDesk): boolean =>
  bySum(method) && bySum(set.statement.method) && Object.keys(set.statement.points).length > 0;

/** What the set still holds from when it was last set this way. */
function earlierOf({ method, set }: MethodDesk): { label: string; statement: WeightStatement } | null {
  const { points, order, judgements } = set.statement;
  const statement = { ...set.statement, method };
  if (method === 'pairwise' && judgements.length > 0)
    return { label: `Take up ${formatCount(judgements.length, 'earlier judgement')}`, statement };
  if (method === 'centroid' && order.length > 0) return { label: 'Take up the earlier order', statement };
  const given = Object.values(points).some((one) => one > 0);
  return method === 'points' && !bySum(set.statement.method) && given
    ? { label: 'Take up the earlier points', statement }
    : null;
}

const asListed = ({ items, set }: MethodDesk): WeightStatement => ({
  ...set.statement,
  method: 'centroid',
  order: [...new Set(items.flatMap(({ id, groupId }) => (groupId === null ? [id] : [groupId, id])))],
});
