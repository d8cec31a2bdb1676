import { gzipSync } from 'node:zlib';
import { GeoJSONVT, type GeoJSONVTTile } from '@maplibre/geojson-vt';
import { fromGeojsonVt } from '@maplibre/vt-pbf';
import type { FeatureCollection } from 'geojson';

export interface Tile {
  readonly z: number;
  readonly x: number;
  readonly y: number;
  /** Mapbox vector tile 2.1, gzipped. */
  readonly data: Buffer;
}

const extent = 4096;

function indexLayer(data: FeatureCollection, maxZoom: number): GeoJSONVT {
  const options = { maxZoom, indexMaxZoom: maxZoom, indexMaxPoints: 0, extent, buffer: 64, tolerance: 3 };
  return new GeoJSONVT(data, options);
}

/** Cuts the layers into gzipped vector tiles, zoom 0 to `maxZoom`; a tile with nothing in it is left out. */
export function cutTiles(layers: Record<string, FeatureCollection>, maxZoom: number): Tile[] {
  const indexes = Object.entries(layers).map(([name, data]) => [name, indexLayer(data, maxZoom)] as const);
  const tiles: Tile[] = [];
  for (let z = 0; z <= maxZoom; z += 1)
    for (let x = 0; x < 2 ** z; x += 1)
      for (let y = 0; y < 2 ** z; y += 1) {
        const data = cutTile(indexes, z, x, y);
        if (data) tiles.push({ z, x, y, data });
      }
  return tiles;
}

function cutTile(
  indexes: readonly (readonly [string, GeoJSONVT])[],
  z: number,
  x: number,
  y: number,
): Buffer | undefined {
  const found = indexes.flatMap(([name, index]) => {
    const tile = index.getTile(z, x, y);
    // A name not drawn at this zoom yet would only weigh on the tile.
    if (!tile) return [];
    const drawn = tile.features.filter(({ tags }) => !(Number(tags?.zoom) > z));
    const features = drawn as GeoJSONVTTile['features'];
    return features.length > 0 ? [[name, { ...tile, features }] as const] : [];
  });
  if (found.length === 0) return undefined;
  return gzipSync(fromGeojsonVt(Object.fromEntries(found), { version: 2, extent }), { level: 9 });
}
