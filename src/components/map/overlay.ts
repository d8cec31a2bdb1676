import type { Map } from 'maplibre-gl';
import { onTiles, polarPieces } from './features.ts';
import { drawChosenPad, drawPad } from './images.ts';
import { drawNeatline, drawScale, FRAME, type Inner } from './neatline.ts';
import { padFrame, type PadFrame } from './pad-frame.ts';
import type { Palette } from './palette.ts';
import { chosenLooks, chosenRadius, drawFlown, drawSectors, drawWords, sectorLooks } from './sectors.ts';
import type { MapScene, MapSite, Projection } from './types.ts';

/** Beyond this many pads in view their sectors would only be a grey cloud; the chosen one's is drawn still. */
const MOST_SECTORS = 250;

export interface OverlayState {
  readonly scene: MapScene;
  readonly palette: Palette;
  readonly projection: Projection;
}

export function innerOf({ clientWidth, clientHeight }: HTMLElement): Inner {
  return {
    x: FRAME.side,
    y: FRAME.top,
    width: clientWidth - 2 * FRAME.side,
    height: clientHeight - FRAME.top - FRAME.foot - FRAME.degrees,
  };
}

interface InView {
  readonly site: MapSite;
  readonly frame: PadFrame;
}

/** The pads that are drawn now, in the table's order. */
export function padsInView(
  map: Map,
  { scene, projection }: OverlayState,
  inner: Inner,
  margin = 0,
): InView[] {
  return scene.sites.flatMap((site) => {
    const frame = padFrame(map, site, projection === 'globe');
    if (!frame) return [];
    const { x, y } = frame;
    const out = x < -margin || y < -margin || x > inner.width + margin || y > inner.height + margin;
    return out ? [] : [{ site, frame }];
  });
}

function drawAllSectors(
  pen: CanvasRenderingContext2D,
  pads: readonly InView[],
  state: OverlayState,
  radius: number,
): void {
  const { chosenId } = state.scene;
  const others = pads.filter(({ site }) => site.id !== chosenId && site.permittedAzimuthsDeg.length > 0);
  const looks = sectorLooks(state.palette);
  if (others.length <= MOST_SECTORS)
    for (const { site, frame } of others) drawSectors(pen, frame, site.permittedAzimuthsDeg, looks);
  const chosen = pads.find(({ site }) => site.id === chosenId);
  if (!chosen) return;
  const sectors = state.scene.draft ?? chosen.site.permittedAzimuthsDeg;
  drawSectors(pen, chosen.frame, sectors, chosenLooks(state.palette, radius));
}

/** Pads about the poles, which tiles can't hold. */
function drawPolarPads(pen: CanvasRenderingContext2D, pads: readonly InView[], state: OverlayState): void {
  const { palette: p, scene } = state;
  for (const { site, frame } of pads.filter((one) => !onTiles(one.site))) {
    const chosen = site.id === scene.chosenId;
    pen.save();
    pen.translate(frame.x, frame.y);
    (chosen ? drawChosenPad : drawPad)(pen, p);
    const looks = { colour: chosen ? p.chosen : p.ink, halo: p.sea, align: 'center' } as const;
    drawWords(pen, site.name, [0, 20], { ...looks, font: '500 12px "IBM Plex Sans", sans-serif' });
    pen.restore();
  }
}

function drawPolarTracks(pen: CanvasRenderingContext2D, map: Map, { scene, palette: p }: OverlayState): void {
  for (const { line, chosen } of polarPieces(scene.tracks, scene.chosenId)) {
    pen.strokeStyle = chosen ? p.chosen : p.ink;
    pen.lineWidth = chosen ? 2.2 : 1.2;
    pen.beginPath();
    let open = false;
    for (const [longitudeDeg, latitudeDeg] of line) {
      const frame = padFrame(map, { longitudeDeg, latitudeDeg }, true);
      if (frame && open) pen.lineTo(frame.x, frame.y);
      else if (frame) pen.moveTo(frame.x, frame.y);
      open = frame !== undefined;
    }
    pen.stroke();
  }
}

/** Draws what is measured in pixels over the map: sectors, launch azimuth, neatline, scale, and the poles. */
export function drawOverlay(canvas: HTMLCanvasElement, map: Map, state: OverlayState): void {
  const pen = canvas.getContext('2d');
  if (!pen) return;
  const ratio = window.devicePixelRatio;
  const [width, height] = [canvas.clientWidth, canvas.clientHeight].map((px) => Math.round(px * ratio));
  // Setting a size, even the same one, makes the canvas anew: only where it differs.
  if (canvas.width !== width) canvas.width = width ?? 0;
  if (canvas.height !== height) canvas.height = height ?? 0;
  pen.setTransform(ratio, 0, 0, ratio, 0, 0);
  pen.clearRect(0, 0, canvas.clientWidth, canvas.clientHeight);
  const inner = innerOf(canvas);
  const globe = state.projection === 'globe';
  const { layers, flownAzimuthDeg, chosenId } = state.scene;
  const pads = padsInView(map, state, inner, 160);
  const radius = chosenRadius(inner.width);
  pen.save();
  pen.translate(inner.x, inner.y);
  pen.beginPath();
  pen.rect(0, 0, inner.width, inner.height);
  pen.clip();
  if (layers.sectors) drawAllSectors(pen, pads, state, radius);
  const chosen = pads.find(({ site }) => site.id === chosenId);
  if (chosen && flownAzimuthDeg !== null && layers.track)
    drawFlown(pen, chosen.frame, { azimuthDeg: flownAzimuthDeg, radius, colour: state.palette.chosen });
  if (globe && layers.track) drawPolarTracks(pen, map, state);
  if (globe) drawPolarPads(pen, pads, state);
  pen.restore();
  if (globe) {
    pen.strokeStyle = state.palette.ink;
    pen.strokeRect(inner.x - 0.5, inner.y - 0.5, inner.width + 1, inner.height + 1);
  } else {
    drawNeatline(pen, map, inner, state.palette);
    drawScale(pen, map, inner, state.palette);
  }
}
