import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { AcceptabilityOf, DrawQuery } from '#contract/sensitivity.ts';
import { acceptabilityQuestionOf, presentAcceptability } from '#contract/sensitivity-model.ts';
import type { Subject } from '#contract/sensitivity-subject.ts';
import { startDraws } from './start-draws.ts';

/** Draws under way, told once they take longer than a moment. */
export interface DrawProgress {
  done: number;
  total: number;
  secondsLeft: number | null;
}

export interface LiveAcceptability {
  /** The last answer; it stays, marked stale, while another is drawn. */
  answer: AcceptabilityOf | null;
  stale: boolean;
  progress: DrawProgress | null;
  cancelled: boolean;
  failed: string | null;
  cancel: () => void;
  again: () => void;
}

/** Weights that are being dragged are drawn once they rest. */
const PAUSE_MS = 250;
const MOMENT_MS = 500;
/** Before this much is done the time left is a guess. */
const TELLING_SHARE = 0.1;

interface Task {
  subject: Subject;
  query: DrawQuery;
  sitesLeftOut: number;
}
/** How the task in hand ended, or how far it is. */
type Course =
  | { kind: 'running'; task: Task; progress: DrawProgress }
  | { kind: 'cancelled'; task: Task }
  | { kind: 'failed'; task: Task; message: string };

/** Draws about the ranking's weights and figures in a worker, and again whenever either moves. */
export function useAcceptability(
  subject: Subject | null,
  { model, band, samples, seed }: DrawQuery,
  rankedSites: number,
): LiveAcceptability {
  const [attempt, setAttempt] = useState(0);
  const [held, setHeld] = useState<{ task: Task; answer: AcceptabilityOf } | null>(null);
  const [course, setCourse] = useState<Course | null>(null);
  const stop = useRef(() => {});
  const task = useMemo((): Task | null => {
    if (!subject || subject.sites.length < 2) return null;
    const query = { model, band, samples, seed };
    return { subject, query, sitesLeftOut: rankedSites - subject.sites.length };
  }, [subject, model, band, samples, seed, rankedSites]);

  useEffect(() => {
    if (!task) return;
    let stopDraws = () => {};
    const timer = setTimeout(() => {
      const startedAt = performance.now();
      stopDraws = startDraws(acceptabilityQuestionOf(task.subject, task.query), {
        onProgress: (done, total) => {
          const elapsed = performance.now() - startedAt;
          if (elapsed < MOMENT_MS) return;
          const secondsLeft =
            done / total < TELLING_SHARE ? null : Math.ceil(((elapsed / done) * (total - done)) / 1000);
          setCourse({ kind: 'running', task, progress: { done, total, secondsLeft } });
        },
        onDone: (answer) => {
          setHeld({
            task,
            answer: presentAcceptability(task.subject, task.query, answer, task.sitesLeftOut),
          });
          setCourse(null);
        },
        onFail: (message) => setCourse({ kind: 'failed', task, message }),
      });
    }, PAUSE_MS);
    stop.current = () => {
      clearTimeout(timer);
      stopDraws();
    };
    return () => stop.current();
  }, [task, attempt]);

  const cancel = useCallback(() => {
    stop.current();
    if (task) setCourse({ kind: 'cancelled', task });
  }, [task]);
  const again = useCallback(() => {
    setCourse(null);
    setAttempt((now) => now + 1);
  }, []);
  const own = course?.task === task ? course : null;
  return {
    answer: task && held ? held.answer : null,
    stale: held !== null && held.task !== task,
    progress: own?.kind === 'running' ? own.progress : null,
    cancelled: own?.kind === 'cancelled',
    failed: own?.kind === 'failed' ? own.message : null,
    cancel,
    again,
  };
}
