/** Stands for a character that the typeface lacks. */
export const REPLACEMENT = '\uFFFD';

const PLAIN = /^[ -~]*$/;
const CONTROL = /[\p{Cc}\p{Zl}\p{Zp}]+/gu;

function printableText(text: string, covers: (codePoint: number) => boolean): string {
  if (PLAIN.test(text)) return text;
  return Array.from(text.normalize('NFC').replace(CONTROL, ' '), (character) =>
    covers(character.codePointAt(0) ?? 0) ? character : REPLACEMENT,
  ).join('');
}

/**
 * The same value with every text in it fit to print: composed characters, no control characters, and U+FFFD for what
 * the typeface lacks, so that nothing is set in a face that the file doesn't carry.
 * @param value a plain serialisable value.
 * @param covers whether the typeface has a glyph for a code point.
 */
export function printable<T>(value: T, covers: (codePoint: number) => boolean): T;
export function printable(value: unknown, covers: (codePoint: number) => boolean): unknown {
  if (typeof value === 'string') return printableText(value, covers);
  if (Array.isArray(value)) return value.map((item: unknown) => printable(item, covers));
  if (value === null || typeof value !== 'object') return value;
  return Object.fromEntries(
    Object.entries(value).map(([key, item]) => [key, printable<unknown>(item, covers)]),
  );
}
