import { formatCount, formatNumber } from '#contract/format.ts';
import type { UploadCommit, UploadCommitted } from '#contract/upload.ts';
import type { Column } from '#core/csv/columns.ts';
import type { ColumnField } from '#core/csv/headings.ts';
import type { Row } from '#core/csv/outcomes.ts';
import { countStates, type RowState } from './row-filter.ts';

export type Duplicates = UploadCommit['duplicates'];

export const FIELD_NAMES: Readonly<Record<ColumnField, string>> = {
  name: 'Name',
  code: 'Code',
  latitudeDeg: 'Latitude',
  longitudeDeg: 'Longitude',
  elevationM: 'Elevation',
  permittedAzimuthsDeg: 'Permitted azimuths',
  notes: 'Notes',
  criterion: 'Criterion',
  unused: 'Not used',
};

export const STATE_WORDS: Readonly<Record<RowState, string>> = {
  refused: 'Refused',
  changed: 'Changed',
  warned: 'Accepted, look at it',
  duplicate: 'In the study',
  accepted: 'Accepted',
};

export const ENCODING_NAMES = {
  'utf-8': 'UTF-8',
  'utf-16le': 'UTF-16 little-endian',
  'utf-16be': 'UTF-16 big-endian',
  'windows-1252': 'Windows-1252',
} as const;

export const DELIMITER_NAMES = { ',': 'Comma', ';': 'Semicolon', '\t': 'Tab' } as const;

/** The unit a column is read in: what stands in the file, and what becomes of it. */
export function unitOf({ field, unit, kind }: Column): string {
  if (field === 'unused') return '';
  if (field === 'elevationM') return unit === 'ft' ? 'ft → m' : 'm';
  if (field === 'criterion')
    return kind === 'text' ? 'text' : kind === 'rating' ? 'steps 0 to 4' : unit || (kind ?? '');
  return field === 'name' || field === 'code' || field === 'notes' ? 'text' : '°';
}

/** What a column of figures fills: "Cost, of this study", "low of Cost". */
export function criterionWords({ criterion, criterionId, part }: Column): string {
  if (part === 'low' || part === 'high') return `${part} of ${criterion ?? ''}`;
  return `${criterion ?? ''}, ${criterionId === null ? 'a new criterion' : 'of this study'}`;
}

/** "12 rows read: 8 accepted, 1 changed, 3 refused." */
export function countsInWords(rows: readonly Row[]): string {
  const counts = countStates(rows);
  const parts = [
    `${formatNumber(counts.accepted + counts.warned)} accepted`,
    counts.changed > 0 && `${formatNumber(counts.changed)} changed`,
    counts.duplicate > 0 && `${formatNumber(counts.duplicate)} in the study already`,
    `${formatNumber(counts.refused)} refused`,
  ];
  return `${formatCount(rows.length, 'row')} read: ${parts.filter((part) => part !== false).join(', ')}.`;
}

/** What the commit button does: "Add 9 good rows", "Add 9 rows and update 2 sites". */
export function commitLabel(chosen: readonly Row[], duplicates: Duplicates, all: boolean): string {
  const repeated = chosen.filter((row) => row.outcome === 'duplicate').length;
  const fresh = chosen.length - repeated + (duplicates === 'add' ? repeated : 0);
  const rows = formatCount(fresh, all ? 'good row' : 'chosen row');
  if (duplicates !== 'update' || repeated === 0) return `Add ${rows}`;
  const sites = formatCount(repeated, 'site');
  return fresh === 0 ? `Update ${sites}` : `Add ${rows}, update ${sites}`;
}

/** "9 sites added and 2 updated from candidates.csv". */
export function doneInWords({ added, updated }: UploadCommitted, fileName: string): string {
  const parts = [
    added > 0 && `${formatCount(added, 'site')} added`,
    updated > 0 &&
      (added > 0 ? `${formatNumber(updated)} updated` : `${formatCount(updated, 'site')} updated`),
  ].filter((part) => part !== false);
  return `${parts.length > 0 ? parts.join(' and ') : 'Nothing changed'} from ${fileName}`;
}
