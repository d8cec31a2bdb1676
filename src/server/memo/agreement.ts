import { formatNumber, listInWords } from '#contract/format.ts';
import type { MemoBlock, MemoTable } from '#contract/memo.ts';
import { letterOf } from '#contract/ranking-words.ts';
import { weightFigure } from '#contract/sensitivity-words.ts';
import { cell, figures, row, runsOf, table, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';
import { memoNames } from './names.ts';

/** Members side by side on a page, and sites listed. */
const MOST_MEMBERS = 8;
const MOST_SITES = 20;

const paragraph = (text: string): MemoBlock => ({ kind: 'paragraph', text: [text] });

type Agreed = NonNullable<MemoFacts['members']['agreement']>;

function ranksTables(facts: MemoFacts, { sites, ranks }: Agreed): MemoTable[] {
  const names = memoNames(facts);
  const place = new Map(facts.ranking.ranked.map(({ siteId }, at) => [siteId, at]));
  const orderOf = (site: number): number =>
    place.get(facts.figures.sites[site]?.siteId ?? '') ?? Number.MAX_SAFE_INTEGER;
  const rows = sites.map((site, at) => ({ site, at })).sort((a, b) => orderOf(a.site) - orderOf(b.site));
  const left = rows.length - MOST_SITES;
  return runsOf([...facts.members.judges.keys()], MOST_MEMBERS).map((run) =>
    table(
      'Ranks by each member’s own weights',
      [
        words('Site', 28, true),
        ...run.map((judge) => figures(facts.members.judges[judge]?.name ?? '', 'rank', 9, true)),
      ],
      rows.slice(0, MOST_SITES).map(({ site, at }) =>
        row([
          cell(names.site(facts.figures.sites[site]?.siteId ?? '')),
          ...run.map((judge) => {
            const rank = ranks[judge]?.[at] ?? 0;
            return cell(formatNumber(rank, Number.isInteger(rank) ? 0 : 1), rank === 1);
          }),
        ]),
      ),
      [
        'Ranks among the sites that every member’s weights rank; tied sites take the mean of their ranks.',
        ...(left > 0 ? [`${formatNumber(left)} further sites not listed.`] : []),
      ],
    ),
  );
}

function weightTables(facts: MemoFacts): MemoTable[] {
  return runsOf([...facts.members.judges.keys()], MOST_MEMBERS).map((run) =>
    table(
      'Weights by member',
      [
        words('Criterion', 28, true),
        ...run.map((judge) => figures(facts.members.judges[judge]?.name ?? '', 'weight', 9, true)),
      ],
      facts.ranking.criteria.map(({ name }, j) =>
        row([
          cell(`${letterOf(j)} ${name}`),
          ...run.map((judge) => cell(weightFigure(facts.members.judges[judge]?.model.weights[j] ?? 0))),
        ]),
      ),
    ),
  );
}

function inWords(facts: MemoFacts, { concordance, site, criterion }: Agreed): string {
  const names = memoNames(facts);
  const { judges } = facts.members;
  const w =
    concordance.kind === 'agreement'
      ? `Kendall’s W is ${formatNumber(concordance.w, 2)}: 1 where all rank alike, 0 where there is no agreement.`
      : 'Kendall’s W is undefined: every member ties every site.';
  const who = (said: readonly number[], text: (x: number) => string): string =>
    listInWords(judges.map(({ name }, at) => `${name} ${text(said[at] ?? 0)}`));
  const apart = site
    ? ` They part most on the rank of ${names.site(facts.figures.sites[site.place]?.siteId ?? '')}: ${who(site.said, (x) => formatNumber(x, Number.isInteger(x) ? 0 : 1))}.`
    : ' All rank alike.';
  const weighed = criterion
    ? ` Their weights lie furthest apart on ${facts.ranking.criteria[criterion.place]?.name ?? ''}: ${who(criterion.said, weightFigure)}.`
    : ' All weigh alike.';
  return `${w}${apart}${weighed}`;
}

/** What members' own weights say beside the study's. */
export function agreementBlocks(facts: MemoFacts): MemoBlock[] {
  const { judges, agreement } = facts.members;
  if (judges.length === 0) return [paragraph('No member shares weights of their own with the study.')];
  if (agreement === null)
    return [
      paragraph(`${judges[0]?.name ?? ''} alone shares weights with the study; agreement needs two sets.`),
      ...weightTables(facts),
    ];
  return [paragraph(inWords(facts, agreement)), ...ranksTables(facts, agreement), ...weightTables(facts)];
}
