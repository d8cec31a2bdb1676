import type { Criterion } from '#core/decision/criterion.ts';
import { figureTable, type FigureTable } from '#core/decision/figures.ts';
import type { WeighItem } from '#core/decision/weigh.ts';

export const SITES = 5_000;
export const CRITERIA = 20;

/** Numerical Recipes' 32-bit linear congruential step: a bench needs figures that are the same each time, no more. */
export function uniforms(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 1_664_525 + 1_013_904_223) >>> 0;
    return state / 2 ** 32;
  };
}

/** A large study with a few gaps, three limits and four groups of five criteria. */
export function inventedStudy(): { criteria: Criterion[]; items: WeighItem[]; table: FigureTable } {
  const next = uniforms(42);
  const rows = Array.from({ length: SITES }, () =>
    Array.from({ length: CRITERIA }, () => (next() < 0.001 ? null : next() * 1_000)),
  );
  const criteria = Array.from({ length: CRITERIA }, (_, j): Criterion => ({
    direction: j % 2 === 0 ? 'more' : 'less',
    levels: { kind: 'candidates' },
    limit: j < 3 ? { kind: 'at-least', figure: 20 } : null,
  }));
  const items = criteria.map((_, j): WeighItem => ({ id: `c${j}`, groupId: `g${j % 4}` }));
  return { criteria, items, table: figureTable(rows) };
}

/** Points of every criterion and group, drawn. */
export function drawnPoints(items: readonly WeighItem[], next: () => number): Record<string, number> {
  return Object.fromEntries(
    items.flatMap(({ id, groupId }) => [id, groupId ?? ''].map((key) => [key, 1 + 99 * next()])),
  );
}
