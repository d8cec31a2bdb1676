import { foldName } from './codes.ts';
import { splitUnit } from './criterion-columns.ts';

/** Which part of a criterion's figure a column holds. */
export type ColumnPart = 'likely' | 'low' | 'high';

/** A heading that may name the low or high of a criterion: "Cost_low (M€)", "Cost (M€) high". */
export interface PartHeading {
  readonly part: 'low' | 'high';
  /** What is before the word, with any unit of its own, folded. */
  readonly stem: string;
  /** The unit given, or ''. */
  readonly unit: string;
}

/** Reads a heading as one of a low or a high; undefined where it ends otherwise. */
export function partHeading(heading: string): PartHeading | undefined {
  const whole = heading.replace(/\s+/g, ' ');
  const { bare, unit } = splitUnit(whole);
  const [, stem, word] = /^(.*[^\s_-])[\s_-]+(low|high)$/i.exec(bare) ?? [];
  if (stem === undefined || word === undefined) return undefined;
  return { part: word.toLowerCase() === 'low' ? 'low' : 'high', stem: foldName(stem), unit: foldName(unit) };
}

/**
 * Whether a heading of a low or high belongs to a column of figures: the same name, with its unit or without, and no
 * other unit. Figures in thousands must not slip in among millions.
 *
 * @param heading the column's heading
 * @param unit the unit of the criterion that the column fills, or ''
 */
export function belongsTo({ stem, unit: given }: PartHeading, heading: string, unit: string): boolean {
  const whole = heading.replace(/\s+/g, ' ');
  const names = [foldName(whole), foldName(splitUnit(whole).bare)];
  const agree = (one: string): boolean => one === '' || unit === '' || one === foldName(unit);
  if (names.includes(stem)) return agree(given);
  const split = splitUnit(stem);
  return given === '' && names.includes(split.bare) && agree(split.unit);
}
