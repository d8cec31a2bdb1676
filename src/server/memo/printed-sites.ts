import type { SiteResult } from '#contract/evaluate.ts';
import { formatCount } from '#contract/format.ts';
import type { InputSite } from '#contract/study-inputs.ts';
import { MOST_OTHERS, MOST_RANKED, type MemoFacts } from './facts.ts';

export type Standing = 'leads' | 'ranked' | 'incomplete' | 'set-aside' | 'unranked';

/** A site in the order a ranking is read, with everything a table may say of it. */
export interface PrintedSite {
  site: InputSite;
  result: SiteResult | undefined;
  standing: Standing;
}

export interface PrintedSites {
  sites: PrintedSite[];
  /** Sites that are left out because the memo would be too long. */
  left: number;
}

function standings({ ranking, inputs }: MemoFacts): { siteId: string; standing: Standing }[] {
  if (ranking.state !== 'ranked')
    return inputs.sites.slice(0, MOST_RANKED).map(({ siteId }) => ({ siteId, standing: 'unranked' }));
  return [
    ...ranking.ranked.slice(0, MOST_RANKED).map(({ siteId, rank }) => ({
      siteId,
      standing: rank === 1 ? ('leads' as const) : ('ranked' as const),
    })),
    ...ranking.incomplete
      .slice(0, MOST_OTHERS)
      .map(({ siteId }) => ({ siteId, standing: 'incomplete' as const })),
    ...ranking.setAside
      .slice(0, MOST_OTHERS)
      .map(({ siteId }) => ({ siteId, standing: 'set-aside' as const })),
  ];
}

/** The sites a memo lists: up to 40 ranked ones and 20 each of those incomplete and set aside. */
export function printedSites(facts: MemoFacts): PrintedSites {
  const at = new Map(facts.inputs.sites.map((site, index) => [site.siteId, index]));
  const sites = standings(facts).flatMap(({ siteId, standing }) => {
    const index = at.get(siteId);
    const site = index === undefined ? undefined : facts.inputs.sites[index];
    return site && index !== undefined ? [{ site, result: facts.evaluation.sites[index], standing }] : [];
  });
  return { sites, left: facts.inputs.sites.length - sites.length };
}

/** Says how many sites a table leaves out, and where they are; nothing where it leaves out none. */
export function leftOut(left: number): string[] {
  return left === 0
    ? []
    : [
        `${formatCount(left, 'further site')} of the study ${left === 1 ? 'is' : 'are'} not listed here; the CSV of the study's sites and the ranking's own CSV have every one.`,
      ];
}
