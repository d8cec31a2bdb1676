/**
 * How figures, times and lists are written: on screens, in messages and in the memo. One place for all, so that a
 * number never differs between a grid and the page that is printed from it.
 */

export const MINUS = '−';

const formats = new Map<string, Intl.NumberFormat>();

function numberFormat(least: number, most: number): Intl.NumberFormat {
  const key = `${least}/${most}`;
  const known = formats.get(key);
  if (known) return known;
  const made = new Intl.NumberFormat('en-US', { minimumFractionDigits: least, maximumFractionDigits: most });
  formats.set(key, made);
  return made;
}

/** Intl writes a hyphen and keeps a zero's sign; a printed figure has a true minus and no "−0.0". */
function withTrueMinus(text: string): string {
  if (!text.startsWith('-')) return text;
  return /[1-9]/.test(text) ? MINUS + text.slice(1) : text.slice(1);
}

/** A figure with a fixed count of decimals, a thousands comma and a true minus: −1,234.5 */
export function formatNumber(value: number, decimals = 0): string {
  return withTrueMinus(numberFormat(decimals, decimals).format(value));
}

/** The same with its sign always written: +0.054, −12, and 0 without one. */
export function formatSigned(value: number, decimals = 0): string {
  const text = formatNumber(value, decimals);
  return value > 0 && /[1-9]/.test(text) ? `+${text}` : text;
}

const fullFormat = new Intl.NumberFormat('en-US', {
  maximumSignificantDigits: 15,
  maximumFractionDigits: 15,
});

/** The full figure for hover, focus and exports: every digit that the number holds, up to 15 significant ones. */
export const formatFull = (value: number): string => withTrueMinus(fullFormat.format(value));

/** A share of one to three places without the leading zero, as in the second line of a ranking's cell: .905, 1.000 */
export function formatShare(value: number): string {
  return formatNumber(value, 3).replace(/^(−?)0\./, '$1.');
}

/** Latitude in degrees, north positive, with its half: 4.72° S */
export function formatLatitude(latitudeDeg: number, decimals = 2): string {
  return `${formatNumber(Math.abs(latitudeDeg), decimals)}° ${latitudeDeg < 0 ? 'S' : 'N'}`;
}

/** Longitude in degrees, east positive, with its half: 37.05° W */
export function formatLongitude(longitudeDeg: number, decimals = 2): string {
  return `${formatNumber(Math.abs(longitudeDeg), decimals)}° ${longitudeDeg < 0 ? 'W' : 'E'}`;
}

/** 2026-12-01, the UTC day. */
export function formatDateUtc(time: string | Date): string {
  return toDate(time).toISOString().slice(0, 10);
}

/** 11:42 UTC */
export function formatTimeUtc(time: string | Date): string {
  return `${toDate(time).toISOString().slice(11, 16)} UTC`;
}

/** 2026-12-01 11:42 UTC */
export function formatDateTimeUtc(time: string | Date): string {
  return `${formatDateUtc(time)} ${formatTimeUtc(time)}`;
}

function toDate(time: string | Date): Date {
  return time instanceof Date ? time : new Date(time);
}

/** "1 site", "1,240 sites"; give the plural where an s does not make it. */
export function formatCount(count: number, one: string, many = `${one}s`): string {
  return `${formatNumber(count)} ${count === 1 ? one : many}`;
}

/** "a", "a and b", "a, b and c" */
export function listInWords(items: readonly string[], last = 'and'): string {
  if (items.length < 2) return items[0] ?? '';
  return `${items.slice(0, -1).join(', ')} ${last} ${items.at(-1)}`;
}

/** Two letters for a person: the first of the first and of the last name. */
export function initialsOf(name: string): string {
  const words = name.trim().split(/\s+/).filter(Boolean);
  const first = words[0]?.[0] ?? '?';
  const last = words.length > 1 ? (words.at(-1)?.[0] ?? '') : (words[0]?.[1] ?? '');
  return (first + last).toUpperCase();
}

/**
 * A number as a person types it: a true minus, thousands commas or spaces, an exponent.
 * @returns the number, or the typed text when it is none, so that a schema can refuse it and a field can keep it
 */
export function readTypedNumber(text: string): number | string | undefined {
  const typed = text.trim();
  if (typed === '') return undefined;
  const plain = typed.replace(/[\u2212\u2013]/g, '-').replace(/[\u00a0\u2009\u202f ]/g, '');
  const grouped = /^[+-]?\d{1,3}(,\d{3})+(\.\d+)?$/.test(plain) ? plain.replaceAll(',', '') : plain;
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(grouped) ? Number(grouped) : typed;
}
