import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { archive } from './archive.ts';
import { cutTiles } from './cut.ts';
import { worldLayers } from './layers.ts';

/** Beyond this the map stretches the last tiles: 1:10 million shapes hold no more detail. */
const maxZoom = 6;
const target = fileURLToPath(new URL('../../public/world.pmtiles', import.meta.url));

const started = performance.now();
const layers = worldLayers();
const tiles = cutTiles(layers, maxZoom);
const bytes = archive(
  tiles,
  {
    name: 'Spinward world',
    attribution: 'Natural Earth; GeoNames (CC BY 4.0)',
    vector_layers: Object.keys(layers).map((id) => ({ id, fields: {} })),
  },
  maxZoom,
);
writeFileSync(target, bytes);
const seconds = ((performance.now() - started) / 1000).toFixed(1);
console.info(`world.pmtiles: ${tiles.length} tiles, ${(bytes.length / 1e6).toFixed(2)} MB, ${seconds} s`);
