import { along, type PadFrame } from './pad-frame.ts';
import type { Palette } from './palette.ts';
import type { SectorDeg } from './types.ts';

const SECTOR_RADIUS = 64;
const CHOSEN_RADIUS = 150;

/** The chosen pad's radius: less where the map is narrow, so that both handles can be reached. */
export const chosenRadius = (mapWidth: number): number => Math.min(CHOSEN_RADIUS, mapWidth * 0.3);

const allRound = ([from, to]: SectorDeg): boolean => to - from === 360;

/** Clockwise from `from`; may pass through north. */
const width = ([from, to]: SectorDeg): number => (allRound([from, to]) ? 360 : (to - from + 360) % 360);

function trace(pen: CanvasRenderingContext2D, frame: PadFrame, sector: SectorDeg, radius: number): void {
  const whole = width(sector);
  pen.beginPath();
  if (!allRound(sector)) pen.moveTo(frame.x, frame.y);
  const steps = Math.max(2, Math.ceil(whole / 3));
  for (let step = 0; step <= steps; step += 1)
    pen.lineTo(...along(frame, sector[0] + (whole * step) / steps, radius));
  pen.closePath();
}

interface Looks {
  readonly radius: number;
  readonly fill: string;
  readonly edge: string;
  readonly edgeWidth: number;
}

export const sectorLooks = (p: Palette): Looks => ({
  radius: SECTOR_RADIUS,
  fill: p.sector,
  edge: p.pad,
  edgeWidth: 1,
});

export const chosenLooks = (p: Palette, radius: number): Looks => ({
  radius,
  fill: p.chosenSector,
  edge: p.chosen,
  edgeWidth: 1.5,
});

/** A pad's permitted azimuths; a pad without sectors, open all round, has none drawn. */
export function drawSectors(
  pen: CanvasRenderingContext2D,
  frame: PadFrame,
  sectors: readonly SectorDeg[],
  looks: Looks,
): void {
  pen.fillStyle = looks.fill;
  pen.strokeStyle = looks.edge;
  pen.lineWidth = looks.edgeWidth;
  pen.lineJoin = 'round';
  for (const sector of sectors) {
    trace(pen, frame, sector, looks.radius);
    pen.fill();
    pen.stroke();
  }
}

/** Words with a halo of what lies under them. */
export function drawWords(
  pen: CanvasRenderingContext2D,
  words: string,
  [x, y]: readonly [number, number],
  { colour, halo, font, align }: { colour: string; halo: string; font: string; align: CanvasTextAlign },
): void {
  pen.font = font;
  pen.textAlign = align;
  pen.textBaseline = 'middle';
  pen.lineWidth = 4;
  pen.lineJoin = 'round';
  pen.strokeStyle = halo;
  pen.strokeText(words, x, y);
  pen.fillStyle = colour;
  pen.fillText(words, x, y);
}

/** The launch azimuth of the chosen orbit, from the pad to the edge of its sectors. */
export function drawFlown(
  pen: CanvasRenderingContext2D,
  frame: PadFrame,
  { azimuthDeg, radius, colour }: { azimuthDeg: number; radius: number; colour: string },
): void {
  pen.strokeStyle = colour;
  pen.lineWidth = 3;
  pen.beginPath();
  pen.moveTo(...along(frame, azimuthDeg, 12));
  pen.lineTo(...along(frame, azimuthDeg, radius));
  pen.stroke();
}
