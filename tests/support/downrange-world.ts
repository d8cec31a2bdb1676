import fs from 'node:fs';
import { gunzipSync } from 'node:zlib';
import { CELL_UNITS, COLUMNS, ROWS, UNITS_PER_DEG, cellRing, cornerOf } from '#core/downrange/data/cells.ts';
import { ringArea } from '#core/downrange/area.ts';
import type { LandData, LandPiece } from '#core/downrange/data/land-data.ts';
import type { SettlementData } from '#core/downrange/data/settlement-data.ts';
import { decodeLand, decodeSettlements, worldOf, type World } from '#core/downrange/index.ts';

const unpacked = (name: string): Uint8Array =>
  gunzipSync(fs.readFileSync(new URL(`../../public/downrange/${name}.pbf.gz`, import.meta.url)));

export const shippedLand = (): LandData => decodeLand(unpacked('land'));
export const shippedSettlements = (): SettlementData => decodeSettlements(unpacked('settlements'));

/** The world that ships with the app. */
export const shippedWorld = (): World => worldOf(shippedLand(), shippedSettlements());

/** A country that is one rectangle in plane degrees. */
export interface Box {
  readonly code: string;
  readonly west: number;
  readonly south: number;
  readonly east: number;
  readonly north: number;
  readonly people?: number | null;
}

/** A settlement: latitude, longitude, people, and the country it is counted under. */
export type TestPlace = readonly [latitudeDeg: number, longitudeDeg: number, people: number, code?: string];

function pieceIn(box: Box, country: number, cell: number): LandPiece | null {
  const [x, y] = cornerOf(cell);
  const [west, south, east, north] = [box.west, box.south, box.east, box.north].map(
    (d) => d * UNITS_PER_DEG,
  ) as [number, number, number, number];
  const [left, right] = [Math.max(x, west), Math.min(x + CELL_UNITS, east)];
  const [bottom, top] = [Math.max(y, south), Math.min(y + CELL_UNITS, north)];
  if (left >= right || bottom >= top) return null;
  const whole = right - left === CELL_UNITS && top - bottom === CELL_UNITS;
  const ring = whole ? cellRing(cell) : Int32Array.of(left, bottom, right, bottom, right, top, left, top);
  return { country, rings: [ring], whole };
}

/** A world of rectangular countries and a few settlements, for checks with answers known by geometry. */
export function boxWorld(boxes: readonly Box[], places: readonly TestPlace[] = []): World {
  const cells = new Map<number, readonly LandPiece[]>();
  for (let cell = 0; cell < ROWS * COLUMNS; cell += 1) {
    const pieces = boxes.flatMap((box, country) => pieceIn(box, country, cell) ?? []);
    if (pieces.length > 0) cells.set(cell, pieces);
  }
  const all = [...cells.values()].flat();
  const countries = boxes.map(({ code, people = null }, at) => ({
    code,
    name: code,
    people,
    land: all
      .filter(({ country }) => country === at)
      .reduce((sum, { rings }) => sum + rings.reduce((area, ring) => area + ringArea(ring), 0), 0),
  }));
  const codes = [...new Set(places.map(([, , , code]) => code ?? 'AA'))];
  return worldOf(
    { totalsYear: 2020, countries, cells },
    {
      latitudesDeg: Float64Array.from(places, ([latitude]) => latitude),
      longitudesDeg: Float64Array.from(places, ([, longitude]) => longitude),
      people: Uint32Array.from(places, ([, , people]) => people),
      countryCodes: codes,
      countries: Uint16Array.from(places, ([, , , code]) => codes.indexOf(code ?? 'AA')),
      names: places.map((_, at) => `Place ${at + 1}`),
    },
  );
}

/** Numerical Recipes' 32-bit linear congruential step, 0…1: the same each time, no more is asked of it. */
export function* uniforms(seed: number): Generator<number, never> {
  for (let state = seed; ;) {
    state = (state * 1_664_525 + 1_013_904_223) >>> 0;
    yield state / 2 ** 32;
  }
}
