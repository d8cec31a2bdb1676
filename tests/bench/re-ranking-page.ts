import { reRanking } from './re-ranking.ts';

/**
 * Moves a weight once a frame, as a hand that drags it does.
 * @returns milliseconds of computing: first of the ranking a page shows before anything can be dragged, then one a frame.
 */
export async function drag(frames: number): Promise<number[]> {
  const move = reRanking();
  const times = [move()];
  while (times.length <= frames) {
    await new Promise((resolve) => requestAnimationFrame(resolve));
    times.push(move());
  }
  return times;
}
