import { readFileSync, writeFileSync } from 'node:fs';
import { geoContains, geoDistance } from 'd3-geo';
import type { MultiPolygon } from 'geojson';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import { writeCsv } from '#core/csv/export.ts';

/*
 * `npx tsx seed/make-candidates.ts` writes seed/candidates-500.csv: 500 invented candidates on real coasts, the same
 * ones every time. Names and figures are drawn at random; none lies within 100 km of a place that launches today.
 */

const SITES = 500;
const EARTH_KM = 6371;
const KEEP_AWAY_KM = 100;

/** Latitude and longitude of places that launch, or are built to. */
const LAUNCHING: readonly (readonly [number, number])[] = [
  [28.5, -80.6],
  [37.8, -75.5],
  [34.7, -120.6],
  [26.0, -97.2],
  [57.4, -152.3],
  [5.2, -52.8],
  [-2.4, -44.4],
  [-5.9, -35.2],
  [19.6, 111.0],
  [36.7, 121.2],
  [13.7, 80.2],
  [8.4, 78.1],
  [8.5, 76.9],
  [34.4, 127.5],
  [30.4, 131.0],
  [31.3, 131.1],
  [42.5, 143.4],
  [33.5, 135.9],
  [31.9, 34.7],
  [69.3, 16.0],
  [60.8, -0.8],
  [58.5, -4.5],
  [57.6, -7.5],
  [-39.3, 177.9],
  [-20.0, 148.1],
  [-12.4, 136.8],
  [-34.9, 135.6],
  [-31.9, 133.4],
  [-2.9, 40.2],
  [-34.6, 20.3],
  [9.0, 167.7],
  [39.7, 124.7],
  [40.9, 129.7],
  [25.3, 60.6],
  [19.7, 57.7],
  [37.0, -25.2],
  [37.1, -6.7],
  [46.9, -55.4],
  [45.3, -61.0],
];

const KINDS = ['Cape', 'Point', 'Bay', 'Head', 'Ness', 'Bluff', 'Sound', 'Strand', 'Reach', 'Spit'];
const STARTS = [
  'Al',
  'Ber',
  'Cor',
  'Dal',
  'El',
  'Fen',
  'Gar',
  'Hol',
  'Il',
  'Jor',
  'Kel',
  'Lun',
  'Mar',
  'Nor',
  'Or',
];
const MIDDLES = ['a', 'e', 'i', 'o', 'u', 'an', 'en', 'is', 'or', 'ul'];
const ENDS = ['bek', 'dra', 'fell', 'gan', 'lis', 'mora', 'nak', 'rin', 'sund', 'ta', 'vik', 'wen', 'zar'];

/** The generator "mulberry32": 32 bits of state, the same stream on any machine. */
function generator(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

const random = generator(20310401);
const between = (low: number, high: number): number => low + random() * (high - low);
const whole = (low: number, high: number): number => Math.round(between(low, high));
function pick<T>(list: readonly T[]): T {
  const item = list[Math.floor(random() * list.length)];
  if (item === undefined) throw new RangeError('pick: the list is empty');
  return item;
}

function readLand(): MultiPolygon {
  const path = new URL('../node_modules/world-atlas/land-50m.json', import.meta.url);
  const atlas = JSON.parse(readFileSync(path, 'utf8')) as Topology<{ land: GeometryCollection }>;
  const [land] = feature(atlas, atlas.objects.land).features;
  if (land?.geometry.type !== 'MultiPolygon') throw new TypeError('the atlas holds no land');
  return land.geometry;
}

/** A place up to 15 km inland of a corner of the coastline. */
function placeOnCoast(land: MultiPolygon): [latitudeDeg: number, longitudeDeg: number] {
  for (;;) {
    const [longitude = 0, latitude = 0] = pick(pick(land.coordinates)[0] ?? []);
    const latitudeDeg = Number((latitude + between(-0.1, 0.1)).toFixed(4));
    const longitudeDeg = Number((longitude + between(-0.1, 0.1)).toFixed(4));
    if (latitudeDeg < -55 || latitudeDeg > 70 || Math.abs(longitudeDeg) > 179.9) continue;
    if (LAUNCHING.some(([lat, lon]) => distanceKm([lon, lat], [longitudeDeg, latitudeDeg]) < KEEP_AWAY_KM))
      continue;
    if (geoContains(land, [longitudeDeg, latitudeDeg])) return [latitudeDeg, longitudeDeg];
  }
}

function distanceKm(a: [number, number], b: [number, number]): number {
  return geoDistance(a, b) * EARTH_KM;
}

function unusedName(used: Set<string>): string {
  for (;;) {
    const name = `${pick(STARTS)}${pick(MIDDLES)}${pick(ENDS)} ${pick(KINDS)}`;
    if (used.has(name)) continue;
    used.add(name);
    return name;
  }
}

function sectors(): string {
  const from = whole(0, 359);
  const span = whole(60, 180);
  return random() < 0.1 ? 'all round' : `${from}-${(from + span) % 360}`;
}

function candidates(): (string | number)[][] {
  const land = readLand();
  const used = new Set<string>();
  return Array.from({ length: SITES }, () => {
    const place = placeOnCoast(land);
    const cost = random() < 0.04 ? '' : whole(190, 420);
    const figures = [whole(1, 380), cost, whole(34, 66), whole(130, 310), whole(0, 4)];
    return [unusedName(used), ...place, whole(2, 160), sectors(), ...figures];
  });
}

const heading = [
  'name',
  'latitude_deg',
  'longitude_deg',
  'elevation_m',
  'permitted_azimuths',
  'Nearest port (km)',
  'Cost to first launch (M€)',
  'Time to first launch (months)',
  'Launch days a year (days)',
  'Access (rating 0–4)',
];
writeFileSync(new URL('candidates-500.csv', import.meta.url), writeCsv([heading, ...candidates()]));
