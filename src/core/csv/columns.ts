import { foldName } from './codes.ts';
import { stripGuard } from './guard.ts';
import {
  isRefusedHeading,
  recognise,
  SITE_FIELDS,
  type ColumnField,
  type Recognised,
  type SiteField,
} from './headings.ts';
import { CriterionNamer, type ExistingCriterion, type FigureKind } from './criterion-columns.ts';
import { belongsTo, partHeading, type ColumnPart } from './figure-parts.ts';
import { MAX_COLUMNS } from './limits.ts';

/** A column of the file and what it is read as. */
export interface Column {
  /** From 0. */
  readonly index: number;
  readonly heading: string;
  readonly field: ColumnField;
  /** Elevation: the unit it is written in. A criterion: the unit its heading gives in brackets, or ''. */
  readonly unit: string | null;
  /** The name of the entered criterion that the column fills. */
  readonly criterion: string | null;
  /** The id of that criterion, where the study has it already; null for one to be made. */
  readonly criterionId: string | null;
  /** Whether that criterion's cells are numbers or texts; null for other columns. */
  readonly kind: FigureKind | null;
  /** Which part of that criterion's figure its cells are; null for other columns. */
  readonly part: ColumnPart | null;
}

/** A changed match: by the column's place from 0, or by its heading. */
export interface ColumnChoice {
  readonly column: number | string;
  readonly field: ColumnField;
}

export interface ColumnOptions {
  readonly choices?: readonly ColumnChoice[] | undefined;
  /** The study's criteria, which columns may fill. */
  readonly criteria?: readonly ExistingCriterion[] | undefined;
}

export type Columns =
  | { readonly kind: 'columns'; readonly columns: readonly Column[] }
  | {
      readonly kind: 'refused';
      readonly code: 'heading' | 'columns';
      readonly message: string;
      /** What was read so far, so that a person can change the match. */
      readonly columns: readonly Column[];
    };

const REQUIRED = { name: 'a name', latitudeDeg: 'a latitude', longitudeDeg: 'a longitude' } as const;

/**
 * Says what each column of a heading is read as: the known fields by their usual headings, every other column with
 * a heading as an entered criterion; then the choices of a person on top.
 *
 * @returns the columns; or why the heading cannot be used: a name, latitude or longitude is missing, or a choice
 * names no column or gives two columns the same field
 */
export function matchColumns(
  heading: readonly string[],
  { choices = [], criteria = [] }: ColumnOptions = {},
): Columns {
  const headings = heading.map((cell) => stripGuard(cell.trim()));
  if (headings.length > MAX_COLUMNS) {
    const message = `The heading has ${headings.length} columns; a file has at most ${MAX_COLUMNS}.`;
    return { kind: 'refused', code: 'heading', message, columns: [] };
  }
  const recognised = headings.map(recognise);
  const fields: ColumnField[] = headings.map((text, i) =>
    isBest(recognised, i)
      ? (recognised[i]?.field ?? 'unused')
      : text === '' || isRefusedHeading(text)
        ? 'unused'
        : 'criterion',
  );
  const wrong = applyChoices(fields, headings, choices);
  const columns = describe(headings, fields, recognised, criteria);
  if (wrong !== undefined) return { kind: 'refused', code: 'columns', message: wrong, columns };
  const missing = missingFields(fields);
  if (missing.length > 0) {
    const message = `The heading names no column for ${missing.map((field) => REQUIRED[field]).join(', ')}.`;
    return { kind: 'refused', code: 'heading', message, columns };
  }
  return { kind: 'columns', columns };
}

function missingFields(fields: readonly ColumnField[]): (keyof typeof REQUIRED)[] {
  return (['name', 'latitudeDeg', 'longitudeDeg'] as const).filter((field) => !fields.includes(field));
}

/** Of several columns recognised as one field, the surest heading is meant, then the first. */
function isBest(recognised: readonly (Recognised | undefined)[], index: number): boolean {
  const own = recognised[index];
  if (own === undefined) return false;
  return recognised.every(
    (other, i) =>
      other?.field !== own.field ||
      i === index ||
      own.rank < other.rank ||
      (own.rank === other.rank && index < i),
  );
}

/** Applies a person's choices; a field they give to one column is taken from the column that had it. */
function applyChoices(
  fields: ColumnField[],
  headings: readonly string[],
  choices: readonly ColumnChoice[],
): string | undefined {
  const given = new Map<SiteField, number>();
  for (const { column, field } of choices) {
    const index = typeof column === 'number' ? column : indexOfHeading(headings, column);
    if (fields[index] === undefined) return `The file has no column “${column}”.`;
    if (isSiteField(field)) {
      if (given.has(field) && given.get(field) !== index) return `Two columns are given to ${field}.`;
      given.set(field, index);
      fields.forEach((other, i) => {
        if (other === field && i !== index) fields[i] = 'unused';
      });
    }
    fields[index] = field;
  }
  return undefined;
}

function indexOfHeading(headings: readonly string[], wanted: string): number {
  const exact = headings.indexOf(wanted.trim());
  return exact >= 0 ? exact : headings.findIndex((text) => foldName(text) === foldName(wanted));
}

function isSiteField(field: ColumnField): field is SiteField {
  return (SITE_FIELDS as readonly string[]).includes(field);
}

function describe(
  headings: readonly string[],
  fields: readonly ColumnField[],
  recognised: readonly (Recognised | undefined)[],
  criteria: readonly ExistingCriterion[],
): Column[] {
  const namer = new CriterionNamer(criteria);
  const isPart = (heading: string, index: number): boolean =>
    fields[index] === 'criterion' && !namer.knows(heading) && partHeading(heading) !== undefined;
  // Lows and highs come after all figures: each is looked for among them.
  const columns = headings.map((heading, index) => {
    const field = fields[index] ?? 'unused';
    if (field === 'criterion') return isPart(heading, index) ? null : figureColumn(namer, heading, index);
    const unit = field === 'elevationM' ? (recognised[index]?.unit ?? feetOrMetres(heading)) : null;
    return { index, heading, field, unit, criterion: null, criterionId: null, kind: null, part: null };
  });
  const mains = columns.filter((column) => column?.part === 'likely').filter((column) => column !== null);
  const taken = new Set<string>();
  return headings.map(
    (heading, index) =>
      columns[index] ?? partColumn(heading, index, mains, taken) ?? figureColumn(namer, heading, index),
  );
}

function figureColumn(namer: CriterionNamer, heading: string, index: number): Column {
  const { id, name, unit, kind } = namer.name(heading, index);
  return { index, heading, field: 'criterion', unit, criterion: name, criterionId: id, kind, part: 'likely' };
}

/** The low or high of a column of figures; undefined where there is no such column, or it has one already. */
function partColumn(
  heading: string,
  index: number,
  mains: readonly Column[],
  taken: Set<string>,
): Column | undefined {
  const read = partHeading(heading);
  if (read === undefined) return undefined;
  const main = mains.find((one) => one.kind !== 'text' && belongsTo(read, one.heading, one.unit ?? ''));
  const place = main && `${main.index} ${read.part}`;
  if (place === undefined || taken.has(place)) return undefined;
  taken.add(place);
  return main && { ...main, index, heading, part: read.part };
}

function feetOrMetres(heading: string): 'm' | 'ft' {
  return /(?:^|[^\p{L}])(?:ft|feet|foot)(?:$|[^\p{L}])/iu.test(heading) ? 'ft' : 'm';
}
