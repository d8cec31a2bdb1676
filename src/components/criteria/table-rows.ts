import type { Criterion } from '#contract/criterion.ts';
import { levelsOf } from '#core/decision/statement.ts';

/** A line of the table of criteria: a group's heading, or a criterion with the places it moves to. */
export type TableRow =
  | { kind: 'group'; groupId: string }
  | {
      kind: 'criterion';
      criterion: Criterion;
      grouped: boolean;
      /** The position that brings it past what stands over or under it on its level; null at an end. */
      up: number | null;
      down: number | null;
    };

/** Criteria in their order, each group's together where its first one stands. */
export function tableRows(items: readonly Criterion[]): TableRow[] {
  const [top, ...groups] = levelsOf(items);
  const within = new Map<string | null, readonly string[]>(groups.map(({ groupId, ids }) => [groupId, ids]));
  const placeOf = new Map(items.map(({ id }, place) => [id, place]));
  /** Places of a criterion, or of all in a group. */
  const places = (id: string): number[] => (within.get(id) ?? [id]).map((one) => placeOf.get(one) ?? 0);
  const rowsOf = (ids: readonly string[], grouped: boolean): TableRow[] =>
    ids.flatMap((id, at): TableRow[] => {
      const inside = within.get(id);
      if (inside) return [{ kind: 'group', groupId: id }, ...rowsOf(inside, true)];
      const criterion = items[placeOf.get(id) ?? -1];
      const [over, under] = [ids[at - 1], ids[at + 1]];
      if (!criterion) return [];
      return [
        {
          kind: 'criterion',
          criterion,
          grouped,
          up: over === undefined ? null : Math.min(...places(over)),
          down: under === undefined ? null : Math.max(...places(under)),
        },
      ];
    });
  return rowsOf(top?.ids ?? [], false);
}
