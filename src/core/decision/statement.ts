/** A criterion as it stands among the others: alone, or in a group. */
export interface WeighItem {
  id: string;
  groupId: string | null;
}

/** The four ways to state weights; each gives one set of weights that sum to 1. */
export type WeightMethod = 'points' | 'swing' | 'pairwise' | 'centroid';

/** How many times `a` outweighs `b`, 1/9 to 9. */
export type Judgement = readonly [a: string, b: string, ratio: number];

/** What somebody says of the weights. Ids are those of criteria and of groups; only what the method asks for is read. */
export interface WeightStatement {
  method: WeightMethod;
  /** Points and swing: by id of criterion and of group. */
  points: Readonly<Record<string, number>>;
  /** Centroid: ids, the most important first; each level takes those that are its own. */
  order: readonly string[];
  judgements: readonly Judgement[];
}

/** Things weighed against one another: the groups and ungrouped criteria together, or the criteria of one group. */
export interface Siblings {
  /** Null at the top. */
  groupId: string | null;
  ids: string[];
}

/**
 * The levels at which criteria are weighed: first the top, with the groups that hold a criterion in order of first
 * appearance among the ungrouped criteria, then each of those groups.
 */
export function levelsOf(items: readonly WeighItem[]): Siblings[] {
  const top: Siblings = { groupId: null, ids: [] };
  const groups = new Map<string, Siblings>();
  for (const { id, groupId } of items) {
    if (groupId === null) {
      top.ids.push(id);
      continue;
    }
    const group = groups.get(groupId) ?? { groupId, ids: [] };
    if (group.ids.length === 0) top.ids.push(groupId);
    group.ids.push(id);
    groups.set(groupId, group);
  }
  return [top, ...groups.values()];
}
