import type { Minimise } from './plain-flight.ts';

/** Places in 0…1: even ones, and ones that crowd towards both ends, where valleys may be very narrow. */
const GRID: readonly number[] = [
  ...Array.from({ length: 801 }, (_, k) => k / 800),
  ...Array.from({ length: 120 }, (_, k) => 10 ** (-9 + k / 16)).filter((x) => x < 0.5),
]
  .flatMap((x) => [x, 1 - x])
  .sort((a, b) => a - b)
  .filter((x, k, all) => x - (all[k - 1] ?? -1) > 1e-12);

/** The least of a function by brute force: a fine grid, then ever finer ones about its best places. */
export const scan: Minimise = (f, low, high) => {
  const width = high - low;
  let best = { x: low, value: f(low) };
  const look = (x: number) => {
    const value = f(x);
    if (value < best.value) best = { x, value };
    return value;
  };
  const values = GRID.map((t) => look(low + width * t));
  const lows = values
    .map((value, k) => ({ value, k }))
    .filter(({ value, k }) => value <= (values[k - 1] ?? Infinity) && value <= (values[k + 1] ?? Infinity))
    .filter(({ value }) => value < Infinity)
    .sort((a, b) => a.value - b.value)
    .slice(0, 4);
  for (const { k } of lows) zoom(look, low + width * (GRID[k - 1] ?? 0), low + width * (GRID[k + 1] ?? 1));
  return best;
};

function zoom(look: (x: number) => number, from: number, to: number): void {
  let [a, b] = [from, to];
  for (let round = 0; round < 12; round++) {
    const step = (b - a) / 20;
    let [at, least] = [a, Infinity];
    for (let k = 0; k <= 20; k++) {
      const value = look(a + k * step);
      if (value < least) [at, least] = [a + k * step, value];
    }
    [a, b] = [Math.max(a, at - step), Math.min(b, at + step)];
  }
}
