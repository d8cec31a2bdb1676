import type { Criterion } from '#contract/criterion.ts';
import { faultInWords, keptParticulars } from '#contract/figure.ts';
import { formatFull, readTypedNumber } from '#contract/format.ts';
import { FigureParticulars } from '#contract/site.ts';
import { figureFaults, type FigurePart } from '#core/decision/entered-figure.ts';
import type { Entry } from './figure.ts';

/** A figure's form as it is typed. */
export interface TypedFigure {
  figure: string;
  low: string;
  high: string;
  source: string;
  date: string;
  confidence: string;
}

export const TYPED_FIELDS = ['figure', 'low', 'high', 'source', 'date', 'confidence'] as const;

interface FieldFault {
  field: keyof TypedFigure;
  message: string;
}

const numberText = (value: number | null | undefined): string =>
  typeof value === 'number' ? formatFull(value) : '';

export function typedOf({ value, known }: Entry): TypedFigure {
  const { low, high, source = '', date = '', confidence = '' } = known;
  return {
    figure: numberText(value),
    low: numberText(low),
    high: numberText(high),
    source,
    date,
    confidence,
  };
}

const NAMES = { figure: 'The figure', low: 'Low', high: 'High' } as const;

/** Reads the form whole; every fault stands at its field. An emptied figure takes everything else along. */
export function readTyped(
  typed: TypedFigure,
  { source }: Pick<Criterion, 'source'>,
): { kind: 'read'; entry: Entry } | { kind: 'refused'; faults: FieldFault[] } {
  const numbers = { figure: typed.figure, low: typed.low, high: typed.high };
  const read = Object.entries(numbers).map(([field, text]) => [field, readTypedNumber(text)] as const);
  const words = read.filter(([, value]) => typeof value === 'string');
  if (words.length > 0) {
    const faults = words.map(([field, value]) => {
      const name = NAMES[field as keyof typeof NAMES];
      return { field: field as keyof TypedFigure, message: `${name} “${value}” is no number.` };
    });
    return { kind: 'refused', faults };
  }
  const { figure, low, high } = Object.fromEntries(read) as Record<string, number | undefined>;
  const parts = { low, likely: figure, high };
  const faults: FieldFault[] = figureFaults(parts, source === 'rating').map((fault) => ({
    field: fieldOf(fault.part),
    message: faultInWords(fault, parts),
  }));
  const known = keptParticulars({
    low,
    high,
    source: typed.source.trim(),
    date: typed.date.trim(),
    confidence: typed.confidence as FigureParticulars['confidence'],
  });
  const parsed = FigureParticulars.safeParse(known ?? {});
  if (!parsed.success)
    for (const { path, message } of parsed.error.issues)
      faults.push({ field: path[0] as keyof TypedFigure, message });
  if (faults.length > 0 || !parsed.success) return { kind: 'refused', faults };
  if (figure === undefined && known !== undefined)
    return {
      kind: 'refused',
      faults: [
        { field: 'figure', message: 'Enter the figure that this is known of, or empty the other fields.' },
      ],
    };
  return { kind: 'read', entry: { value: figure ?? null, known: parsed.data } };
}

const fieldOf = (part: FigurePart): keyof TypedFigure => (part === 'likely' ? 'figure' : part);
