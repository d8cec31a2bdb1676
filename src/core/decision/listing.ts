import type { Prepared } from './prepare.ts';
import type { Ranking } from './rank.ts';

/** A site's place in the list: ranked ones first, then incomplete ones, then those set aside. */
export type Listed =
  | { kind: 'ranked'; site: number; rank: number }
  | { kind: 'incomplete'; site: number; bestRank: number; worstRank: number }
  | { kind: 'set-aside'; site: number };

/** Every site once, in the order a ranking is read. */
export function listing({ ranked, ranks, incomplete, setAside }: Ranking): Listed[] {
  return [
    ...Array.from(ranked, (site, place): Listed => ({ kind: 'ranked', site, rank: ranks[place] ?? 0 })),
    ...incomplete.map((entry): Listed => ({ kind: 'incomplete', ...entry })),
    ...setAside.map((site): Listed => ({ kind: 'set-aside', site })),
  ];
}

/** The limits a site fails, as places of their criteria. `failures` stand in the order of the sites. */
export function failuresOf({ failures }: Prepared, site: number): number[] {
  let low = 0;
  for (let high = failures.length; low < high;) {
    const middle = (low + high) >> 1;
    if ((failures[middle]?.site ?? 0) < site) low = middle + 1;
    else high = middle;
  }
  const failed: number[] = [];
  for (; failures[low]?.site === site; low++) failed.push(failures[low]?.criterion ?? 0);
  return failed;
}
