import type { MembersAgreement } from '#contract/agreement-model.ts';
import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import type { RankingFigures } from '#contract/ranking.ts';
import type { Dispute } from '#core/decision/agreement.ts';

/** Words for a W; common practice, no source. */
const DEGREES: readonly (readonly [least: number, words: string])[] = [
  [0.9, 'agree almost wholly'],
  [0.7, 'agree well'],
  [0.5, 'agree in part'],
  [0.3, 'agree little'],
  [0, 'hardly agree'],
];

const W_DECIMALS = 2;

/** "Three members’ rankings of 10 sites agree well: Kendall’s W is 0.82." */
export function agreementInWords({ judges, agreement }: MembersAgreement): string {
  if (!agreement) return `${formatCount(judges.length, 'member')} shares a set that ranks the sites.`;
  const { concordance, sites } = agreement;
  const whose = `${formatNumber(judges.length)} members’ rankings of ${formatCount(sites.length, 'site')}`;
  if (concordance.kind === 'undefined')
    return sites.length < 2
      ? 'Kendall’s W is undefined: fewer than two sites are ranked by every member.'
      : 'Kendall’s W is undefined: every member ties all sites.';
  const { w } = concordance;
  const degree = DEGREES.find(([least]) => w >= least)?.[1] ?? 'hardly agree';
  return `${whose} ${degree}: Kendall’s W is ${formatNumber(w, W_DECIMALS)}.`;
}

/** Whether any member ties sites, so that W was corrected for it. */
export const hasTies = ({ agreement }: MembersAgreement): boolean =>
  agreement?.ranks.some((row) => new Set(row).size < row.length) ?? false;

/** A mean rank as it is read: 2, or 2.5 where two share. */
export const rankInFigures = (rank: number): string => formatNumber(rank, Number.isInteger(rank) ? 0 : 1);

/** "They disagree most on Cost: 0.40 (Ada Quill), 0.10 (Bram Oduya)" and on which site. */
export function disputesInWords(
  { judges, agreement }: MembersAgreement,
  { criteria, sites }: Pick<RankingFigures, 'criteria' | 'sites'>,
): string[] {
  if (!agreement) return [];
  const by = (dispute: Dispute, read: (said: number) => string): string =>
    listInWords(judges.map(({ name }, place) => `${read(dispute.said[place] ?? 0)} (${name})`));
  const { criterion, site } = agreement;
  return [
    criterion
      ? `Weights lie furthest apart on ${criteria[criterion.place]?.name ?? ''}: ${by(criterion, (said) => formatNumber(said, 2))}.`
      : 'All weigh alike.',
    site
      ? `Ranks lie furthest apart on ${sites[site.place]?.name ?? ''}: ${by(site, rankInFigures)}.`
      : 'All rank alike.',
  ];
}
