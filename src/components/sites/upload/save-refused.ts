import type { SitesFile } from '#core/csv/read-sites.ts';
import { writeRefused } from '#core/csv/refused.ts';

/** Hands the refused rows over as a file; the mark at its head tells spreadsheets that it is UTF-8. */
export function saveRefused(file: SitesFile, fileName: string): void {
  const address = URL.createObjectURL(
    new Blob(['\ufeff', writeRefused(file)], { type: 'text/csv;charset=utf-8' }),
  );
  const link = document.createElement('a');
  link.href = address;
  link.download = `${fileName.replace(/\.[^.]*$/, '')}-refused.csv`;
  link.click();
  // The download has taken the address by the next turn of the loop.
  setTimeout(() => URL.revokeObjectURL(address));
}
