/*
 * The server front and Astro's bundle are two module graphs in one process: what has to be stopped is handed over
 * through one well-known symbol.
 */
const STOPS = Symbol.for('spinward.stops');
type Stop = () => Promise<unknown> | void;
const holder = globalThis as { [STOPS]?: Stop[] };

/** Registers what to do when the process is asked to stop. */
export function onStop(stop: Stop): void {
  (holder[STOPS] ??= []).push(stop);
}

/** Runs every registered stop, newest first; one that fails does not keep the others from running. */
export async function stopAll(): Promise<void> {
  const stops = holder[STOPS] ?? [];
  while (stops.length) await Promise.resolve(stops.pop()?.()).catch(() => undefined);
}
