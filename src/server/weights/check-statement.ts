import { formatCount, listInWords } from '#contract/format.ts';
import type { WeightStatement } from '#contract/weights.ts';
import { missingPairs } from '#core/decision/judgements.ts';
import { MOST_COMPARED } from '#core/decision/pairwise.ts';
import { levelsOf, type Siblings, type WeighItem } from '#core/decision/statement.ts';
import { FULL_SWING } from '#core/decision/swing.ts';
import { AppError, type FieldError } from '#server/errors.ts';

interface Known {
  items: readonly WeighItem[];
  /** Names of the study's criteria and groups, by id. */
  names: ReadonlyMap<string, string>;
  /** What the set said before: ids in it may be of criteria removed meanwhile. */
  before: WeightStatement;
}

/** Refuses a statement that weights cannot be worked out from. @throws AppError 'invalid' */
export function checkStatement(statement: WeightStatement, known: Known): void {
  const unknown = unknownIds(statement, known);
  const errors = unknown.length > 0 ? unknown : faultsOf(statement, known);
  const [first] = errors;
  if (!first) return;
  throw new AppError('invalid', `${first.message} Nothing was saved.`, { errors });
}

const idsOf = ({ points, order, judgements }: WeightStatement): { path: string; id: string }[] => [
  ...Object.keys(points).map((id) => ({ path: `points.${id}`, id })),
  ...order.map((id, place) => ({ path: `order.${place}`, id })),
  ...judgements.flatMap(([a, b], place) => [
    { path: `judgements.${place}.0`, id: a },
    { path: `judgements.${place}.1`, id: b },
  ]),
];

function unknownIds(statement: WeightStatement, { names, before }: Known): FieldError[] {
  const earlier = new Set(idsOf(before).map(({ id }) => id));
  return idsOf(statement)
    .filter(({ id }) => !names.has(id) && !earlier.has(id))
    .map(({ path }) => ({ path, message: 'This is no weighed criterion or group of the study.' }));
}

function faultsOf(statement: WeightStatement, known: Known): FieldError[] {
  const levels = levelsOf(known.items).filter(({ ids }) => ids.length > 1);
  if (statement.method === 'swing') return levels.flatMap((level) => swingFaults(level, statement, known));
  if (statement.method === 'centroid') return orderFaults(statement, known);
  return statement.method === 'pairwise' ? pairwiseFaults(levels, statement, known) : [];
}

/** "the criteria of Costs", or all that stands at the top. */
const nameOf = ({ groupId }: Siblings, { names }: Known): string =>
  groupId === null ? 'the groups and single criteria' : `the criteria of ${names.get(groupId) ?? 'a group'}`;

function swingFaults(level: Siblings, { points }: WeightStatement, known: Known): FieldError[] {
  const given = level.ids.filter((id) => Object.hasOwn(points, id));
  const largest = given.reduce((most, id) => Math.max(most, points[id] ?? 0), 0);
  if (given.length === 0 || largest === FULL_SWING) return [];
  const message = `The swing that matters most of ${nameOf(level, known)} has ${FULL_SWING}; here the most is ${largest}.`;
  return [{ path: `points.${given[0] ?? ''}`, message }];
}

function orderFaults({ order }: WeightStatement, { items, names }: Known): FieldError[] {
  const twice = order.flatMap((id, place) =>
    order.indexOf(id) === place
      ? []
      : [{ path: `order.${place}`, message: `The order names ${names.get(id) ?? id} twice.` }],
  );
  if (twice.length > 0) return twice;
  const asked = levelsOf(items).flatMap(({ ids }) => ids);
  const left = asked.filter((id) => !order.includes(id)).map((id) => names.get(id) ?? id);
  return left.length === 0 ? [] : [{ path: 'order', message: `The order leaves out ${listInWords(left)}.` }];
}

function pairwiseFaults(
  levels: readonly Siblings[],
  { judgements }: WeightStatement,
  known: Known,
): FieldError[] {
  const long = levels.filter(({ ids }) => ids.length > MOST_COMPARED);
  if (long.length > 0)
    return long.map((level) => ({
      path: 'judgements',
      message: `Up to ${MOST_COMPARED} things can be compared by pairs: ${nameOf(level, known)} are ${level.ids.length}.`,
    }));
  const misplaced = judgementFaults(levels, judgements, known);
  if (misplaced.length > 0) return misplaced;
  const missing = levels.flatMap(({ ids }) => missingPairs(ids, judgements));
  const [first] = missing;
  if (!first) return [];
  const [a, b] = first.map((id) => known.names.get(id) ?? id);
  const message = `${formatCount(missing.length, 'judgement')} missing, the first ${a} against ${b}.`;
  return [{ path: 'judgements', message }];
}

/** Pairs judged twice, and things of different levels judged against each other. */
function judgementFaults(
  levels: readonly Siblings[],
  judgements: WeightStatement['judgements'],
  { names }: Known,
): FieldError[] {
  const levelOf = new Map(levels.flatMap(({ groupId, ids }) => ids.map((id) => [id, groupId] as const)));
  const judged = new Set<string>();
  return judgements.flatMap(([a, b], place) => {
    const pair = [a, b].sort().join(' ');
    const again = a === b || judged.has(pair);
    judged.add(pair);
    const words = `${names.get(a) ?? a} against ${names.get(b) ?? b}`;
    if (again) return [{ path: `judgements.${place}`, message: `${words} is judged twice.` }];
    const apart = levelOf.has(a) && levelOf.has(b) && levelOf.get(a) !== levelOf.get(b);
    return apart
      ? [{ path: `judgements.${place}`, message: `${words}: these do not stand on the same level.` }]
      : [];
  });
}
