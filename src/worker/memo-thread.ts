import { move } from 'piscina';
import type { MemoModel } from '#contract/memo.ts';
import { renderMemo } from './memo/render.tsx';

/** Entry of a worker thread: a memo in, its bytes out, handed over without a copy. */
export default async function memoThread(model: MemoModel): Promise<Uint8Array> {
  return move(await renderMemo(model)) as Uint8Array;
}
