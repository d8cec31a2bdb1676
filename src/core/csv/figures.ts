import { figureFaults, type FigureFault } from '../decision/entered-figure.ts';
import { foldName } from './codes.ts';
import type { Column } from './columns.ts';
import type { ExistingCriterion, FigureKind } from './criterion-columns.ts';
import { stripGuard } from './guard.ts';
import { readNumber, shown } from './numbers.ts';
import type { ReadRow } from './outcomes.ts';
import { refusal, warning } from './reasons.ts';

interface FigureOptions {
  readonly criteria: readonly ExistingCriterion[];
  readonly decimalComma: boolean;
}

/** A criterion's column with what its figures are. */
interface Settled extends Column {
  readonly criterion: string;
  readonly kind: FigureKind;
  readonly steps: readonly string[];
  readonly decimalComma: boolean;
}

/**
 * Says of each criterion's column whether it holds numbers, steps of a rating or texts, by the study's criterion or
 * else by what most of its filled cells are, and sees to the rest: a step may be given by its name; in a column of
 * texts a cell such as 007 stays as it was given; in one of numbers a text stays too, with a warning, because it
 * counts as no figure. Then lows and highs are read, and a row is refused where they do not hold their figure.
 *
 * @returns the columns with their kind; an empty column holds numbers
 */
export function settleFigures(
  rows: readonly ReadRow[],
  columns: readonly Column[],
  { criteria, decimalComma }: FigureOptions,
): Column[] {
  const steps = new Map(criteria.map((one) => [one.id, one.steps ?? []]));
  const settled = new Map<string, Settled>();
  for (const column of columns) {
    const { criterion } = column;
    if (criterion === null || column.part !== 'likely') continue;
    const kind = column.kind ?? commonKind(rows, criterion);
    const one = {
      ...column,
      criterion,
      kind,
      steps: steps.get(column.criterionId ?? '') ?? [],
      decimalComma,
    };
    settleLikely(rows, one);
    settled.set(criterion, one);
  }
  for (const column of columns) {
    const main = settled.get(column.criterion ?? '');
    if (main && (column.part === 'low' || column.part === 'high'))
      readBounds(rows, { ...main, index: column.index }, column.part);
  }
  for (const main of settled.values()) refuseFaults(rows, main);
  return columns.map((column) => ({ ...column, kind: settled.get(column.criterion ?? '')?.kind ?? null }));
}

function commonKind(rows: readonly ReadRow[], criterion: string): FigureKind {
  const filled = rows.filter((row) => criterion in row.site.values);
  const texts = filled.filter((row) => typeof row.site.values[criterion] === 'string');
  return texts.length * 2 > filled.length ? 'text' : 'number';
}

const cellOf = (row: ReadRow, { index }: Column): string => stripGuard((row.cells[index] ?? '').trim());

function settleLikely(rows: readonly ReadRow[], column: Settled): void {
  const { criterion, kind } = column;
  for (const row of rows) {
    const read = row.site.values[criterion];
    if (read === undefined || (typeof read === 'number' && kind !== 'text')) continue;
    const text = cellOf(row, column);
    const value = kind === 'text' ? text : (readFigure(text, column) ?? text);
    row.site.values[criterion] = value;
    if (kind === 'text' || typeof value === 'number') continue;
    const message = `${criterion}: “${shown(text)}” is ${noFigure(kind)} and counts as no figure.`;
    row.reasons.push(warning('text-figure', criterion, message));
  }
}

/** A number, or a step's number by its name. */
function readFigure(text: string, { steps, decimalComma }: Settled): number | undefined {
  const value = readNumber(text, decimalComma);
  if (value !== undefined) return value;
  const step = steps.findIndex((name) => foldName(name) === foldName(text));
  return step < 0 ? undefined : step;
}

function readBounds(rows: readonly ReadRow[], column: Settled, part: 'low' | 'high'): void {
  const { criterion, kind } = column;
  for (const row of rows) {
    const text = cellOf(row, column);
    if (text === '') continue;
    const value = kind === 'text' ? undefined : readFigure(text, column);
    const where = `${criterion} ${part}`;
    if (value !== undefined)
      row.site.particulars[criterion] = { ...row.site.particulars[criterion], [part]: value };
    else if (kind === 'text')
      row.reasons.push(warning('low-high', criterion, `${criterion} is a text; its ${part} is left out.`));
    else
      row.reasons.push(
        refusal('not-a-number', criterion, `${where}: “${shown(text)}” is ${noFigure(kind)}.`),
      );
  }
}

const noFigure = (kind: FigureKind): string => (kind === 'rating' ? 'none of its steps' : 'no number');

function refuseFaults(rows: readonly ReadRow[], { criterion, kind }: Settled): void {
  if (kind === 'text') return;
  for (const row of rows) {
    const value = row.site.values[criterion];
    const bounds = row.site.particulars[criterion];
    if (bounds === undefined && kind !== 'rating') continue;
    const parts = {
      ...bounds,
      likely: typeof value === 'number' ? value : undefined,
    };
    for (const fault of figureFaults(parts, kind === 'rating')) {
      const code = fault.kind === 'no-step' ? 'out-of-range' : 'low-high';
      row.reasons.push(refusal(code, criterion, `${criterion}: ${faultWords(fault, parts)}`));
    }
  }
}

type Parts = Readonly<Partial<Record<FigureFault['part'], number | undefined>>>;

function faultWords({ part, kind }: FigureFault, parts: Parts): string {
  const text = shown(String(parts[part]));
  const likely = shown(String(parts.likely));
  switch (kind) {
    case 'no-step':
      return `${text} is none of the steps 0 to 4.`;
    case 'no-figure':
      return `${part} ${text} has no figure to belong to.`;
    case 'low-above':
      return `low ${text} is above the figure, ${likely}.`;
    case 'high-below':
      return `high ${text} is below the figure, ${likely}.`;
  }
}
