import { TileType } from 'pmtiles';
import { describe, expect, test } from 'vitest';
import { isLand, readLayer, tilePlace, world, worldBytes } from './read-world.ts';

/** Places anyone can look up in an atlas, well inside land or well out at sea [from memory, WGS 84 degrees]. */
const land: [name: string, longitude: number, latitude: number][] = [
  ['Bamako', -8.0, 12.65],
  ['Kumasi', -1.62, 6.69],
  ['Kano', 8.52, 12.0],
  ['Brasília', -47.9, -15.8],
  ['Moscow', 37.6, 55.75],
  ['Alice Springs', 133.9, -23.7],
  ['Chukotka, east of the date line', -175, 66.7],
  ['Chukotka, west of the date line', 177, 67],
  ['Marie Byrd Land', -120, -80],
  ['Wilkes Land', 120, -75],
  ['Antarctica on Greenwich', 0, -80],
];
const sea: [name: string, longitude: number, latitude: number][] = [
  ['Gulf of Guinea', 2, -2],
  ['mid Atlantic on the parallel of Bamako', -38, 12.65],
  ['mid Pacific', -140, 10],
  ['Pacific east of the date line', -179.9, 30],
  ['Pacific west of the date line', 179.9, 30],
  ['south Atlantic on the parallel of Fiji', -20, -16.8],
  ['Indian Ocean on the parallel of Fiji', 80, -16.8],
  ['Norwegian Sea on the parallel of Wrangel Island', 5, 71.2],
  ['Baffin Bay on the parallel of Wrangel Island', -65, 71.2],
  ['North Sea', 3, 56.2],
  ['Tasman Sea', 160, -38],
];

describe('world.pmtiles', () => {
  test('holds the world from zoom 0 to 6 as vector tiles', async () => {
    const header = await world.getHeader();
    expect(header).toMatchObject({ specVersion: 3, tileType: TileType.Mvt, minZoom: 0, maxZoom: 6 });
    expect([header.minLon, header.maxLon]).toEqual([-180, 180]);
    expect(worldBytes).toBeLessThan(4_000_000);
  });

  test('names its sources', async () => {
    expect(await world.getMetadata()).toMatchObject({ attribution: 'Natural Earth; GeoNames (CC BY 4.0)' });
  });

  test.each([0, 2, 4, 6])('draws land as land and sea as sea at zoom %i', async (zoom) => {
    for (const [name, ...place] of land) expect(await isLand(...place, zoom), name).toBe(true);
    for (const [name, ...place] of sea) expect(await isLand(...place, zoom), name).toBe(false);
  });

  test.each(['coast', 'border', 'river'])('no %s line runs across the map', async (name) => {
    const layer = await readLayer(name, 0, 0, 0);
    expect(layer?.length).toBeGreaterThan(0);
    for (let index = 0; layer && index < layer.length; index += 1)
      for (const line of layer.feature(index).loadGeometry())
        // The longest true step is the border along 49° north, 28° of longitude.
        line.forEach((point, at) => {
          const step = Math.abs(point.x - (line[at - 1] ?? point).x);
          expect(step).toBeLessThan(layer.extent / 8);
        });
  });

  test.each([
    ['sea', 'Gulf of Guinea', 3, 1.5, 3],
    ['country', 'Ghana', -1.2, 8, 5],
    ['place', 'Accra', -0.2, 5.56, 5],
    ['place', 'Hanga Roa', -109.43, -27.15, 6],
  ] as const)('names: %s holds %s', async (name, label, longitude, latitude, zoom) => {
    const [x, y] = tilePlace(longitude, latitude, zoom);
    const layer = await readLayer(name, zoom, Math.floor(x), Math.floor(y));
    const names = Array.from({ length: layer?.length ?? 0 }, (_, at) => layer?.feature(at).properties.name);
    expect(names).toContain(label);
  });
});
