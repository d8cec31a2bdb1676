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

type Source = Pick<MemoFacts, 'ranking' | 'inputs'>;

function standings({ ranking, inputs }: Source): [siteId: string, standing: Standing][] {
  if (ranking.state !== 'ranked')
    return inputs.sites.slice(0, MOST_RANKED).map(({ siteId }) => [siteId, 'unranked']);
  const others = (list: readonly { siteId: string }[], standing: Standing): [string, Standing][] =>
    list.slice(0, MOST_OTHERS).map(({ siteId }) => [siteId, standing]);
  return [
    ...ranking.ranked
      .slice(0, MOST_RANKED)
      .map(({ siteId, rank }): [string, Standing] => [siteId, rank === 1 ? 'leads' : 'ranked']),
    ...others(ranking.incomplete, 'incomplete'),
    ...others(ranking.setAside, 'set-aside'),
  ];
}

/** The sites a memo lists, in the order it does: up to 40 ranked ones and 20 each of those incomplete and set aside. */
export function listedSites(source: Source): { site: InputSite; standing: Standing }[] {
  const known = new Map(source.inputs.sites.map((site) => [site.siteId, site]));
  return standings(source).flatMap(([siteId, standing]) => {
    const site = known.get(siteId);
    return site ? [{ site, standing }] : [];
  });
}

/** The listed sites with their flights, and how many are left out. */
export function printedSites(facts: MemoFacts): PrintedSites {
  const sites = listedSites(facts).map((one) => ({ ...one, result: facts.results.get(one.site.siteId) }));
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
