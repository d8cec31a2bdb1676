import type { Column } from '#core/csv/columns.ts';
import { foldName } from '#core/csv/codes.ts';
import type { Row } from '#core/csv/outcomes.ts';
import type { Db } from '#db/client.ts';
import { insertCriterion, type CriterionRow } from '#db/queries/criterion.ts';
import type { RecordEntry } from '#server/change-study.ts';
import { presentCriterion } from '#server/criteria/present.ts';
import { AppError } from '#server/errors.ts';

/** As for criteria added one by one. */
const MOST_CRITERIA = 100;

/** A column whose criterion is known, and in what form it takes figures. */
export interface FilledColumn {
  /** The key of its figures in the rows. */
  name: string;
  criterionId: string;
  text: boolean;
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
  for (const { criterion: name, criterionId, unit, kind } of columns) {
    if (name === null) continue;
    const text = kind === 'text';
    if (criterionId !== null) result.columns.push({ name, criterionId, text });
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
      result.columns.push({ name, criterionId: row.id, text });
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

/** A row's figures by criterion id; an empty cell of a column in the file is null. */
export function figuresOf(
  row: Row,
  columns: readonly FilledColumn[],
): Record<string, number | string | null> {
  return Object.fromEntries(
    columns.map(({ name, criterionId, text }) => {
      const value = row.site.values[name];
      if (value === undefined) return [criterionId, null];
      return [criterionId, text ? String(value) : value];
    }),
  );
}
