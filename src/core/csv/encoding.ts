/** The encodings a sites file may have. */
export const ENCODINGS = ['utf-8', 'utf-16le', 'utf-16be', 'windows-1252'] as const;
export type Encoding = (typeof ENCODINGS)[number];

export type Decoded =
  | { readonly kind: 'text'; readonly text: string; readonly encoding: Encoding }
  | { readonly kind: 'refused'; readonly code: 'binary' | 'encoding'; readonly message: string };

const BINARY: Decoded = {
  kind: 'refused',
  code: 'binary',
  message: 'This file is not text. Save the table as CSV and upload that.',
};
const WORKBOOK: Decoded = {
  kind: 'refused',
  code: 'binary',
  message: 'This is a spreadsheet workbook, not CSV. Save the sheet as CSV and upload that.',
};

/** First bytes of a zipped workbook and of the older compound one. */
const WORKBOOKS: readonly (readonly number[])[] = [
  [0x50, 0x4b, 0x03, 0x04],
  [0xd0, 0xcf, 0x11, 0xe0],
];
const PORTABLE_DOCUMENT = [0x25, 0x50, 0x44, 0x46, 0x2d];

/**
 * Turns the bytes of a sites file into text, finding the encoding where none is named.
 *
 * A byte order mark decides. Without one: UTF-16 where the zero bytes of plain letters stand on one side only,
 * UTF-8 where the bytes are valid UTF-8, Windows-1252 otherwise.
 *
 * @param bytes the file as it was uploaded
 * @param named the encoding to use in place of the one recognised
 * @returns the text without its byte order mark, or why it is none
 */
export function decode(bytes: Uint8Array, named?: Encoding): Decoded {
  if (WORKBOOKS.some((mark) => startsWith(bytes, mark))) return WORKBOOK;
  if (startsWith(bytes, PORTABLE_DOCUMENT)) return BINARY;
  const encoding = named ?? detect(bytes);
  const text = decodeAs(bytes, encoding);
  if (text === undefined) {
    return { kind: 'refused', code: 'encoding', message: `The file is not ${encoding.toUpperCase()} text.` };
  }
  return looksBinary(text) ? BINARY : { kind: 'text', text, encoding };
}

function startsWith(bytes: Uint8Array, mark: readonly number[]): boolean {
  return mark.every((byte, i) => bytes[i] === byte);
}

function detect(bytes: Uint8Array): Encoding {
  if (startsWith(bytes, [0xef, 0xbb, 0xbf])) return 'utf-8';
  if (startsWith(bytes, [0xff, 0xfe])) return 'utf-16le';
  if (startsWith(bytes, [0xfe, 0xff])) return 'utf-16be';
  const sided = detectUtf16(bytes);
  if (sided !== undefined) return sided;
  return decodeAs(bytes, 'utf-8') === undefined ? 'windows-1252' : 'utf-8';
}

/**
 * Separators, digits and line ends have a zero high byte in UTF-16 whatever the script of the names, so about a
 * third of a sites file's units or more do; the low byte of a unit is next to never zero.
 */
function detectUtf16(bytes: Uint8Array): Encoding | undefined {
  if (bytes.length < 4 || bytes.length % 2 === 1) return undefined;
  const end = Math.min(bytes.length, 65_536);
  let evenZeros = 0;
  let oddZeros = 0;
  for (let i = 0; i < end; i += 2) {
    if (bytes[i] === 0) evenZeros += 1;
    if (bytes[i + 1] === 0) oddZeros += 1;
  }
  const units = end / 2;
  if (oddZeros > units * 0.2 && evenZeros < units * 0.02) return 'utf-16le';
  if (evenZeros > units * 0.2 && oddZeros < units * 0.02) return 'utf-16be';
  return undefined;
}

function decodeAs(bytes: Uint8Array, encoding: Encoding): string | undefined {
  if (encoding === 'windows-1252') return decodeWindows1252(bytes);
  try {
    return new TextDecoder(encoding, { fatal: true }).decode(bytes);
  } catch {
    return undefined;
  }
}

/** 0x80 to 0x9F of Windows-1252 (WHATWG Encoding Standard, index windows-1252); the rest is Latin-1. */
const WINDOWS_1252_HIGH = '€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ';

/** Own table: some Node releases decode this label as Latin-1, and the browser must read the same text. */
function decodeWindows1252(bytes: Uint8Array): string {
  const parts: string[] = [];
  for (let start = 0; start < bytes.length; start += 8192) {
    parts.push(String.fromCharCode(...bytes.subarray(start, start + 8192)));
  }
  return parts.join('').replace(/[\u0080-\u009f]/g, (c) => WINDOWS_1252_HIGH.charAt(c.charCodeAt(0) - 0x80));
}

/** Text holds no zero character, and control characters other than tabs and line ends at most by accident. */
function looksBinary(text: string): boolean {
  const sample = text.slice(0, 65_536);
  let controls = 0;
  for (let i = 0; i < sample.length; i += 1) {
    const code = sample.charCodeAt(i);
    if ((code < 32 && code !== 9 && code !== 10 && code !== 13) || (code > 126 && code < 160)) controls += 1;
  }
  return text.includes('\0') || controls > sample.length / 50;
}
