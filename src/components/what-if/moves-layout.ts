/* Where the parts of the rank-moves chart stand, px. */
import { formatNumber } from '#contract/format.ts';
import { rankRange } from '#contract/ranking-words.ts';
import { hasMoved, type RankMove, type Standing } from '#contract/what-if-model.ts';

/** A site's circle at one end; `out` has left the ranking. */
export interface Spot {
  x: number;
  y: number;
  /** Half the width: a long rank widens its circle. */
  half: number;
  text: string;
  mark: 'ranked' | 'range' | 'aside' | 'out';
  /** The name, with what its circle cannot say. */
  label: string;
}

export interface MoveLine {
  move: RankMove;
  kind: 'leads' | 'moved' | 'stays';
  /** It ends outside the ranked sites. */
  ends: boolean;
  from: Spot;
  to: Spot;
  /** Where the curve bends. */
  bend: number;
}

interface End {
  at: number;
  name: number;
}

interface Layout {
  lines: MoveLine[];
  /** Sites of the list between two drawn ones. */
  gaps: { x: number; y: number; between: number }[];
  width: number;
  height: number;
  left: End;
  right: End;
}

const ROW = 32;
const GAP = 20;
const TOP = 38;
const WIDE = { width: 640, left: { at: 208, name: 184 }, right: { at: 432, name: 456 }, letters: 26 };
const NARROW = { width: 358, left: { at: 72, name: 50 }, right: { at: 190, name: 214 }, letters: 19 };

/** Lays out the moves by their order in either list; a wider space says how many sites lie between. */
export function layOut(moves: readonly RankMove[], narrow: boolean): Layout {
  const { width, left, right, letters } = narrow ? NARROW : WIDE;
  const before = column(moves, (move) => move.beforePlace);
  const after = column(moves, (move) => move.afterPlace);
  const lines = moves.map((move): MoveLine => {
    const { before: was, after: is } = move;
    const leads = is.kind === 'ranked' && is.rank === 1;
    return {
      move,
      kind: leads ? 'leads' : hasMoved(move) ? 'moved' : 'stays',
      ends: is.kind === 'left-out' || is.kind === 'set-aside',
      from: spotOf(was, { x: left.at, y: before.y.get(move) ?? TOP }, cut(move.name, letters)),
      to: spotOf(is, { x: right.at, y: after.y.get(move) ?? TOP }, cut(move.name, letters)),
      bend: (left.at + right.at) / 2,
    };
  });
  const gaps = [
    ...before.gaps.map((gap) => ({ ...gap, x: left.at })),
    ...after.gaps.map((gap) => ({ ...gap, x: right.at })),
  ];
  const lowest = Math.max(before.bottom, after.bottom);
  // The leader's line lies over the others.
  const over = (line: MoveLine): number => (line.kind === 'leads' ? 2 : line.kind === 'moved' ? 1 : 0);
  return { lines: lines.sort((a, b) => over(a) - over(b)), gaps, width, height: lowest, left, right };
}

function column(moves: readonly RankMove[], placeOf: (move: RankMove) => number | null) {
  const y = new Map<RankMove, number>();
  const gaps: { y: number; between: number }[] = [];
  const listed = [...moves].sort((a, b) => (placeOf(a) ?? Infinity) - (placeOf(b) ?? Infinity));
  let next = TOP;
  let last = -1;
  for (const move of listed) {
    const place = placeOf(move);
    const between = place === null ? 0 : place - last - 1;
    if (between > 0) {
      gaps.push({ y: next - ROW / 2 + GAP / 2 + 4, between });
      next += GAP;
    }
    y.set(move, next);
    next += ROW;
    last = place ?? last;
  }
  return { y, gaps, bottom: next - ROW / 2 + 4 };
}

const LEAST_HALF = 12;
const LETTER = 7;

function spotOf(standing: Standing, at: { x: number; y: number }, name: string): Spot {
  const drawn = drawnAs(standing);
  const half = Math.max(LEAST_HALF, (drawn.text.length * LETTER + 8) / 2);
  return { ...at, half, text: drawn.text, mark: drawn.mark, label: name + drawn.said };
}

function drawnAs(standing: Standing): Pick<Spot, 'text' | 'mark'> & { said: string } {
  if (standing.kind === 'ranked') return { text: formatNumber(standing.rank), mark: 'ranked', said: '' };
  if (standing.kind === 'incomplete')
    return { text: rankRange(standing).replace(' to ', '–'), mark: 'range', said: '' };
  return standing.kind === 'set-aside'
    ? { text: '', mark: 'aside', said: ', set aside' }
    : { text: '–', mark: 'out', said: ', left out' };
}

const cut = (name: string, letters: number): string =>
  name.length <= letters ? name : `${name.slice(0, letters - 1).trimEnd()}…`;
