import type { MemoPaper } from '#contract/memo.ts';

/** Points a millimetre. */
export const MM = 72 / 25.4;

/** Paper and margins as the design gives them; both papers have the same margins, so the text reflows. */
export const PAPER: Record<MemoPaper, { width: number; height: number }> = {
  a4: { width: 210 * MM, height: 297 * MM },
  letter: { width: 612, height: 792 },
};
export const MARGIN = { left: 18 * MM, right: 14 * MM, head: 12 * MM, foot: 14 * MM } as const;

/** The memo's ink: day colours on white, with a signal that stays darker than mid-grey on a grey printer. */
export const INK = {
  ink: '#14243D',
  ink2: '#44546B',
  ink3: '#56637A',
  rule: '#D3CBBB',
  field: '#6F7988',
  signal: '#9E350A',
  sunk: '#F1ECE1',
  paper: '#FFFFFF',
  tint1: '#14243D',
  tint2: '#4A6080',
  tint3: '#6F86A2',
  sea: '#F4F6F3',
  land: '#EDE6D6',
  coast: '#6E7B8D',
  graticule: '#DADCD6',
} as const;

export const RULE = { heavy: 1.1, light: 0.75, hair: 0.4 } as const;

/** Size and leading in points; the leading is given on texts only, a page that carries one loses its foot. */
export const TYPE = {
  title: { fontSize: 21, lineHeight: 26 / 21 },
  heading: { fontSize: 13, lineHeight: 17 / 13, fontWeight: 600 },
  body: { fontSize: 10.5, lineHeight: 15 / 10.5 },
  caption: { fontSize: 9.5, lineHeight: 13 / 9.5, fontWeight: 600 },
  table: { fontSize: 9, lineHeight: 12 / 9 },
  dense: { fontSize: 8, lineHeight: 11 / 8 },
  note: { fontSize: 8.5, lineHeight: 11 / 8.5 },
} as const;

export const SANS = 'IBM Plex Sans';
export const MONO = 'IBM Plex Mono';
/** Least height of a table row. */
export const ROW = 6 * MM;
