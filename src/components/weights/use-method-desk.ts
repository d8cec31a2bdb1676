import { useState } from 'react';
import type { WeightSet } from '#components/ranking/use-weight-set.ts';
import type { WeightMethod, WeightStatement } from '#contract/weights.ts';
import type { WeighItem } from '#core/decision/statement.ts';
import { missingOf, type Missing } from './statement.ts';

export interface MethodDesk {
  items: readonly WeighItem[];
  set: WeightSet;
  /** The method on the desk; the weights may still be set by another. */
  method: WeightMethod;
  choose: (method: WeightMethod) => void;
  /** What is said by the method on the desk; null where nothing has been started. */
  draft: WeightStatement | null;
  /** What the draft lacks before it counts; null where it counts. */
  missing: Missing | null;
  /** Says it anew. It counts and is saved once nothing is missing; until then it stays on this screen. */
  say: (statement: WeightStatement) => void;
  /** Lets go of what does not count yet. */
  drop: () => void;
}

/** The ways to set one set of weights, one at a time; what was begun by the others stays. */
export function useMethodDesk(set: WeightSet, items: readonly WeighItem[]): MethodDesk {
  const [choice, choose] = useState<WeightMethod | null>(null);
  const inForce = set.statement.method;
  const method = choice ?? inForce;
  const draft = set.held[method] ?? (method === inForce ? set.statement : null);
  return {
    items,
    set,
    method,
    choose,
    draft,
    missing: draft && missingOf(items, draft),
    say: (said) => {
      const statement = { ...set.statement, method, ...ownPart(said) };
      const counts = missingOf(items, statement) === null;
      set.hold(method, counts ? null : statement);
      if (counts) set.state(statement);
    },
    drop: () => set.hold(method, null),
  };
}

/** What of a statement its method reads; the rest is other methods’ and stays as it is. */
function ownPart({ method, points, order, judgements }: WeightStatement): Partial<WeightStatement> {
  if (method === 'pairwise') return { judgements };
  return method === 'centroid' ? { order } : { points };
}
