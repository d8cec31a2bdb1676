import type { Corridor } from './corridor.ts';
import { SEA } from './land-map.ts';
import { reachOf, turnsInside } from './polar.ts';
import type { SpreadCount, SpreadPeople } from './spread.ts';
import { MEAN_RADIUS } from './strip.ts';

/** Rings about the launch point, finer near it: out to so many metres in steps of so many. */
const RINGS: readonly (readonly [to: number, step: number])[] = [
  [50e3, 2.5e3],
  [200e3, 5e3],
  [1000e3, 20e3],
  [Infinity, 50e3],
];

function* ringsTo(reach: number): Generator<readonly [number, number]> {
  let from = 0;
  for (const [to, step] of RINGS)
    while (from < Math.min(to, reach)) {
      const next = Math.min(from + step, reach);
      yield [from, next];
      from = next;
    }
}

/** Running sums over one ring, twice round, so that a stretch of bins past north is one difference. */
function runningSums(values: Float64Array): Float64Array {
  const count = values.length;
  const sums = new Float64Array(3 * count + 1);
  for (let at = 0; at < 3 * count; at += 1)
    sums[at + 1] = (sums[at] as number) + (values[at % count] as number);
  return sums;
}

/** The sum up to a place between bins: bin k runs from k − ½ to k + ½. */
function upTo(sums: Float64Array, degrees: number, count: number): number {
  const place = degrees + 0.5 + count;
  const whole = Math.floor(place);
  const share = place - whole;
  const [low, high] = [sums[whole] as number, sums[Math.min(whole + 1, 3 * count)] as number];
  return low + share * (high - low);
}

/**
 * People spread over the land of every corridor of a fan: the rings about the launch point cut into bins of one
 * azimuth, each taken for land of the country under its middle. Within some per cent of the corridors' own counts.
 * @param corridors of one shape from one launch point, evenly all the way round, the first northward
 */
export function spreadOverFan(corridors: readonly Corridor[], spread: SpreadPeople): SpreadCount[] {
  const [first] = corridors;
  if (!first) throw new RangeError('spreadOverFan: no corridors');
  const { shape } = first;
  const count = corridors.length;
  const sums = Array.from({ length: count }, () => ({ people: 0, unknownLand: 0 }));
  for (const [from, to] of ringsTo(reachOf(shape))) {
    const middle = (from + to) / 2;
    const turns = turnsInside(shape, middle);
    if (!turns) continue;
    const arc = 2 * Math.sin((to - from) / (2 * MEAN_RADIUS)) * Math.sin(middle / MEAN_RADIUS);
    const bin = MEAN_RADIUS * MEAN_RADIUS * arc * ((2 * Math.PI) / count);
    const [people, unknown] = [new Float64Array(count), new Float64Array(count)];
    corridors.forEach(({ strip }, at) => {
      const country = spread.map.countryAt(strip.path.at(middle));
      if (country === SEA) return;
      const density = spread.density(country);
      if (density === null) unknown[at] = bin;
      else people[at] = density * bin;
    });
    const [peopleSums, unknownSums] = [runningSums(people), runningSums(unknown)];
    const bins = count / (2 * Math.PI);
    const [low, high] = [turns.low * bins, Math.min(turns.high * bins, count / 2)];
    const within = (all: Float64Array, at: number): number =>
      upTo(all, at + high, count) -
      upTo(all, at - high, count) -
      (upTo(all, at + low, count) - upTo(all, at - low, count));
    sums.forEach((sum, at) => {
      sum.people += within(peopleSums, at);
      sum.unknownLand += within(unknownSums, at);
    });
  }
  return sums;
}
