const STEP = 'spinward:step';

/** Told by the n and p keys: the next or the previous site. */
export function announceStep(step: 1 | -1) {
  document.dispatchEvent(new CustomEvent<1 | -1>(STEP, { detail: step }));
}

/** @returns how to stop hearing */
export function onStep(take: (step: 1 | -1) => void): () => void {
  const hear = (event: Event) => {
    if (event instanceof CustomEvent) take(event.detail as 1 | -1);
  };
  document.addEventListener(STEP, hear);
  return () => document.removeEventListener(STEP, hear);
}
