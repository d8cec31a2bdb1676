import { INK } from './theme.ts';

/** One stroke or area of a bar, as path data. */
export interface Stroke {
  d: string;
  fill?: string;
  stroke?: string;
  strokeWidth?: number;
}

const n = (value: number): string => value.toFixed(2);
const rect = (x: number, y: number, w: number, h: number): string =>
  `M${n(x)} ${n(y)}h${n(w)}v${n(h)}h${n(-w)}Z`;

function ruled(x: number, y: number, w: number, h: number): string {
  const lines: string[] = [];
  for (let at = 2; at < h; at += 2.4) lines.push(`M${n(x)} ${n(y + at)}h${n(w)}`);
  return lines.join('');
}

/** Lines at 45°, cut to the rectangle where they meet its edges. */
function hatched(x: number, y: number, w: number, h: number, gap: number): string {
  const lines: string[] = [];
  for (let c = gap / 2; c < w + h; c += gap) {
    const from = Math.max(0, c - h);
    const to = Math.min(w, c);
    if (to > from) lines.push(`M${n(x + from)} ${n(y + c - from)}L${n(x + to)} ${n(y + c - to)}`);
  }
  return lines.join('');
}

function dotted(x: number, y: number, w: number, h: number): string {
  const r = 0.75;
  const dots: string[] = [];
  for (let dx = 2; dx + r < w; dx += 3)
    for (let dy = 2; dy + r < h; dy += 3)
      dots.push(`M${n(x + dx - r)} ${n(y + dy)}a${r} ${r} 0 1 0 ${2 * r} 0a${r} ${r} 0 1 0 ${-2 * r} 0Z`);
  return dots.join('');
}

/**
 * One part of a bar in its pattern, told apart without colour: solid, ruled, hatched, mid, dotted, light, open.
 * @param pattern 0 to 6.
 * @param w width in points; a part of no width has no strokes.
 */
export function barPart(pattern: number, x: number, y: number, w: number, h: number): Stroke[] {
  if (w <= 0) return [];
  const area = rect(x, y, w, h);
  const edge: Stroke = { d: area, fill: INK.paper, stroke: INK.field, strokeWidth: 0.5 };
  switch (pattern) {
    case 0:
      return [{ d: area, fill: INK.tint1 }];
    case 1:
      return [
        { d: area, fill: INK.tint2 },
        { d: ruled(x, y, w, h), stroke: INK.paper, strokeWidth: 0.8 },
      ];
    case 2:
      return [edge, { d: hatched(x, y, w, h, 3.4), stroke: INK.tint1, strokeWidth: 1 }];
    case 3:
      return [{ d: area, fill: INK.tint2 }];
    case 4:
      return [edge, { d: dotted(x, y, w, h), fill: INK.tint1 }];
    case 5:
      return [{ d: area, fill: INK.tint3 }];
    default:
      return [edge];
  }
}

/** The band that marks a caution: ink hatching, no colour. */
export const cautionBand = (w: number, h: number): Stroke => ({
  d: hatched(0, 0, w, h, 5.6),
  stroke: INK.ink,
  strokeWidth: 1,
});
