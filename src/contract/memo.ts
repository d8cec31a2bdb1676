import { z } from './zod.ts';

/**
 * The memo as a document: everything that is printed, already worded and rounded, so that the PDF and the reading
 * preview cannot differ. A plain, serialisable value: it crosses to the rendering thread, and the same model gives
 * the same bytes.
 */
export interface MemoModel {
  paper: MemoPaper;
  /** Title of the document's metadata and of the window that shows it. */
  documentTitle: string;
  /** Stands at the head of every page. */
  status: string;
  titleBlock: MemoTitleBlock;
  /** The recommendation, or what there is to say instead of one. */
  finding: string;
  /** The question and by when it is to be decided. */
  question: string;
  /** Why, in a paragraph or two. */
  reasons: MemoText[];
  /** The figures that carry the recommendation; at most three. */
  headline: MemoHeadline[];
  /** The first section continues the first page and has no heading. */
  sections: MemoSection[];
  /** What the figures rest on; runs at the foot of every page. */
  foot: string;
}

export const MemoPaper = z.enum(['a4', 'letter']);
export type MemoPaper = z.infer<typeof MemoPaper>;

export const MemoQuery = z.object({
  paper: MemoPaper.default('a4').meta({ description: 'A4 210 × 297 mm, or US Letter' }),
});

export interface MemoTitleBlock {
  study: string;
  organisation: string;
  memo: string;
  /** UTC day, ISO 8601. */
  date: string;
  revision: number;
  prepared: string;
}

export interface MemoHeadline {
  label: string;
  figure: string;
  note: string;
  /** Whether it belongs to the leading site: takes the signal. */
  leads: boolean;
}

export interface MemoSection {
  id: string;
  heading: string | null;
  blocks: MemoBlock[];
}

export type MemoBlock =
  MemoParagraph | MemoCaution | MemoFormulas | MemoTable | MemoContributions | MemoMap | MemoCode;

/** Text with parts that stand out. */
export type MemoText = (string | { strong: string })[];

export interface MemoParagraph {
  kind: 'paragraph';
  text: MemoText;
}

export interface MemoCaution {
  kind: 'caution';
  strong: string;
  text: string;
}

export interface MemoFormulas {
  kind: 'formulas';
  items: { formula: string; meaning: string }[];
}

/** Something to type or to compare character by character: a checksum, a command. */
export interface MemoCode {
  kind: 'code';
  label: string;
  text: string;
}

export interface MemoColumn {
  heading: string;
  unit: string;
  align: 'left' | 'right';
  /** Share of the table's width. */
  share: number;
  /** Whether it stays on a narrow screen's first view; the others are reached by scrolling the table. */
  first: boolean;
}

export interface MemoCell {
  text: string;
  /** Columns it takes; a sentence may stand in place of figures. */
  span?: number;
  strong?: boolean;
}

export interface MemoRow {
  cells: MemoCell[];
  mark: 'leads' | 'set-aside' | 'plain';
}

export interface MemoTable {
  kind: 'table';
  /** Tables are numbered through the memo. */
  number: number;
  caption: string;
  columns: MemoColumn[];
  rows: MemoRow[];
  notes: string[];
}

/** One part of a bar: a criterion's term. */
export interface MemoPart {
  /** Key letter of the criterion; empty for the rest together. */
  letter: string;
  /** Which of the seven bar patterns fills it, 0 to 6. */
  pattern: number;
  start: number;
  length: number;
}

export interface MemoContributions {
  kind: 'contributions';
  /** Figures are numbered through the memo. */
  number: number;
  caption: string;
  /** The figure in a sentence, for those who don't see it. */
  description: string;
  bars: { name: string; value: string; total: number; leads: boolean; parts: MemoPart[] }[];
  key: { letter: string; pattern: number; name: string; weight: string }[];
}

/** A map in points of its own frame, drawn as vectors. */
export interface MemoMap {
  kind: 'map';
  number: number;
  caption: string;
  description: string;
  width: number;
  height: number;
  /** SVG path data. */
  land: string;
  graticule: string;
  degrees: { x: number; y: number; text: string; side: 'bottom' | 'left' }[];
  pads: MemoPad[];
  /** Sites that are not listed, as one path of dots: there may be thousands. */
  others: string;
  notes: string[];
}

export interface MemoPad {
  x: number;
  y: number;
  mark: 'leads' | 'ranked' | 'other';
  /** Baseline start of the label; none where no place was left for it. */
  label: { x: number; y: number; text: string } | null;
  /** From the pad to a label that had to move away. */
  leader: { x1: number; y1: number; x2: number; y2: number } | null;
}
