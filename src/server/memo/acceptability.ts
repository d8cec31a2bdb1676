import { formatCount, formatNumber } from '#contract/format.ts';
import type { MemoBlock, MemoTable } from '#contract/memo.ts';
import { letterOf } from '#contract/ranking-words.ts';
import type { AcceptabilityOf, SiteAcceptability } from '#contract/sensitivity.ts';
import { acceptabilityInWords, drawnInWords } from '#contract/sensitivity-words.ts';
import { errorFigure, shareFigure, underOneIn, weightFigures } from '#contract/share-words.ts';
import { cell, figures, row, runsOf, table, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';
import { memoNames } from './names.ts';

/** Sites listed, best ranked first, and ranks that have a column. */
const MOST_SITES = 20;
const MOST_RANKS = 9;
/** Criteria whose central weights fit beside a name. */
const MOST_CENTRAL = 9;

const listed = ({ sites }: AcceptabilityOf): SiteAcceptability[] => sites.slice(0, MOST_SITES);
const rankNames = ['First', 'Second', 'Third'];

/** In a table the words would not fit: a dot stands for what no draw showed. */
const tableShare = (share: number, samples: number): string =>
  share === 0 ? '·' : shareFigure(share, samples);
const tableError = (share: number, samples: number): string =>
  share === 0 || share === 1 ? '·' : errorFigure(share, samples);

function ranksTable(facts: MemoFacts, answer: AcceptabilityOf): MemoTable {
  const names = memoNames(facts);
  const { samples, sites } = answer;
  const ranks = Math.min(MOST_RANKS, sites.length);
  const beyond = sites.length - ranks;
  const unlisted = sites.length - listed(answer).length + answer.sitesLeftOut;
  return table(
    'Rank acceptability: share of draws at each rank, in percent',
    [
      words('Site', 28, true),
      ...Array.from({ length: ranks }, (_, at) => figures(rankNames[at] ?? `${at + 1}th`, '%', 8, at < 2)),
    ],
    listed(answer).map(({ siteId, shares }, at) =>
      row(
        [
          cell(names.site(siteId)),
          ...Array.from({ length: ranks }, (_, rank) =>
            cell(tableShare(shares[rank] ?? 0, samples), rank === 0),
          ),
        ],
        at === 0 ? 'leads' : 'plain',
      ),
    ),
    [
      `${formatNumber(samples)} draws, seed ${answer.seed}, ${drawnInWords(answer)}. · is ${underOneIn(samples)}. The standard error of a share p is √(p (1 − p) / N), at most ${errorFigure(0.5, samples)} points; those of the first rank follow.`,
      ...(beyond > 0 ? [`Ranks beyond the ${ranks}th are not printed.`] : []),
      ...(unlisted > 0 ? [`${formatCount(unlisted, 'ranked site')} not listed.`] : []),
    ],
  );
}

function firstRankTable(facts: MemoFacts, answer: AcceptabilityOf): MemoTable {
  const names = memoNames(facts);
  const { samples, sites, uncertainFigures } = answer;
  const leader = sites[0];
  const error = ({ confidence }: SiteAcceptability): string => {
    if (confidence === null) return '–';
    return uncertainFigures === 0 ? '–' : tableError(confidence, samples);
  };
  /** Without uncertain figures the factor is exact, not a share of draws. */
  const sure = ({ confidence }: SiteAcceptability): string => {
    if (confidence === null) return 'never leads';
    return uncertainFigures === 0 ? formatNumber(confidence * 100, 1) : tableShare(confidence, samples);
  };
  return table(
    'First rank, confidence and the leader against each',
    [
      words('Site', 28, true),
      figures('First', '%', 12, true),
      figures('Standard error', 'points', 14, true),
      figures('Confidence', 'factor, %', 14),
      figures('Standard error', 'points', 14),
      figures('Leader above it', '% of draws', 18),
    ],
    listed(answer).map((site, at) =>
      row(
        [
          cell(names.site(site.siteId)),
          cell(tableShare(site.shares[0] ?? 0, samples), true),
          cell(tableError(site.shares[0] ?? 0, samples)),
          cell(sure(site)),
          cell(error(site)),
          cell(at === 0 ? '–' : tableShare(leader?.wins[at] ?? 0, samples)),
        ],
        at === 0 ? 'leads' : 'plain',
      ),
    ),
    [
      `The confidence factor holds a site’s central weights and draws the figures${uncertainFigures === 0 ? '; no figure is uncertain, so there is nothing to draw' : ''}. · under a standard error is ${underOneIn(samples)}: the share is 0 or 1.`,
    ],
  );
}

/** The mean weights under which each site leads. */
function centralTables(facts: MemoFacts, answer: AcceptabilityOf): MemoTable[] {
  const names = memoNames(facts);
  const leading = listed(answer).filter(({ centralWeights }) => centralWeights !== null);
  if (leading.length === 0) return [];
  const places = facts.ranking.criteria.map(({ id }, place) => ({ id, place }));
  return runsOf(places, MOST_CENTRAL).map((run) =>
    table(
      'Central weights: the mean of the weights under which a site comes first',
      [words('Site', 28, true), ...run.map(({ place }) => figures(letterOf(place), '', 8))],
      leading.map(({ siteId, centralWeights }, at) => {
        const known = places.filter(({ id }) => centralWeights?.[id] !== undefined);
        const printed = weightFigures(known.map(({ id }) => centralWeights?.[id] ?? 0));
        const text = new Map(known.map(({ id }, place) => [id, printed[place] ?? '–']));
        return row(
          [cell(names.site(siteId)), ...run.map(({ id }) => cell(text.get(id) ?? '–'))],
          at === 0 && siteId === answer.sites[0]?.siteId ? 'leads' : 'plain',
        );
      }),
      ['Each row adds up to 1. A site that is never first has none and is not listed.'],
    ),
  );
}

/** Everything moved at once. */
export function acceptabilityBlocks(facts: MemoFacts): MemoBlock[] {
  const { acceptability } = facts.sensitivity;
  if (acceptability === null)
    return [{ kind: 'paragraph', text: ['With fewer than two ranked sites there is nothing to draw.'] }];
  const { fact, behind } = acceptabilityInWords(acceptability, memoNames(facts));
  return [
    { kind: 'paragraph', text: [{ strong: `${fact}.` }, ` ${behind}`] },
    ranksTable(facts, acceptability),
    firstRankTable(facts, acceptability),
    ...centralTables(facts, acceptability),
  ];
}
