import {
  acceptabilityRun,
  type Acceptability,
  type AcceptabilityQuestion,
} from '#core/decision/acceptability.ts';

/** What a worker tells while it draws, and at the end. */
export type DrawAnswer =
  { kind: 'progress'; done: number; total: number } | { kind: 'done'; answer: Acceptability };

/** Draws between two looks at the clock, and how often the page hears of it. */
const STEP = 100;
const TELL_EVERY_MS = 100;

self.addEventListener('message', ({ data }: MessageEvent<AcceptabilityQuestion>) => {
  const run = acceptabilityRun(data);
  const tell = (answer: DrawAnswer): void => self.postMessage(answer);
  for (let told = performance.now(); !run.step(STEP);) {
    if (performance.now() - told < TELL_EVERY_MS) continue;
    told = performance.now();
    tell({ kind: 'progress', done: run.done, total: run.total });
  }
  tell({ kind: 'done', answer: run.result() });
});
