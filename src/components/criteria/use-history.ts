import { useState } from 'react';
import type { CriterionSettings } from './criterion-form.ts';

type Settings = Partial<CriterionSettings>;

/** A change that was saved from this screen, and what stood there before. */
interface Step {
  before: Settings;
  after: Settings;
}

export interface History {
  /** Nothing to take back yet. */
  empty: boolean;
  note: (before: Settings, after: Settings) => void;
  /** Takes the last change off the list and gives it to be undone. */
  takeLast: () => Step | undefined;
}

/** Changes of one criterion since its form was opened, the last one first to be taken back. */
export function useHistory(): History {
  const [steps, setSteps] = useState<readonly Step[]>([]);
  return {
    empty: steps.length === 0,
    note: (before, after) => setSteps((now) => [...now, { before, after }]),
    takeLast: () => {
      setSteps((now) => now.slice(0, -1));
      return steps.at(-1);
    },
  };
}
