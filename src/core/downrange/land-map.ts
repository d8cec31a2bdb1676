import { ringArea } from './area.ts';
import { UNITS_PER_DEG, cellAt } from './data/cells.ts';
import type { Country, LandData, LandPiece } from './data/land-data.ts';
import type { Place } from './geodesic.ts';

/** No land: the country of the sea. */
export const SEA = -1;

/** Whether a point in units lies inside a piece: crossings of a ray to the east with all its rings, counted. */
function pieceHolds(rings: readonly Int32Array[], x: number, y: number): boolean {
  let inside = false;
  for (const ring of rings) {
    let [x0, y0] = [ring[ring.length - 2] as number, ring[ring.length - 1] as number];
    for (let at = 0; at < ring.length; at += 2) {
      const [x1, y1] = [ring[at] as number, ring[at + 1] as number];
      if (y0 > y !== y1 > y && x < x0 + ((y - y0) / (y1 - y0)) * (x1 - x0)) inside = !inside;
      [x0, y0] = [x1, y1];
    }
  }
  return inside;
}

/** The world's land with what is asked of it: whose a place is, and how much there is. */
export class LandMap {
  readonly #areas = new Map<LandPiece, number>();

  constructor(readonly data: LandData) {}

  country(at: number): Country {
    return this.data.countries[at] as Country;
  }

  /** What lies in a cell; nothing at sea. */
  pieces(cell: number): readonly LandPiece[] {
    return this.data.cells.get(cell) ?? [];
  }

  /** The country a place in plane degrees lies in, or SEA. */
  countryAt({ latitudeDeg, longitudeDeg }: Place): number {
    const pieces = this.pieces(cellAt(latitudeDeg, longitudeDeg));
    if (pieces.length === 0) return SEA;
    // 180° E and W are one meridian, and the cells begin there.
    const [x, y] = [
      (longitudeDeg >= 180 ? longitudeDeg - 360 : longitudeDeg) * UNITS_PER_DEG,
      latitudeDeg * UNITS_PER_DEG,
    ];
    const found = pieces.find(({ rings, whole }) => whole || pieceHolds(rings, x, y));
    return found ? found.country : SEA;
  }

  /** Area of a piece, m². */
  areaOf(piece: LandPiece): number {
    const known = this.#areas.get(piece);
    if (known !== undefined) return known;
    // Holes run the other way round, so the rings' signed areas add up.
    const area = piece.rings.reduce((sum, ring) => sum + ringArea(ring), 0);
    this.#areas.set(piece, area);
    return area;
  }
}
