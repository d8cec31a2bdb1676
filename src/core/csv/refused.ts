import { writeCsv } from './export.ts';
import { stripGuard } from './guard.ts';
import { REFUSED_HEADINGS } from './headings.ts';
import type { Row } from './outcomes.ts';
import type { SitesFile } from './read-sites.ts';

/**
 * The refused rows of a file as a file of their own, to be put right and uploaded: the cells as they were, in the
 * same columns and with the same separator, then each row's line and reasons, which the reader passes over.
 */
export function writeRefused({ columns, rows, delimiter }: SitesFile): string {
  const refused = rows.filter((row) => row.outcome === 'refused');
  const lines = refused.map((row) => [
    ...columns.map(({ index }) => stripGuard(row.cells[index] ?? '')),
    row.line,
    refusalsOf(row).join(' '),
  ]);
  return writeCsv([[...columns.map((column) => column.heading), ...REFUSED_HEADINGS], ...lines], delimiter);
}

/** Why a row is refused, in words; what else there is to say of it can wait until it stands. */
export function refusalsOf({ reasons }: Row): string[] {
  return reasons.filter((reason) => reason.severity === 'refusal').map((reason) => reason.message);
}
