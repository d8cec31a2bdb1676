import type { Map } from 'maplibre-gl';
import { formatNumber } from '#contract/format.ts';
import type { Palette } from './palette.ts';
import { drawWords } from './sectors.ts';
import { labelStep, latitudeLabel, longitudeLabel, multiples, neatStep, scaleBar } from './steps.ts';

/** Widths round the map, in px; the degrees of longitude stand in the foot. */
export const FRAME = { side: 8, top: 8, foot: 8, degrees: 22 } as const;
const BAND = 4;

export interface Inner {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

const font = (size: number): string => `400 ${size}px "IBM Plex Mono", monospace`;

function blocks(
  pen: CanvasRenderingContext2D,
  edges: readonly { at: number; index: number }[],
  limit: number,
  place: (from: number, length: number) => readonly [number, number, number, number][],
): void {
  edges.forEach(({ at, index }, position) => {
    if (index % 2 !== 0) return;
    const from = Math.max(0, at);
    const to = Math.min(limit, edges[position + 1]?.at ?? limit);
    if (to > from) for (const box of place(from, to - from)) pen.fillRect(...box);
  });
}

function drawMeridians(pen: CanvasRenderingContext2D, map: Map, inner: Inner, p: Palette): void {
  const west = map.unproject([0, inner.height / 2]).lng;
  const east = map.unproject([inner.width, inner.height / 2]).lng;
  const perDegree = inner.width / (east - west);
  const step = neatStep(perDegree);
  const xOf = (longitude: number): number => (longitude - west) * perDegree;
  const edges = multiples(step, west - step, east).map((longitude) => ({
    at: xOf(longitude),
    index: Math.round(longitude / step),
  }));
  pen.fillStyle = p.ink;
  blocks(pen, edges, inner.width, (from, length) => [
    [inner.x + from, inner.y - FRAME.top, length, BAND],
    [inner.x + from, inner.y + inner.height + FRAME.foot - BAND, length, BAND],
  ]);
  const looks = { colour: p.secondInk, halo: p.paper, font: font(11), align: 'center' } as const;
  for (const longitude of multiples(labelStep(step, perDegree), west, east)) {
    const x = Math.min(inner.width - 16, Math.max(16, xOf(longitude)));
    const y = inner.y + inner.height + FRAME.foot + FRAME.degrees / 2 + 1;
    drawWords(pen, longitudeLabel(longitude, step), [inner.x + x, y], looks);
  }
}

function drawParallels(pen: CanvasRenderingContext2D, map: Map, inner: Inner, p: Palette): void {
  const middle = inner.width / 2;
  const north = map.unproject([middle, 0]).lat;
  const south = map.unproject([middle, inner.height]).lat;
  const perDegree = inner.height / (north - south);
  const step = neatStep(perDegree);
  const centre = map.getCenter().lng;
  const yOf = (latitude: number): number => map.project([centre, latitude]).y;
  const edges = multiples(step, Math.max(-85, south - step), Math.min(85, north + step))
    .map((latitude) => ({ at: yOf(latitude), index: Math.round(latitude / step) + 1 }))
    .reverse();
  pen.fillStyle = p.ink;
  blocks(pen, edges, inner.height, (from, length) => [
    [inner.x - FRAME.side, inner.y + from, BAND, length],
    [inner.x + inner.width + FRAME.side - BAND, inner.y + from, BAND, length],
  ]);
  const looks = { colour: p.secondInk, halo: p.sea, font: font(11), align: 'left' } as const;
  for (const latitude of multiples(labelStep(step, perDegree), south, north)) {
    const y = yOf(latitude);
    const clear = y > 14 && y < inner.height - 44;
    if (clear) drawWords(pen, latitudeLabel(latitude, step), [inner.x + 6, inner.y + y - 8], looks);
  }
}

/** The frame of the flat map: ink and paper by turns every step of degrees, with the degrees printed. */
export function drawNeatline(pen: CanvasRenderingContext2D, map: Map, inner: Inner, p: Palette): void {
  const { x, y, width, height } = inner;
  pen.fillStyle = p.paper;
  pen.fillRect(0, 0, x, y + height + FRAME.foot);
  pen.fillRect(x + width, 0, FRAME.side, y + height + FRAME.foot);
  pen.fillRect(0, 0, x + width, y);
  pen.fillRect(0, y + height, x + width, FRAME.foot);
  drawMeridians(pen, map, inner, p);
  drawParallels(pen, map, inner, p);
  pen.strokeStyle = p.ink;
  pen.lineWidth = 1;
  for (const out of [0, BAND, FRAME.side - 0.5])
    pen.strokeRect(x - out, y - out, width + 2 * out, height + 2 * out);
}

/** A bar of round kilometres at the foot left, true along the parallel it names. */
export function drawScale(pen: CanvasRenderingContext2D, map: Map, inner: Inner, p: Palette): void {
  const { lat, lng } = map.getCenter();
  const here = map.project([lng, lat]);
  const degreePx = map.project([lng + 1, lat]).x - here.x;
  const metresPerPx = (111_319.49 * Math.cos((lat * Math.PI) / 180)) / degreePx;
  const { km, px } = scaleBar(metresPerPx, 110);
  const [x, y] = [inner.x + 14, inner.y + inner.height - 18];
  pen.strokeStyle = p.ink;
  pen.lineWidth = 1.6;
  pen.beginPath();
  pen.moveTo(x, y - 5);
  pen.lineTo(x, y);
  pen.lineTo(x + px, y);
  pen.lineTo(x + px, y - 5);
  pen.moveTo(x + px / 2, y);
  pen.lineTo(x + px / 2, y - 3);
  pen.stroke();
  const where = Math.abs(lat) < 0.5 ? 'at the equator' : `at ${latitudeLabel(Math.round(lat), 1)}`;
  const words = `${formatNumber(km, km < 1 ? 1 : 0)} km ${where}`;
  drawWords(pen, words, [x + px + 8, y - 3], { colour: p.ink, halo: p.sea, font: font(11), align: 'left' });
}
