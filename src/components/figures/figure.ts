import type { Criterion } from '#contract/criterion.ts';
import { faultInWords, isUncertain } from '#contract/figure.ts';
import { formatFull, formatNumber, readTypedNumber } from '#contract/format.ts';
import { stepInWords } from '#contract/rating.ts';
import type { FigureParticulars, Site, SitePatch } from '#contract/site.ts';
import { figureFaults } from '#core/decision/entered-figure.ts';

/** An entered figure with what is known of it; `value` null where there is none. */
export interface Entry {
  value: number | null;
  known: FigureParticulars;
}

/** Figures that people enter: numbers and ratings. */
export const isEntered = ({ source }: Pick<Criterion, 'source'>): boolean =>
  source === 'entered' || source === 'rating';

export function entryOf(site: Pick<Site, 'values' | 'particulars'>, criterionId: string): Entry {
  const value = site.values[criterionId];
  return { value: typeof value === 'number' ? value : null, known: site.particulars[criterionId] ?? {} };
}

/** What an entry changes of a site; a figure taken away takes what is known of it along. */
export function entryPatch(criterionId: string, { value, known }: Entry): SitePatch {
  const values = { [criterionId]: value };
  return value === null ? { values } : { values, particulars: { [criterionId]: known } };
}

const FIELDS = ['low', 'high', 'source', 'date', 'confidence'] as const;

export const sameEntry = (a: Entry, b: Entry): boolean =>
  a.value === b.value && FIELDS.every((field) => a.known[field] === b.known[field]);

const typed = (value: number | undefined): string =>
  value === undefined ? '' : formatFull(value).replaceAll(',', '');

/** An entry as it is typed in one field: "300", or "250 / 300 / 360". */
export function entryText({ value, known }: Entry): string {
  if (value === null) return '';
  if (!isUncertain(known)) return typed(value);
  return [known.low, value, known.high].map(typed).join(' / ').trim();
}

/** An entry in words for a conflict or a toast: "300 (250 to 360) M€", "Good (3)", "no figure". */
export function entryWords({ value, known }: Entry, criterion: Pick<Criterion, 'unit' | 'steps'>): string {
  if (value === null) return 'no figure';
  const shown = (figure: number): string => stepInWords(criterion, figure) ?? formatFull(figure);
  const { low, high } = known;
  const span =
    low === undefined && high === undefined
      ? ''
      : ` (${low === undefined ? '…' : shown(low)} to ${high === undefined ? '…' : shown(high)})`;
  return [shown(value) + span, criterion.unit].filter(Boolean).join(' ');
}

/** Low to high as a table prints it: "250 – 360", "– 360" without a low; empty without either. */
export function spanText({ low, high }: FigureParticulars, decimals: number): string {
  if (low === undefined && high === undefined) return '';
  const shown = (bound: number | undefined): string =>
    bound === undefined ? '' : formatNumber(bound, decimals);
  return `${shown(low)} – ${shown(high)}`.trim();
}

export type TypedEntry = { kind: 'read'; entry: Entry } | { kind: 'refused'; message: string };

const HOW = 'Type a figure, such as 300, or low / likely / high, such as 250 / 300 / 360.';

/**
 * Reads what is typed for a figure: one number, or low / likely / high, of which low and high may be left empty.
 * Nothing at all takes the figure away. What else is known of it stays.
 */
export function readEntry(text: string, before: FigureParticulars): TypedEntry {
  if (text.trim() === '') return { kind: 'read', entry: { value: null, known: {} } };
  const cells = text.split('/');
  if (cells.length !== 1 && cells.length !== 3) return { kind: 'refused', message: HOW };
  const [low, likely, high] = (cells.length === 1 ? ['', ...cells, ''] : cells).map(readTypedNumber);
  const wrong = [low, likely, high].find((part) => typeof part === 'string');
  if (wrong !== undefined) return { kind: 'refused', message: `“${wrong}” is no number. ${HOW}` };
  if (typeof likely !== 'number') return { kind: 'refused', message: HOW };
  const parts = { low: low as number | undefined, likely, high: high as number | undefined };
  const [fault] = figureFaults(parts, false);
  if (fault) return { kind: 'refused', message: faultInWords(fault, parts) };
  return { kind: 'read', entry: { value: likely, known: withBounds(before, parts) } };
}

/** Reads a chosen step; a low or high that it leaves behind is refused, as it is on the server. */
export function readStep(text: string, known: FigureParticulars): TypedEntry {
  if (text === '') return { kind: 'read', entry: { value: null, known: {} } };
  const parts = { low: known.low, likely: Number(text), high: known.high };
  const [fault] = figureFaults(parts, true);
  return fault
    ? { kind: 'refused', message: faultInWords(fault, parts) }
    : { kind: 'read', entry: { value: parts.likely, known } };
}

/** What is known of a figure with its low and high replaced. */
export function withBounds(
  { low: _low, high: _high, ...rest }: FigureParticulars,
  { low, high }: { low?: number | undefined; high?: number | undefined },
): FigureParticulars {
  return {
    ...rest,
    ...(low === undefined ? {} : { low }),
    ...(high === undefined ? {} : { high }),
  };
}
