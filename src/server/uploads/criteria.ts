import type { Column } from '#core/csv/columns.ts';
import { foldName } from '#core/csv/codes.ts';
import type { Row } from '#core/csv/outcomes.ts';
import type { Db } from '#db/client.ts';
import { insertCriterion, type CriterionRow } from '#db/queries/criterion.ts';
import type { RecordEntry } from '#server/change-study.ts';
import { presentCriterion } from '#server/criteria/present.ts';
import { AppError } from '#server/errors.ts';
import type { Figures, FiguresPatch } from '#server/sites/entered-figures.ts';

/** As for criteria added one by one. */
const MOST_CRITERIA = 100;

/** A column whose criterion is known, and in what form it takes figures. */
export interface FilledColumn {
  /** The key of its figures in the rows. */
  name: string;
  criterionId: string;
  text: boolean;
  /** Whether the file has a column of the figures' lows, and of their highs. */
  low: boolean;
  high: boolean;
}

export interface MadeCriteria {
  columns: FilledColumn[];
  /** Criteria that did not exist before, with the version they were made at. */
  made: { id: string; version: number }[];
  entries: RecordEntry[];
}

/**
 * Finds or makes the entered criterion of every column that holds a figure in the chosen rows. A new one weighs
 * nothing until it is given points, and counts more as better until someone says otherwise.
 * @throws AppError 'invalid' where the study would have too many
 */
export async function fillCriteria(
  tx: Db,
  {
    studyId,
    columns,
    rows,
    existing,
  }: { studyId: string; columns: readonly Column[]; rows: readonly Row[]; existing: readonly CriterionRow[] },
): Promise<MadeCriteria> {
  const result: MadeCriteria = { columns: [], made: [], entries: [] };
  for (const { criterion: name, criterionId, unit, kind, part } of columns) {
    if (name === null || part !== 'likely') continue;
    const has = (one: Column['part']): boolean =>
      columns.some((column) => column.criterion === name && column.part === one);
    const text = kind === 'text';
    const filled = { name, text, low: has('low'), high: has('high') };
    if (criterionId !== null) result.columns.push({ ...filled, criterionId });
    else if (rows.some((row) => name in row.site.values)) {
      if (existing.length + result.made.length >= MOST_CRITERIA)
        throw new AppError('invalid', `A study has up to ${MOST_CRITERIA} criteria. Nothing was added.`);
      const values = {
        name,
        nameKey: foldName(name),
        unit: unit ?? '',
        direction: 'more' as const,
        source: text ? ('text' as const) : ('entered' as const),
      };
      const row = await insertCriterion(tx, { studyId, values });
      result.columns.push({ ...filled, criterionId: row.id });
      result.made.push({ id: row.id, version: row.version });
      result.entries.push({
        object: 'criterion',
        objectId: row.id,
        action: 'add',
        to: presentCriterion(row),
      });
    }
  }
  return result;
}

/**
 * What a row makes of a site's figures: an empty cell of a column in the file takes its figure, low or high away;
 * what the file has no column for, stays.
 */
export function figuresPatch(
  row: Row,
  columns: readonly FilledColumn[],
  before: Figures,
): Required<FiguresPatch> {
  const values: Required<FiguresPatch>['values'] = {};
  const particulars: Required<FiguresPatch>['particulars'] = {};
  for (const { name, criterionId, text, low, high } of columns) {
    const value = row.site.values[name];
    values[criterionId] = value === undefined ? null : text ? String(value) : value;
    if (value === undefined || !(low || high)) continue;
    const { low: lowRead, high: highRead } = row.site.particulars[name] ?? {};
    particulars[criterionId] = {
      ...before.particulars[criterionId],
      ...(low ? { low: lowRead } : {}),
      ...(high ? { high: highRead } : {}),
    };
  }
  return { values, particulars };
}
