import { move } from 'piscina';
import type { AscentInput } from '#contract/ascent.ts';
import { ascentBytes } from '#contract/flown-ascent.ts';

/** Entry of a worker thread: a site, an orbit and a vehicle in, the flown ascent as JSON text in bytes. */
export default function ascentThread(input: AscentInput): Uint8Array {
  return move(ascentBytes(input)) as Uint8Array;
}
