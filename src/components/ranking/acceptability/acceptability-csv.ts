import type { AcceptabilityOf } from '#contract/sensitivity.ts';
import type { Criterion } from '#contract/criterion.ts';
import type { RankingSite } from '#contract/ranking.ts';
import { writeCsv } from '#core/csv/export.ts';

/** Every digit a double holds for certain. */
const full = (value: number | null | undefined): number | string =>
  value == null ? '' : Number(value.toPrecision(15));

/** The whole analysis: how it was drawn, and by site its shares and errors, confidence, central weights and wins. */
export function acceptabilityCsv(
  answer: AcceptabilityOf,
  sites: readonly RankingSite[],
  criteria: readonly Criterion[],
): string {
  const bySite = new Map(sites.map((site) => [site.siteId, site]));
  const codeOf = (siteId: string): string => bySite.get(siteId)?.code ?? siteId;
  const ranks = answer.sites.map((_, rank) => rank + 1);
  return writeCsv([
    [
      'weight_model',
      'band',
      'samples',
      'seed',
      'code',
      'name',
      ...ranks.map((rank) => `share_at_rank_${rank}`),
      ...ranks.map((rank) => `standard_error_at_rank_${rank}`),
      'confidence',
      'confidence_standard_error',
      ...criteria.map(({ name }) => `${name}, central weight`),
      ...answer.sites.map(({ siteId }) => `share_above_${codeOf(siteId)}`),
    ],
    ...answer.sites.map(({ siteId, shares, errors, confidence, confidenceError, centralWeights, wins }) => [
      answer.model,
      full(answer.band),
      answer.samples,
      answer.seed,
      codeOf(siteId),
      bySite.get(siteId)?.name ?? '',
      ...shares.map(full),
      ...errors.map(full),
      full(confidence),
      full(confidenceError),
      ...criteria.map(({ id }) => full(centralWeights?.[id])),
      ...wins.map(full),
    ]),
  ]);
}
