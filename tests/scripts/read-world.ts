import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { VectorTile, type VectorTileLayer } from '@mapbox/vector-tile';
import { PbfReader } from 'pbf';
import { PMTiles, type Source } from 'pmtiles';

const path = fileURLToPath(new URL('../../public/world.pmtiles', import.meta.url));
const bytes = readFileSync(path);

const source: Source = {
  getKey: () => path,
  getBytes: (offset, length) => {
    const part = Uint8Array.from(bytes.subarray(offset, offset + length));
    return Promise.resolve({ data: part.buffer });
  },
};

/** The committed archive, read by the library the map reads it with. */
export const world = new PMTiles(source);
export const worldBytes = bytes.length;

export async function readLayer(
  name: string,
  z: number,
  x: number,
  y: number,
): Promise<VectorTileLayer | undefined> {
  const found = await world.getZxy(z, x, y);
  return found && new VectorTile(new PbfReader(new Uint8Array(found.data))).layers[name];
}

/** Web mercator place in tiles of one zoom: whole part the tile, rest the place in it (OGC 17-083r4, annex D). */
export function tilePlace(longitudeDeg: number, latitudeDeg: number, zoom: number): [number, number] {
  const y = Math.asinh(Math.tan((latitudeDeg * Math.PI) / 180)) / Math.PI;
  return [((longitudeDeg + 180) / 360) * 2 ** zoom, ((1 - y) / 2) * 2 ** zoom];
}

interface Point {
  readonly x: number;
  readonly y: number;
}

/** Even-odd rule over all rings together: holes and islands come out by themselves. */
function covers(rings: readonly (readonly Point[])[], x: number, y: number): boolean {
  let inside = false;
  for (const ring of rings)
    ring.forEach((b, index) => {
      const a = ring.at(index - 1);
      if (!a || a.y > y === b.y > y) return;
      if (x < a.x + ((y - a.y) / (b.y - a.y)) * (b.x - a.x)) inside = !inside;
    });
  return inside;
}

export async function isLand(longitudeDeg: number, latitudeDeg: number, zoom: number): Promise<boolean> {
  const [x, y] = tilePlace(longitudeDeg, latitudeDeg, zoom);
  const layer = await readLayer('land', zoom, Math.floor(x), Math.floor(y));
  if (!layer) return false;
  const features = Array.from({ length: layer.length }, (_, index) => layer.feature(index));
  return features.some((one) => covers(one.loadGeometry(), (x % 1) * layer.extent, (y % 1) * layer.extent));
}
