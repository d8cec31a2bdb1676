import type { Palette } from './palette.ts';

const scale = 2;

function drawn(side: number, paint: (pen: CanvasRenderingContext2D) => void): ImageData {
  const canvas = document.createElement('canvas');
  canvas.width = canvas.height = side * scale;
  // Read back at once: kept in memory, so that it waits for no graphics process.
  const pen = canvas.getContext('2d', { willReadFrequently: true });
  if (!pen) throw new Error('a canvas gave no pen');
  pen.scale(scale, scale);
  pen.translate(side / 2, side / 2);
  paint(pen);
  return pen.getImageData(0, 0, side * scale, side * scale);
}

function triangle(pen: CanvasRenderingContext2D, height: number): void {
  const half = height / Math.sqrt(3);
  pen.beginPath();
  pen.moveTo(0, (-2 / 3) * height);
  pen.lineTo(half, height / 3);
  pen.lineTo(-half, height / 3);
  pen.closePath();
}

function dot(pen: CanvasRenderingContext2D, radius: number): void {
  pen.beginPath();
  pen.arc(0, 0, radius, 0, 2 * Math.PI);
}

/** A survey station: an open triangle with its point in the middle. */
export function drawPad(pen: CanvasRenderingContext2D, p: Palette): void {
  triangle(pen, 12);
  pen.fillStyle = p.sea;
  pen.fill();
  pen.strokeStyle = p.pad;
  pen.lineWidth = 1.6;
  pen.lineJoin = 'round';
  pen.stroke();
  dot(pen, 1.2);
  pen.fillStyle = p.pad;
  pen.fill();
}

export function drawChosenPad(pen: CanvasRenderingContext2D, p: Palette): void {
  triangle(pen, 15.5);
  pen.fillStyle = p.chosen;
  pen.fill();
  pen.strokeStyle = p.sea;
  pen.lineWidth = 1;
  pen.lineJoin = 'round';
  pen.stroke();
  dot(pen, 1.4);
  pen.fillStyle = p.onSignal;
  pen.fill();
}

/** The pictures that symbol layers name, in the theme's colours. */
export function imagesOf(p: Palette): Record<string, ImageData> {
  return {
    pad: drawn(20, (pen) => drawPad(pen, p)),
    'chosen-pad': drawn(24, (pen) => drawChosenPad(pen, p)),
    place: drawn(8, (pen) => {
      dot(pen, 1.6);
      pen.fillStyle = p.label;
      pen.fill();
    }),
    // Across the track: icons are turned by the track's heading from north, which is up.
    tick: drawn(16, (pen) => {
      pen.strokeStyle = p.chosen;
      pen.lineWidth = 2;
      pen.beginPath();
      pen.moveTo(-6, 0);
      pen.lineTo(6, 0);
      pen.stroke();
    }),
  };
}
export const imageScale = scale;
