/** A place in GeoJSON's order, longitude first, with whatever follows the latitude. */
type Place = readonly number[];

const longitudeOf = (place: Place): number => place[0] ?? 0;

/** The place where a step crosses the date line, on the side it comes from; `to` lies beyond ±180°. */
function crossing(from: Place, to: Place, edge: number): number[] {
  const part = (edge - longitudeOf(from)) / (longitudeOf(to) - longitudeOf(from));
  return from.map((value, axis) => (axis === 0 ? edge : value + part * ((to[axis] ?? value) - value)));
}

/**
 * A line over the sphere in pieces that do not cross the date line, cut there as RFC 7946, section 3.1.9, asks. A step
 * of more than half a turn is taken the short way round.
 * @returns pieces of two places or more
 */
export function cutAtDateLine(line: readonly Place[]): number[][][] {
  const pieces: number[][][] = [[]];
  line.forEach((place, index) => {
    const before = line[index - 1];
    const step = before ? longitudeOf(place) - longitudeOf(before) : 0;
    if (before && Math.abs(step) > 180) {
      const edge = step < 0 ? 180 : -180;
      const beyond = place.map((value, axis) => (axis === 0 ? value + 2 * edge : value));
      const met = crossing(before, beyond, edge);
      pieces.at(-1)?.push(met);
      pieces.push([met.map((value, axis) => (axis === 0 ? -edge : value))]);
    }
    pieces.at(-1)?.push([...place]);
  });
  return pieces.filter((piece) => piece.length > 1);
}
