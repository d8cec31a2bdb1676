import { foldName } from '#core/csv/codes.ts';
import type { Column } from '#core/csv/columns.ts';
import type { Row } from '#core/csv/outcomes.ts';
import type { SiteFields, SiteRow } from '#db/queries/site.ts';
import { patchedFigures, type Figures } from '#server/sites/entered-figures.ts';
import { figuresPatch, type FilledColumn } from './criteria.ts';

/** A site's own columns, without what links it to an upload. */
export type WrittenFields = Required<Omit<SiteFields, 'uploadId'>>;

/** The fields of a row that is not refused: all of it was read. */
export function newFields(
  { row, code, name }: { row: Row; code: string; name: string },
  filled: readonly FilledColumn[],
): WrittenFields {
  const { latitudeDeg, longitudeDeg, elevationM, permittedAzimuthsDeg, notes } = row.site;
  if (latitudeDeg === null || longitudeDeg === null || permittedAzimuthsDeg === null)
    throw new RangeError(`newFields: line ${row.line} was not read whole`);
  return {
    code,
    name,
    nameKey: foldName(name),
    latitudeDeg,
    longitudeDeg,
    elevationM: elevationM ?? 0,
    permittedAzimuthsDeg: permittedAzimuthsDeg.map(([from, to]) => [from, to]),
    notes,
    ...filledFigures(row, filled, { values: {}, particulars: {} }),
  };
}

/**
 * A site of the study with a row written over it: the columns in the file as they are there, empty cells emptying
 * what they stand for; what the file has no column for stays.
 */
export function updatedFields(
  { row, before }: { row: Row; before: SiteRow },
  columns: readonly Column[],
  filled: readonly FilledColumn[],
): WrittenFields {
  const read = newFields({ row, code: row.site.code ?? before.code, name: row.site.name }, filled);
  const has = (field: Column['field']): boolean => columns.some((column) => column.field === field);
  return {
    ...read,
    elevationM: has('elevationM') ? read.elevationM : before.elevationM,
    permittedAzimuthsDeg: has('permittedAzimuthsDeg')
      ? read.permittedAzimuthsDeg
      : before.permittedAzimuthsDeg,
    notes: has('notes') ? read.notes : before.notes,
    ...filledFigures(row, filled, before),
  };
}

/** A site as its columns, for writing it back as it was. */
export function fieldsOf({ id: _id, studyId: _study, version: _version, ...row }: SiteRow): WrittenFields {
  return { ...row, nameKey: foldName(row.name) };
}

const filledFigures = (row: Row, filled: readonly FilledColumn[], before: Figures): Figures =>
  patchedFigures(before, figuresPatch(row, filled, before));
