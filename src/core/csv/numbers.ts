const PLAIN = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?$/i;

/** Dashes that people and programs write for a minus, turned into the one that numbers are read with. */
export function plainMinus(text: string): string {
  return text.replace(/[\u2212\u2010-\u2014\ufe63\uff0d]/g, '-');
}

/** A decimal comma turned into a point, where there is exactly one and no point beside it. */
export function plainPoint(text: string): string {
  return /^[^.,]*,[^.,]*$/.test(text) ? text.replace(',', '.') : text;
}

/**
 * Reads a number written plainly or with an exponent. Thousands marks and units are not read: what they mean
 * differs from country to country, and a wrong guess would be silent.
 *
 * @returns the number, or undefined where the text is none or too large for one
 */
export function readNumber(text: string, decimalComma: boolean): number | undefined {
  const minus = plainMinus(text.trim());
  const plain = decimalComma ? plainPoint(minus) : minus;
  if (!PLAIN.test(plain)) return undefined;
  const value = Number(plain);
  return Number.isFinite(value) ? value : undefined;
}

/** A cell's text for a message: true minus, no longer than a line can hold. */
export function shown(text: string): string {
  const flat = text
    .trim()
    .replace(/\s+/g, ' ')
    .replace(/^-(?=[\d.])/, '−');
  return flat.length > 60 ? `${flat.slice(0, 59)}…` : flat;
}
