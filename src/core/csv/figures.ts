import type { Column } from './columns.ts';
import { stripGuard } from './guard.ts';
import { shown } from './numbers.ts';
import type { ReadRow } from './outcomes.ts';
import { warning } from './reasons.ts';

/**
 * Says of each criterion's column whether it holds numbers or texts, by the study's criterion or else by what most of
 * its filled cells are, and sees to the rest: in a column of texts a cell such as 007 stays as it was given; in one of numbers a text stays too,
 * with a warning, because it counts as no figure.
 *
 * @returns the columns with their kind; an empty column holds numbers
 */
export function settleFigures(rows: readonly ReadRow[], columns: readonly Column[]): Column[] {
  return columns.map((column) => {
    const { criterion } = column;
    if (criterion === null) return column;
    const filled = rows.filter((row) => criterion in row.site.values);
    const texts = filled.filter((row) => typeof row.site.values[criterion] === 'string');
    const kind = column.kind ?? (texts.length * 2 > filled.length ? 'text' : 'number');
    for (const row of kind === 'text' ? filled : texts) {
      const text = stripGuard((row.cells[column.index] ?? '').trim());
      if (kind === 'text') row.site.values[criterion] = text;
      else
        row.reasons.push(
          warning(
            'text-figure',
            criterion,
            `${criterion}: “${shown(text)}” is no number and counts as no figure.`,
          ),
        );
    }
    return { ...column, kind };
  });
}
