import { createRequire } from 'node:module';
import { FillRule, rectClip, union, type Paths64 } from 'clipper2-ts';
import type { Position } from 'geojson';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import { CELL_UNITS, COLUMNS, ROWS, UNITS_PER_DEG, cellRing, cornerOf } from '#core/downrange/data/cells.ts';
import { ringArea } from '#core/downrange/area.ts';
import type { Country, LandData, LandPiece } from '#core/downrange/data/land-data.ts';
import type { SettlementData } from '#core/downrange/data/settlement-data.ts';
import { cutPolygons } from '../tiles/planar.ts';
import { NO_COUNTRY, TOTALS_YEAR, codeOfNumber, countryName, countryTotals } from './countries.ts';
import { ownerFinder } from './owners.ts';

const read = createRequire(import.meta.url);
type Atlas = Topology<{ countries: GeometryCollection<{ name: string }> }>;

const toPath = (ring: readonly Position[]): Paths64[number] =>
  ring.map(([x = 0, y = 0]) => ({ x: Math.round(x * UNITS_PER_DEG), y: Math.round(y * UNITS_PER_DEG) }));

/** The atlas's polygons cut at the date line, by the code of the country that their people are counted under. */
function polygonsByCode(settlements: SettlementData): Map<string, Paths64[]> {
  const atlas = read('world-atlas/countries-10m.json') as Atlas;
  const findOwner = ownerFinder(settlements);
  const found = new Map<string, Paths64[]>();
  for (const { geometry, id } of feature(atlas, atlas.objects.countries).features) {
    if (geometry.type !== 'Polygon' && geometry.type !== 'MultiPolygon') continue;
    for (const { geometry: cut } of cutPolygons([geometry]))
      for (const rings of cut.type === 'Polygon' ? [cut.coordinates] : cut.coordinates) {
        const code = findOwner(rings[0] ?? [], codeOfNumber(id)) ?? NO_COUNTRY;
        found.set(code, [...(found.get(code) ?? []), rings.map(toPath)]);
      }
  }
  return found;
}

/** Numbers from the cell that holds the first to the one that holds the last. */
function span(values: readonly number[], origin: number, most: number): number[] {
  const cell = (value: number) => Math.floor((value - origin) / CELL_UNITS);
  const first = Math.max(0, cell(Math.min(...values)));
  const last = Math.min(most - 1, cell(Math.max(...values)));
  return Array.from({ length: last - first + 1 }, (_, step) => first + step);
}

function cellsUnder(outline: Paths64[number]): number[] {
  const columns = span(
    outline.map(({ x }) => x),
    -180 * UNITS_PER_DEG,
    COLUMNS,
  );
  const rows = span(
    outline.map(({ y }) => y),
    -90 * UNITS_PER_DEG,
    ROWS,
  );
  return rows.flatMap((row) => columns.map((column) => row * COLUMNS + column));
}

function partsInCell(rings: Paths64, cell: number): Paths64 {
  const [left, top] = cornerOf(cell);
  const clipped = rectClip({ left, top, right: left + CELL_UNITS, bottom: top + CELL_UNITS }, rings);
  return clipped.length === 0 ? [] : union(clipped, FillRule.EvenOdd);
}

const isWhole = (paths: Paths64): boolean =>
  paths.length === 1 &&
  paths[0]?.length === 4 &&
  Math.max(...paths[0].map(({ x }) => x)) - Math.min(...paths[0].map(({ x }) => x)) === CELL_UNITS &&
  Math.max(...paths[0].map(({ y }) => y)) - Math.min(...paths[0].map(({ y }) => y)) === CELL_UNITS;

function pieceOf(country: number, cell: number, parts: Paths64): LandPiece {
  if (isWhole(parts)) return { country, rings: [cellRing(cell)], whole: true };
  const rings = parts.map((path) => Int32Array.from(path.flatMap(({ x, y }) => [x, y])));
  return { country, rings, whole: false };
}

/** Natural Earth's countries at 1:10 million, cut by the net of cells, with each country's total of people. */
export function worldLand(settlements: SettlementData): LandData {
  const polygons = polygonsByCode(settlements);
  const totals = countryTotals();
  const codes = [...polygons.keys()].sort();
  const found = new Map<number, LandPiece[]>();
  const countries = codes.map((code, country): Country => {
    const inCell = new Map<number, Paths64>();
    for (const rings of polygons.get(code) ?? [])
      for (const cell of cellsUnder(rings[0] ?? [])) {
        const parts = partsInCell(rings, cell);
        if (parts.length > 0) inCell.set(cell, [...(inCell.get(cell) ?? []), ...parts]);
      }
    const pieces = [...inCell].map(([cell, parts]) => [cell, pieceOf(country, cell, parts)] as const);
    for (const [cell, piece] of pieces) found.set(cell, [...(found.get(cell) ?? []), piece]);
    const land = pieces.flatMap(([, { rings }]) => rings.map(ringArea)).reduce((sum, area) => sum + area, 0);
    return { code, name: countryName(code), people: totals.get(code) ?? null, land };
  });
  const cells = new Map([...found].sort(([a], [b]) => a - b));
  return { totalsYear: TOTALS_YEAR, countries, cells };
}
