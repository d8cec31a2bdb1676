import { plainMinus, plainPoint, shown } from './numbers.ts';

export type Axis = 'latitude' | 'longitude';

export interface CoordinateRefusal {
  readonly kind: 'refused';
  readonly code: 'empty' | 'not-a-number' | 'out-of-range' | 'hemisphere';
  readonly message: string;
  /** The figure read, where there is one though it cannot stand. */
  readonly degrees: number | null;
}
export type LatitudeReading = { readonly kind: 'read'; readonly latitudeDeg: number } | CoordinateRefusal;
export type LongitudeReading =
  | {
      readonly kind: 'read';
      readonly longitudeDeg: number;
      /** Says what was done, where the longitude was brought into −180 to 180. */
      readonly change: string | null;
    }
  | CoordinateRefusal;

/**
 * Reads a latitude: decimal degrees (plain or with an exponent), degrees and decimal minutes, or degrees, minutes
 * and seconds; with or without marks; a sign, or N or S before or after.
 *
 * @param decimalComma whether a comma is the decimal mark
 * @returns degrees, −90 to 90, north positive; or why there are none
 * @see ISO 6709 for the order and marks; tests/core/csv/coordinates.test.ts
 */
export function readLatitude(text: string, decimalComma = false): LatitudeReading {
  const read = readAngle(text, 'latitude', decimalComma);
  if (typeof read !== 'number') return read;
  if (Math.abs(read) > 90) {
    return refuse('out-of-range', `Latitude ${shown(text)} is outside −90 to 90.`, read);
  }
  return { kind: 'read', latitudeDeg: read };
}

/**
 * Reads a longitude in the same notations with E or W. From 180 to 360 it is brought into −180 to 180, and the
 * reading says so; −180 becomes 180.
 *
 * @returns degrees, −180 < λ ≤ 180, east positive; or why there are none
 */
export function readLongitude(text: string, decimalComma = false): LongitudeReading {
  const read = readAngle(text, 'longitude', decimalComma);
  if (typeof read !== 'number') return read;
  if (read < -180 || read > 360) {
    return refuse('out-of-range', `Longitude ${shown(text)} is outside −180 to 360.`, read);
  }
  if (read === -180) return { kind: 'read', longitudeDeg: 180, change: 'Longitude −180 is stored as 180.' };
  if (read <= 180) return { kind: 'read', longitudeDeg: read, change: null };
  // Ten decimals are a hundredth of a millimetre: this only drops the digits that the subtraction makes up.
  const longitudeDeg = Number((read - 360).toFixed(10)) + 0;
  return { kind: 'read', longitudeDeg, change: `Longitude ${shown(text)} brought into −180 to 180.` };
}

const DECIMAL = /^(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?\s*°?$/i;
const SEXAGESIMAL =
  /^(\d{1,3})(?:\s*[°:-]\s*|\s+)(\d{1,2}(?:\.\d+)?)(?:\s*'|(?:\s*[':-]\s*|\s+)(\d{1,2}(?:\.\d+)?)\s*"?)?$/;

function readAngle(text: string, axis: Axis, decimalComma: boolean): number | CoordinateRefusal {
  const name = axis === 'latitude' ? 'Latitude' : 'Longitude';
  if (text.trim() === '') return refuse('empty', `${name} is empty.`, null);
  const { letter, body } = splitHemisphere(plainMarks(text));
  const signed = /^([+-]?)\s*(.*)$/s.exec(decimalComma ? plainPoint(body) : body);
  const size = signed?.[2] === undefined ? undefined : readSize(signed[2]);
  if (signed === null || size === undefined) {
    return refuse('not-a-number', `${name} “${shown(text)}” is not a number of degrees.`, null);
  }
  if (typeof size === 'string') return refuse('out-of-range', `${name} ${shown(text)}: ${size}`, null);
  if (letter !== undefined && !(axis === 'latitude' ? 'NS' : 'EW').includes(letter)) {
    const wanted = axis === 'latitude' ? 'N or S' : 'E or W';
    return refuse('hemisphere', `${name} ${shown(text)} has ${letter} where ${wanted} belongs.`, null);
  }
  if (letter !== undefined && signed[1] !== '') {
    const message = `${name} ${shown(text)} has both a sign and ${letter}. Leave one out.`;
    return refuse('hemisphere', message, null);
  }
  // "+ 0" so that a minus before nothing is a plain zero.
  return (signed[1] === '-' || letter === 'S' || letter === 'W' ? -size : size) + 0;
}

/** Degrees without sign; or, as text, the part that is out of range; undefined where it is no angle. */
function readSize(text: string): number | string | undefined {
  if (DECIMAL.test(text)) {
    const value = Number(text.replace('°', ''));
    return Number.isFinite(value) ? value : undefined;
  }
  const [, degrees, minutes, seconds] = SEXAGESIMAL.exec(text) ?? [];
  if (degrees === undefined || minutes === undefined) return undefined;
  if (seconds !== undefined && minutes.includes('.')) return undefined;
  if (Number(minutes) >= 60) return `minutes ${minutes} are not under 60.`;
  if (Number(seconds ?? 0) >= 60) return `seconds ${seconds ?? ''} are not under 60.`;
  return (Number(degrees) * 3600 + Number(minutes) * 60 + Number(seconds ?? 0)) / 3600;
}

/** The many ways to write the marks, turned into ° ' " and the letters N, S, E, W. */
function plainMarks(text: string): string {
  return plainMinus(text)
    .replace(/[\s\u00a0\u2000-\u200b\u202f]+/g, ' ')
    .trim()
    .replace(/''|[′’]{2}|[″”“ʺ˝]|sec(?:onds?)?\.?/gi, '"')
    .replace(/[′’‘´`ʹ]|min(?:utes?)?\.?/gi, "'")
    .replace(/[º˚]|deg(?:rees?)?\.?/gi, '°')
    .replace(/\b(n)orth\b|\b(s)outh\b|\b(e)ast\b|\b(w)est\b/gi, '$1$2$3$4');
}

function splitHemisphere(text: string): { letter: string | undefined; body: string } {
  const before = /^([NSEW])\s*(.+)$/is.exec(text);
  const after = /^(.+?)\s*([NSEW])$/is.exec(text);
  if (before !== null) return { letter: before[1]?.toUpperCase(), body: before[2] ?? '' };
  if (after !== null) return { letter: after[2]?.toUpperCase(), body: after[1] ?? '' };
  return { letter: undefined, body: text };
}

function refuse(code: CoordinateRefusal['code'], message: string, degrees: number | null): CoordinateRefusal {
  return { kind: 'refused', code, message, degrees };
}
