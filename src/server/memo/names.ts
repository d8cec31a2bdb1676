import { letterOf } from '#contract/ranking-words.ts';
import type { MemoFacts } from './facts.ts';

/** Names of what the figures know by id: sites, criteria with and without their letter, groups. */
export interface MemoNames {
  site: (siteId: string) => string;
  criterion: (id: string) => string;
  /** "D Cost to first launch"; a group by its name. */
  lettered: (id: string) => string;
}

export function memoNames({ figures, ranking, groups }: MemoFacts): MemoNames {
  const sites = new Map(figures.sites.map(({ siteId, name }) => [siteId, name]));
  const criteria = new Map(ranking.criteria.map(({ id, name }, at) => [id, { name, letter: letterOf(at) }]));
  const groupNames = new Map(groups.map(({ id, name }) => [id, name]));
  return {
    site: (id) => sites.get(id) ?? '',
    criterion: (id) => criteria.get(id)?.name ?? groupNames.get(id) ?? '',
    lettered: (id) => {
      const criterion = criteria.get(id);
      return criterion ? `${criterion.letter} ${criterion.name}` : (groupNames.get(id) ?? '');
    },
  };
}
