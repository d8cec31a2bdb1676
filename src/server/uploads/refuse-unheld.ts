import { faultInWords } from '#contract/figure.ts';
import { formatCount } from '#contract/format.ts';
import { figureFaults } from '#core/decision/entered-figure.ts';
import { AppError } from '#server/errors.ts';
import type { FilledColumn } from './criteria.ts';
import type { WrittenFields } from './site-fields.ts';

/**
 * Refuses rows whose figures leave behind a low or high that the study holds and the file has no column for: the
 * file would change one part of a figure and silently break the other.
 * @throws AppError 'invalid' naming each line
 */
export function refuseUnheld(
  rows: readonly { line: number; fields: WrittenFields }[],
  columns: readonly FilledColumn[],
): void {
  const errors = rows.flatMap(({ line, fields: { values, particulars } }) =>
    columns.flatMap(({ name, criterionId }) => {
      const value = values[criterionId];
      const parts = { ...particulars[criterionId], likely: typeof value === 'number' ? value : undefined };
      // A rating's steps were checked when the file was read.
      return figureFaults(parts, false).map((fault) => ({
        path: 'lines',
        message: `Line ${line}, ${name}: ${faultInWords(fault, parts)}`,
      }));
    }),
  );
  const first = errors[0];
  if (!first) return;
  const more = errors.length > 1 ? ` Likewise ${formatCount(errors.length - 1, 'other figure')}.` : '';
  throw new AppError(
    'invalid',
    `${first.message}${more} Add columns for low and high to the file, or leave such lines out. Nothing was written.`,
    { errors },
  );
}
