import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { placeLabels, type Box } from '#server/memo/labels.ts';
import { drawMap, type MapSite } from '#server/memo/map.ts';
import { longitudeArc } from '#server/memo/map-view.ts';

const at = (latitudeDeg: number, longitudeDeg: number, index = 0): MapSite => ({
  code: `S${index}`,
  latitudeDeg,
  longitudeDeg,
  mark: index === 0 ? 'leads' : 'ranked',
});
const WIDTH = 504;

/** Points of SVG path data made of M, L and Z alone, one list a subpath. */
const subpaths = (d: string): [number, number][][] =>
  d
    .split('M')
    .slice(1)
    .map((part) =>
      [...part.matchAll(/(-?[\d.]+),(-?[\d.]+)/g)].map(([, x, y]): [number, number] => [
        Number(x),
        Number(y),
      ]),
    );

describe('the coast', () => {
  test.each([
    ['the whole Earth', [at(-55, -68), at(70, 25, 1), at(7, -58, 2), at(-17, 178, 3)]],
    ['the Pacific across the date line', [at(52, 177), at(51, -176, 1), at(-17, 179, 2), at(65, -178, 3)]],
    ['islands at the date line', [at(-16.6, 179.9), at(-17.2, -179.7, 1)]],
  ])('has no line across the map: %s', (_, sites) => {
    const map = drawMap(sites, [], WIDTH);
    const bottom = map.height - 11;
    for (const points of subpaths(map.land)) {
      points.slice(1).forEach(([x, y], index) => {
        const [x0, y0] = points[index] ?? [x, y];
        // Along the frame a land that runs out of the view is closed in one stroke, under the frame's own line.
        const onFrame =
          (y === y0 && (y <= 0.1 || y >= bottom - 0.2)) || (x === x0 && (x <= 26.1 || x >= WIDTH - 0.1));
        if (!onFrame) expect(Math.hypot(x - x0, y - y0)).toBeLessThan(40);
      });
    }
  });

  test('puts no seam of the date line into the view: the 180° meridian is no coast', () => {
    const map = drawMap([at(65, 178), at(66, -176, 1), at(62, 179, 2)], [], WIDTH);
    const meridian = map.degrees.find(({ text }) => text === '180°')?.x ?? NaN;
    const along = subpaths(map.land).flatMap((points) =>
      points
        .slice(1)
        .filter(
          ([x, y], index) =>
            Math.abs(x - meridian) < 0.15 &&
            Math.abs((points[index]?.[0] ?? 0) - meridian) < 0.15 &&
            Math.abs(y - (points[index]?.[1] ?? 0)) > 3,
        ),
    );
    expect(along).toEqual([]);
  });
});

describe('longitude arc', () => {
  // [derived] by hand on the circle.
  test.each([
    [[10, 20, 40], 25, 30],
    [[170, -170], 180, 20],
    [[-179, 179, 175], 178, 6],
    [[5], 5, 0],
  ])('%j is about %d, %d wide', (longitudes, mid, span) => {
    const arc = longitudeArc(longitudes);
    expect(Math.abs(((arc.midDeg - mid + 540) % 360) - 180)).toBeLessThan(1e-9);
    expect(arc.spanDeg).toBeCloseTo(span, 9);
  });
});

describe('labels', () => {
  const frame: Box = { left: 26, top: 0, right: WIDTH, bottom: 240 };
  const sizes = { character: 4.2, ascent: 5.4, descent: 1.6, pad: 3.6 };
  const boxOf = (label: { x: number; y: number; text: string }): Box => ({
    left: label.x,
    right: label.x + label.text.length * sizes.character,
    top: label.y - sizes.ascent,
    bottom: label.y + sizes.descent,
  });
  const apart = (a: Box, b: Box): boolean =>
    a.right <= b.left + 1e-6 ||
    b.right <= a.left + 1e-6 ||
    a.bottom <= b.top + 1e-6 ||
    b.bottom <= a.top + 1e-6;

  test('never cover one another or a pad, and stay inside the frame, wherever the pads lie', () => {
    const pad = fc.record({
      x: fc.double({ min: 30, max: WIDTH - 4, noNaN: true }),
      y: fc.double({ min: 4, max: 236, noNaN: true }),
      text: fc.stringMatching(/^[A-Z0-9]{2,8}$/),
    });
    fc.assert(
      fc.property(fc.array(pad, { minLength: 1, maxLength: 40 }), (pads) => {
        const placed = placeLabels(pads, pads, frame, sizes).filter((label) => label !== null);
        const boxes = placed.map(boxOf);
        boxes.forEach((box, index) => {
          expect(box.left).toBeGreaterThanOrEqual(frame.left - 1e-6);
          expect(box.right).toBeLessThanOrEqual(frame.right + 1e-6);
          for (const other of boxes.slice(index + 1)) expect(apart(box, other)).toBe(true);
          for (const { x, y } of pads)
            expect(apart(box, { left: x - 3.6, right: x + 3.6, top: y - 3.6, bottom: y + 3.6 })).toBe(true);
        });
      }),
      { seed: 7, numRuns: 60 },
    );
  });

  test('twelve sites over the Earth are all named', () => {
    const sites = Array.from({ length: 12 }, (_, index) => at(-55 + 11 * index, -170 + 29 * index, index));
    expect(drawMap(sites, [], WIDTH).pads.every(({ label }) => label !== null)).toBe(true);
  });

  test('neighbours that stand close get leaders', () => {
    const sites = Array.from({ length: 9 }, (_, index) =>
      at(10 + 0.12 * Math.floor(index / 3), 20 + 0.12 * (index % 3), index),
    );
    const pads = drawMap(sites, [], WIDTH).pads;
    expect(pads.every(({ label }) => label !== null)).toBe(true);
    expect(pads.some(({ leader }) => leader !== null)).toBe(true);
  });
});
