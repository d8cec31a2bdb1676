import type { Acceptability, AcceptabilityQuestion } from '#core/decision/acceptability.ts';
import type { DrawAnswer } from './draw.worker.ts';

export interface DrawListener {
  onProgress: (done: number, total: number) => void;
  onDone: (answer: Acceptability) => void;
  /** The worker broke off: what it said. */
  onFail: (message: string) => void;
}

/**
 * Draws off the page's own thread, so that the page goes on answering.
 * @returns how to stop it; then nothing more is heard
 */
export function startDraws(question: AcceptabilityQuestion, listener: DrawListener): () => void {
  const worker = new Worker(new URL('./draw.worker.ts', import.meta.url), { type: 'module' });
  worker.addEventListener('message', ({ data }: MessageEvent<DrawAnswer>) => {
    if (data.kind === 'progress') return listener.onProgress(data.done, data.total);
    worker.terminate();
    listener.onDone(data.answer);
  });
  worker.addEventListener('error', (event) => {
    worker.terminate();
    listener.onFail(event.message);
  });
  worker.postMessage(question);
  return () => worker.terminate();
}
