import { CodeMaker, foldCode, foldName, isCode } from './codes.ts';
import { NearIndex, type Position } from './near.ts';
import { note, refusal, warning, type Reason } from './reasons.ts';
import type { SiteReading } from './row.ts';
import { columnsLookSwapped, Neighbourhoods, refusedAsSwapped, SWAPPED } from './swapped.ts';

/** A site that the study already has. */
export interface ExistingSite extends Position {
  readonly id: string;
  readonly code: string;
  readonly name: string;
}

export type Outcome = 'new' | 'duplicate' | 'refused';

/** One row of the file and what would become of it. */
export interface Row {
  /** The physical line it begins on, from 1, the heading included. */
  readonly line: number;
  readonly outcome: Outcome;
  readonly reasons: readonly Reason[];
  readonly site: SiteReading;
  /** The study's site that a duplicate is of. */
  readonly duplicateOf: string | null;
  /** The cells as they stand in the file. */
  readonly cells: readonly string[];
}

/** A row read by itself. */
export interface ReadRow {
  readonly line: number;
  readonly cells: readonly string[];
  readonly site: SiteReading;
  readonly reasons: Reason[];
}

interface Place extends Position {
  readonly name: string;
  readonly line: number | null;
  readonly id: string | null;
}

/**
 * Sets the rows of a file against each other and against the study's sites, and says what becomes of each.
 *
 * A row that is refused claims neither its name nor its code, so that a second, good row of that name stands.
 * Codes are made once all given ones are known. Takes time in proportion to the rows.
 */
export function settleRows(rows: readonly ReadRow[], existing: readonly ExistingSite[]): Row[] {
  const duplicates = claimNames(rows, existing);
  makeCodes(rows, existing, duplicates);
  const good = rows.filter((row) => !isRefused(row));
  warnNear(good, existing, duplicates);
  warnSwapped(rows, good, existing);
  return rows.map((row) => {
    const duplicateOf = isRefused(row) ? undefined : duplicates.get(row);
    const outcome = isRefused(row) ? 'refused' : duplicateOf === undefined ? 'new' : 'duplicate';
    const { line, cells, site, reasons } = row;
    return { line, outcome, reasons, site, duplicateOf: duplicateOf?.id ?? null, cells };
  });
}

function isRefused(row: ReadRow): boolean {
  return row.reasons.some((reason) => reason.severity === 'refusal');
}

/** Refuses names and codes that are taken; answers which row repeats which site of the study. */
function claimNames(rows: readonly ReadRow[], existing: readonly ExistingSite[]): Map<ReadRow, ExistingSite> {
  const studyNames = new Map(existing.map((site) => [foldName(site.name), site]));
  const studyCodes = new Map(existing.map((site) => [foldCode(site.code), site]));
  const fileNames = new Map<string, ReadRow>();
  const fileCodes = new Map<string, ReadRow>();
  const duplicates = new Map<ReadRow, ExistingSite>();
  for (const row of rows) {
    if (isRefused(row)) continue;
    const name = foldName(row.site.name);
    const code = row.site.code === null ? null : foldCode(row.site.code);
    const same = studyNames.get(name);
    const twin = fileNames.get(name);
    if (twin !== undefined) {
      const message = `${row.site.name} is also on line ${twin.line}. One row a site.`;
      row.reasons.push(refusal('duplicate-in-file', 'name', message));
    }
    if (code !== null)
      refuseTakenCode(row, code, { same, owner: studyCodes.get(code), other: fileCodes.get(code) });
    if (isRefused(row)) continue;
    fileNames.set(name, row);
    if (code !== null) fileCodes.set(code, row);
    if (same === undefined) continue;
    duplicates.set(row, same);
    row.reasons.push(note('duplicate', 'name', `${same.name} (${same.code}) is already in the study.`));
  }
  return duplicates;
}

function refuseTakenCode(
  row: ReadRow,
  code: string,
  { same, owner, other }: { same?: ExistingSite; owner?: ExistingSite; other?: ReadRow },
): void {
  const holder =
    owner !== undefined && owner !== same
      ? owner.name
      : other === undefined
        ? undefined
        : `${other.site.name} on line ${other.line}`;
  if (holder === undefined) return;
  row.reasons.push(
    refusal('code-taken', 'code', `Code ${code} is taken by ${holder}. Give this row another code.`),
  );
}

function makeCodes(
  rows: readonly ReadRow[],
  existing: readonly ExistingSite[],
  duplicates: ReadonlyMap<ReadRow, ExistingSite>,
): void {
  const given = rows.map((row) => row.site.code).filter((code) => code !== null && isCode(code));
  const maker = new CodeMaker([
    ...existing.map((site) => site.code),
    ...given.filter((code) => code !== null),
  ]);
  for (const row of rows) {
    if (row.site.code !== null || isRefused(row)) continue;
    row.site.code = duplicates.get(row)?.code ?? maker.make(row.site.name);
  }
}

function warnNear(
  good: readonly ReadRow[],
  existing: readonly ExistingSite[],
  duplicates: ReadonlyMap<ReadRow, ExistingSite>,
): void {
  const index = new NearIndex<Place>();
  for (const site of existing) index.add({ ...site, line: null });
  for (const row of good) index.add(placeOf(row));
  for (const row of good) {
    const own = duplicates.get(row)?.id;
    const found = index.find(
      placeOf(row),
      (place) => place.line !== row.line && (own === undefined || place.id !== own),
    );
    if (found === undefined) continue;
    const where = found.place.line === null ? '' : ` on line ${found.place.line}`;
    const message = `${Math.round(found.distanceKm * 1000)} m from ${found.place.name}${where}: less than 1 km.`;
    row.reasons.push(warning('near', null, message));
  }
}

function warnSwapped(
  rows: readonly ReadRow[],
  good: readonly ReadRow[],
  existing: readonly ExistingSite[],
): void {
  const all = columnsLookSwapped(rows.map((row) => row.site));
  const places = new Neighbourhoods();
  for (const site of existing) places.add(site);
  for (const row of good) places.add(placeOf(row));
  for (const row of rows) {
    const swapped = isRefused(row)
      ? refusedAsSwapped(row.site, row.reasons)
      : all || places.looksSwapped(placeOf(row));
    if (swapped) row.reasons.push(SWAPPED);
  }
}

/** Where a good row lies; its coordinates were read, else it would be refused. */
function placeOf(row: ReadRow): Place {
  const { latitudeDeg, longitudeDeg, name } = row.site;
  return { latitudeDeg: latitudeDeg ?? 0, longitudeDeg: longitudeDeg ?? 0, name, line: row.line, id: null };
}
