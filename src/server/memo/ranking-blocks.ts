import { closedSums } from '#core/printed/closing.ts';
import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import type { MemoBlock, MemoContributions, MemoPart, MemoTable } from '#contract/memo.ts';
import type { Contribution, RankedSite, Ranking, WeighedCriterion } from '#contract/ranking.ts';
import { letterOf, missingInWords, rankRange, valueDecimals } from '#contract/ranking-words.ts';
import { cell, figure, figures, row, runsOf, table, unitOf, words } from './cells.ts';
import { MOST_OTHERS, MOST_RANKED, type MemoFacts } from './facts.ts';
import { leftOut } from './printed-sites.ts';

/** A criterion with its place in the study's order, which gives its letter. */
interface Placed {
  criterion: WeighedCriterion;
  place: number;
}

const placed = ({ criteria }: Ranking): Placed[] =>
  criteria.map((criterion, place) => ({ criterion, place }));

/** The heaviest, in the study's order. */
function heaviest(ranking: Ranking, most: number): Placed[] {
  const byWeight = placed(ranking).sort(
    (a, b) => b.criterion.weight - a.criterion.weight || a.place - b.place,
  );
  return byWeight.slice(0, most).sort((a, b) => a.place - b.place);
}

/** Criteria whose figures stand beside the ranks on the first page. */
const BESIDE_RANKS = 6;
const WORST_NOTE = '“worst”: an orbit is out of reach or falls short, which counts at the worst level.';

function figureText(facts: MemoFacts, contribution: Contribution | undefined, place: number): string {
  if (!contribution) return '–';
  if (contribution.figure !== null) return figure(contribution.figure, facts.decimals[place] ?? 0);
  return contribution.value === null ? 'no figure' : 'worst';
}

const worstNotes = (rows: readonly { contributions: Contribution[] }[]): string[] =>
  rows.some(({ contributions }) => contributions.some((one) => one.figure === null && one.value !== null))
    ? [WORST_NOTE]
    : [];

const criterionColumn = ({ criterion, place }: Placed) =>
  figures(`${letterOf(place)} ${criterion.name}`, unitOf(criterion), 10);

/** Short notes as one. */
const together = (notes: readonly string[]): string[] => (notes.length === 0 ? [] : [notes.join(' ')]);

function ranksTable(facts: MemoFacts): MemoTable {
  const { ranking } = facts;
  const shown = heaviest(ranking, BESIDE_RANKS);
  const decimals = valueDecimals(ranking);
  const ranked = ranking.ranked.slice(0, MOST_RANKED);
  const unshown = ranking.criteria.length - shown.length;
  return table(
    'The candidates, ranked',
    [
      figures('Rank', '', 5.5, true),
      words('Site', 22, true),
      figures('Value', '0–1', 9, true),
      ...shown.map(criterionColumn),
    ],
    ranked.map((site) =>
      row(
        [
          cell(String(site.rank)),
          cell(site.name, true),
          cell(formatNumber(site.value, decimals), true),
          ...shown.map(({ place }) => cell(figureText(facts, site.contributions[place], place))),
        ],
        site.rank === 1 ? 'leads' : 'plain',
      ),
    ),
    [
      ...othersInWords(ranking),
      ...together([
        ...(unshown > 0
          ? [`${formatCount(unshown, 'lighter criterion', 'lighter criteria')}: see Criteria and ranking.`]
          : []),
        ...worstNotes(ranked),
        ...leftOut(ranking.counts.ranked - ranked.length),
      ]),
    ],
  );
}

/** The sites without a rank, named with their reasons while they are few. */
function othersInWords(ranking: Ranking): string[] {
  const { incomplete, setAside } = ranking;
  const few = 3;
  const say = (intro: string, list: string[]): string[] =>
    list.length === 0
      ? []
      : [
          list.length <= few
            ? `${intro}: ${list.join('; ')}.`
            : `${intro}: ${list.length}, listed with the reasons below.`,
        ];
  return [
    ...say(
      'Incomplete',
      incomplete.map(
        (site) => `${site.name} (${missingInWords(ranking, site.missing)}; rank ${rankRange(site)})`,
      ),
    ),
    ...say(
      'Set aside',
      setAside.map((site) => `${site.name} (${site.reasons.map(({ message }) => message).join('; ')})`),
    ),
  ];
}

/** Parts of a bar: the seven patterns go to the criteria, or to the six heaviest and the rest together. */
const PATTERNS = 7;

function barKey(ranking: Ranking): { shown: Placed[]; rest: Placed[] } {
  if (ranking.criteria.length <= PATTERNS) return { shown: placed(ranking), rest: [] };
  const shown = heaviest(ranking, PATTERNS - 1);
  return { shown, rest: placed(ranking).filter(({ place }) => !shown.some((one) => one.place === place)) };
}

function partsOf(site: RankedSite, { shown, rest }: ReturnType<typeof barKey>): MemoPart[] {
  const term = ({ place }: Placed): number => site.contributions[place]?.term ?? 0;
  const lengths = [
    ...shown.map((one, pattern) => ({ letter: letterOf(one.place), pattern, length: term(one) })),
    ...(rest.length > 0
      ? [{ letter: '', pattern: PATTERNS - 1, length: rest.reduce((sum, one) => sum + term(one), 0) }]
      : []),
  ];
  let start = 0;
  return lengths.map(({ letter, pattern, length }) => {
    const part = { letter, pattern, start, length };
    start += length;
    return part;
  });
}

function contributionsFigure({ ranking }: MemoFacts): MemoContributions {
  const key = barKey(ranking);
  const decimals = valueDecimals(ranking);
  const ranked = ranking.ranked.slice(0, MOST_RANKED);
  const restWeight = key.rest.reduce((sum, { criterion }) => sum + criterion.weight, 0);
  return {
    kind: 'contributions',
    number: 0,
    caption: 'What the overall values are made of: each length is weight × value',
    description: `Overall value of ${formatCount(ranked.length, 'ranked site')}, a bar each, made of weight × value for ${formatCount(ranking.criteria.length, 'criterion', 'criteria')}.`,
    bars: ranked.map((site) => ({
      name: site.name,
      value: formatNumber(site.value, decimals),
      total: site.value,
      leads: site.rank === 1,
      parts: partsOf(site, key),
    })),
    key: [
      ...key.shown.map(({ criterion, place }, pattern) => ({
        letter: letterOf(place),
        pattern,
        name: criterion.name,
        weight: formatNumber(criterion.weight, 3),
      })),
      ...(key.rest.length > 0
        ? [
            {
              letter: '',
              pattern: PATTERNS - 1,
              name: `the other ${key.rest.length} together`,
              weight: formatNumber(restWeight, 3),
            },
          ]
        : []),
    ],
  };
}

/** Columns of terms that fit on a page. */
const MOST_TERMS = 10;

/** Every term of every ranked site's value, so that the sum can be added up by hand. */
function termsTables({ ranking }: MemoFacts): MemoTable[] {
  const ranked = ranking.ranked.slice(0, MOST_RANKED);
  if (ranked.length === 0) return [];
  const sums = ranked.map(({ contributions, value }) => ({
    parts: contributions.map(({ term }) => term ?? 0),
    total: value,
  }));
  const closed = closedSums(sums, valueDecimals(ranking));
  const text = (value: number): string => figure(value, closed.decimals);
  const runs = runsOf(placed(ranking), MOST_TERMS);
  return runs.map((run, at) => {
    const last = at === runs.length - 1;
    return table(
      runs.length === 1
        ? 'Terms of the overall value, weight × value'
        : `Terms of the overall value, weight × value, ${at + 1} of ${runs.length}`,
      [
        words('Site', 26, true),
        ...run.map(({ place, criterion }) => figures(letterOf(place), formatNumber(criterion.weight, 3), 8)),
        ...(last ? [figures('Value', 'sum', 9, true)] : []),
      ],
      ranked.map((site, index) =>
        row(
          [
            cell(site.name),
            ...run.map(({ place }) => cell(text(closed.sums[index]?.parts[place] ?? 0))),
            ...(last ? [cell(text(closed.sums[index]?.total ?? 0), true)] : []),
          ],
          site.rank === 1 ? 'leads' : 'plain',
        ),
      ),
      [
        'The weight of each criterion stands under its letter.',
        ...(closed.adjusted
          ? [
              `Terms are rounded so that each row adds up; none lies a step of its last digit from its figure.`,
            ]
          : []),
      ],
    );
  });
}

/** Figures of every listed site under every criterion, where the first page has no room for all. */
function figureTables(facts: MemoFacts): MemoTable[] {
  const { ranking } = facts;
  const rows = [
    ...ranking.ranked.slice(0, MOST_RANKED),
    ...ranking.incomplete.slice(0, MOST_OTHERS),
    ...ranking.setAside.slice(0, MOST_OTHERS),
  ];
  if (rows.length === 0) return [];
  const aside = new Set(ranking.setAside.map(({ siteId }) => siteId));
  return runsOf(placed(ranking), BESIDE_RANKS).map((run) =>
    table(
      `Figures under ${listInWords(run.map(({ place }) => letterOf(place)))}`,
      [words('Site', 26, true), ...run.map(criterionColumn)],
      rows.map((site) =>
        row(
          [
            cell(site.name),
            ...run.map(({ place }) => cell(figureText(facts, site.contributions[place], place))),
          ],
          aside.has(site.siteId) ? 'set-aside' : 'plain',
        ),
      ),
      worstNotes(rows),
    ),
  );
}

function incompleteTable({ ranking }: MemoFacts): MemoTable[] {
  const { incomplete, counts } = ranking;
  if (incomplete.length === 0) return [];
  const decimals = valueDecimals(ranking);
  const listed = incomplete.slice(0, MOST_OTHERS);
  return [
    table(
      'Incomplete candidates: a figure is missing',
      [
        words('Site', 28, true),
        figures('Rank could be', '', 14, true),
        figures('Value', 'at worst', 12),
        figures('Value', 'at best', 12),
        words('What is missing', 40),
      ],
      listed.map((site) =>
        row([
          cell(site.name),
          cell(rankRange(site)),
          cell(formatNumber(site.value, decimals)),
          cell(formatNumber(site.bestValue, decimals)),
          cell(missingInWords(ranking, site.missing)),
        ]),
      ),
      [
        'The range is counted against ranked sites only, with what is missing at its worst and at its best.',
        ...leftOut(counts.incomplete - listed.length),
      ],
    ),
  ];
}

function asideTable({ ranking }: MemoFacts): MemoTable[] {
  const { setAside, counts } = ranking;
  if (setAside.length === 0) return [];
  const listed = setAside.slice(0, MOST_OTHERS);
  return [
    table(
      'Set aside: each fails a must-meet limit',
      [words('Site', 32, true), words('Why', 68, true)],
      listed.map((site) =>
        row([cell(site.name), cell(site.reasons.map(({ message }) => message).join('; '))], 'set-aside'),
      ),
      leftOut(counts.setAside - listed.length),
    ),
  ];
}

/** What the first page shows of the ranking. */
export function rankingBlocks(facts: MemoFacts): MemoBlock[] {
  return facts.ranking.ranked.length === 0 ? [] : [ranksTable(facts), contributionsFigure(facts)];
}

/** What follows it: those without a rank, all terms and all figures. */
export function rankingDetail(facts: MemoFacts): MemoBlock[] {
  return [...incompleteTable(facts), ...asideTable(facts), ...termsTables(facts), ...figureTables(facts)];
}
