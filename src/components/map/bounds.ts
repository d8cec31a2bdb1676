export interface Bounds {
  readonly west: number;
  readonly south: number;
  /** May pass 180 where the places lie across the date line. */
  readonly east: number;
  readonly north: number;
}

interface Place {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
}

/** Places all round the world leave no gap worth turning the map for. */
const leastGapDeg = 60;

/** The least box round the places: its west edge lies behind the widest gap of longitudes. Undefined without any. */
export function boundsOf(places: readonly Place[]): Bounds | undefined {
  const longitudes = places.map(({ longitudeDeg }) => longitudeDeg).sort((a, b) => a - b);
  const first = longitudes[0];
  const last = longitudes.at(-1);
  if (first === undefined || last === undefined) return undefined;
  let best = { gap: first + 360 - last, west: first, east: last };
  longitudes.forEach((longitude, index) => {
    const next = longitudes[index + 1];
    if (next !== undefined && next - longitude > best.gap)
      best = { gap: next - longitude, west: next, east: longitude + 360 };
  });
  let [south, north] = [90, -90];
  for (const { latitudeDeg } of places) {
    south = Math.min(south, latitudeDeg);
    north = Math.max(north, latitudeDeg);
  }
  const round = best.gap < leastGapDeg;
  return { west: round ? -180 : best.west, east: round ? 180 : best.east, south, north };
}
