/** On a machine that does other work besides, a goal can be missed many times over without anything being wrong. */
const SLACK = 4;

/**
 * Holds a duration against its goal: the figure is printed beside the goal, and only what is several times over it
 * fails. Speeds are measured by the benches; this notices what hangs.
 */
export function expectSoon(what: string, tookMs: number, goalMs: number): void {
  process.stdout.write(`${what}: ${tookMs.toFixed(0)} ms, goal ${goalMs} ms\n`);
  if (tookMs > goalMs * SLACK)
    throw new Error(`${what} took ${tookMs.toFixed(0)} ms; the goal is ${goalMs} ms.`);
}
