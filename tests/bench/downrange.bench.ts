import {
  NAUTICAL_MILE,
  PLACE_DENSITY_PER_KM2,
  REMEMBERED_CASUALTY_AREAS,
  azimuthFan,
  corridorOf,
  surveyCorridor,
  type Corridor,
  type World,
} from '#core/downrange/index.ts';
import { containsPlace } from '#core/downrange/corridor.ts';
import { inCorridor } from '#core/downrange/shape.ts';
import { metres } from '#core/units.ts';
import { shippedWorld, uniforms } from '#tests/support/downrange-world.ts';

const CORRIDORS = 60;
const FANS = 5;
const RANGE = metres(5000 * NAUTICAL_MILE);
const DENSITY = PLACE_DENSITY_PER_KM2 / 1e6;

const random = uniforms(3);
const next = () => random.next().value;
const place = () => ({ latitudeDeg: next() * 120 - 60, longitudeDeg: next() * 360 - 180 });

/** Each settlement asked in turn, with the same test that the index's finds are put to. */
function bruteCount(corridor: Corridor, { settlements }: World): number {
  let count = 0;
  for (let at = 0; at < settlements.count; at += 1)
    if (containsPlace(corridor, settlements.place(at), settlements.direction(at))) count += 1;
  return count;
}

/** The plain way: for each settlement of the half of the Earth ahead, its foot on the flight line by geodesics. */
function geodesicCount({ strip, shape }: Corridor, { settlements }: World): number {
  let count = 0;
  for (let at = 0; at < settlements.count; at += 1) {
    const { s, y } = strip.rough(settlements.direction(at));
    if (s < -1e6 || s > 10e6 || Math.abs(y) > 5e6) continue;
    const foot = strip.exact(settlements.place(at));
    if (inCorridor(shape, foot.s, foot.y)) count += 1;
  }
  return count;
}

/** Runs a second of the processor's own time makes, whatever else the machine does. */
function perSecond<T>(items: readonly T[], run: (item: T) => number): { rate: number; found: number } {
  const from = process.cpuUsage();
  const found = items.reduce((sum, item) => sum + run(item), 0);
  const { user, system } = process.cpuUsage(from);
  return { rate: (items.length * 1e6) / (user + system), found };
}

/** Corridor queries by the index beside brute force over the same settlements; whole surveys; fans. */
export async function benchDownrange(): Promise<string[]> {
  const world = shippedWorld();
  const corridors = Array.from({ length: CORRIDORS }, () =>
    corridorOf(place(), next() * 360, 'small', RANGE),
  );
  const byIndex = (corridor: Corridor) => world.settlements.inside(corridor).length;
  const brute = (corridor: Corridor) => bruteCount(corridor, world);
  // Once each before the clock runs, so that neither is timed cold.
  perSecond(corridors.slice(0, 10), byIndex);
  perSecond(corridors.slice(0, 10), brute);
  const [index, plain] = [perSecond(corridors, byIndex), perSecond(corridors, brute)];
  if (index.found !== plain.found) throw new Error(`index ${index.found}, brute force ${plain.found}`);
  const few = corridors.slice(0, 6);
  const geodesics = perSecond(few, (corridor) => geodesicCount(corridor, world));
  if (geodesics.found !== perSecond(few, byIndex).found) throw new Error('geodesics find others');
  const settings = {
    placeDensity: DENSITY,
    spreads: true,
    casualtyAreas: REMEMBERED_CASUALTY_AREAS.small,
  };
  const surveys = perSecond(
    corridors,
    (corridor) => surveyCorridor(world, corridor, settings).corridor.people,
  );
  const sites = Array.from({ length: FANS }, place);
  const fans = perSecond(sites, (site) => azimuthFan(world, site, 'small', RANGE, DENSITY).length);
  return Promise.resolve([
    `downrange: ${index.rate.toFixed(0)} corridor queries/s by the index, ${plain.rate.toFixed(0)}/s by brute force over ${world.settlements.count} settlements, ratio ${(index.rate / plain.rate).toFixed(1)}; the same ${index.found} finds`,
    `downrange: ${geodesics.rate.toFixed(1)} corridor queries/s by geodesics alone, ratio ${(index.rate / geodesics.rate).toFixed(0)}`,
    `downrange: ${surveys.rate.toFixed(1)} whole surveys/s (land, people, expectation)`,
    `downrange: a fan of 360 azimuths to 5,000 nm with spread people in ${(1000 / fans.rate).toFixed(0)} ms; goal under 1,000 ms`,
  ]);
}
