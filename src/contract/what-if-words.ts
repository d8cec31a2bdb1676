/* What a what-if changes and what comes of it, in words: for its screen and for the question before it is adopted. */
import { decimalsNeeded } from '#core/printed/figure.ts';
import type { Criterion, CriterionLimit } from './criterion.ts';
import { formatNumber, listInWords } from './format.ts';
import { rankRange, valueDecimals } from './ranking-words.ts';
import type { Ranking, RankingFigures } from './ranking.ts';
import { stepInWords } from './rating.ts';
import { weighing } from './weighing.ts';
import type { WeightStatement } from './weights.ts';
import { changedFigures, heldParticulars, type RankMove, type Standing } from './what-if-model.ts';
import type { WhatIfChanges } from './what-if.ts';

/** One change, from what the study has to what is tried; `at` says which entry it is. */
export interface ChangeLine {
  at:
    | { kind: 'weights' }
    | { kind: 'limit'; criterionId: string }
    | { kind: 'figure'; siteId: string; criterionId: string }
    | { kind: 'left-out'; siteId: string };
  what: string;
  from: string;
  to: string;
  /** Where one change is of many figures: each of them, from and to. Then `from` and `to` are empty. */
  each: string[];
  /** What of the study falls away with it; empty where nothing does. */
  falls: string;
}

type Described = Pick<Criterion, 'unit' | 'steps'>;

/** A figure as it was entered, with its unit, a rating by its step; "no figure" for none. */
export function figureInFull(criterion: Described, value: number | null): string {
  if (value === null) return 'no figure';
  const plain = formatNumber(value, decimalsNeeded([value]));
  return stepInWords(criterion, value) ?? `${plain} ${criterion.unit}`.trim();
}

export function limitInFull(criterion: Described, limit: CriterionLimit | null): string {
  if (!limit) return 'none';
  return `${limit.kind === 'at-least' ? '≥' : '≤'} ${figureInFull(criterion, limit.value)}`;
}

/** Every change that counts now, in the order weights, limits, figures, sites; entries that are gone have no line. */
export function changeLines(
  changes: WhatIfChanges,
  study: { figures: RankingFigures; statement: WeightStatement },
): ChangeLine[] {
  const { figures } = study;
  return [
    ...weightLines(changes, study),
    ...limitLines(changes, figures),
    ...figureLines(changes, figures),
    ...leftOutLines(changes, figures),
  ];
}

function weightLines(
  { weights }: WhatIfChanges,
  { figures, statement }: { figures: RankingFigures; statement: WeightStatement },
): ChangeLine[] {
  if (!weights) return [];
  const { criteria } = figures;
  const before = weighing(criteria, statement).shares;
  const after = weighing(criteria, weights).shares;
  const changed = criteria.filter(({ id }) => !isSame(before?.[id] ?? 0, after?.[id] ?? 0));
  const inWords = (shares: typeof before, id: string): string =>
    shares === null ? 'none' : formatNumber(shares[id] ?? 0, WEIGHT_DECIMALS);
  const each = changed.map(({ id, name }) => `${name} ${inWords(before, id)} → ${inWords(after, id)}`);
  const what = each.length === 0 ? 'Weights, stated anew and the same as the study’s' : 'Weights';
  return [{ at: { kind: 'weights' }, what, from: '', to: '', each, falls: '' }];
}

const WEIGHT_DECIMALS = 3;
const isSame = (a: number, b: number): boolean => Math.abs(a - b) < 1e-9;

function limitLines({ limits }: WhatIfChanges, { criteria }: RankingFigures): ChangeLine[] {
  return criteria.flatMap((criterion): ChangeLine[] => {
    const limit = limits[criterion.id];
    if (limit === undefined) return [];
    return [
      {
        at: { kind: 'limit', criterionId: criterion.id },
        what: `Limit of ${criterion.name}`,
        from: limitInFull(criterion, criterion.limit),
        to: limitInFull(criterion, limit),
        each: [],
        falls: '',
      },
    ];
  });
}

function figureLines(changes: WhatIfChanges, figures: RankingFigures): ChangeLine[] {
  const gone = new Set(changedFigures(figures, changes).ignored.figures);
  return changes.figures.flatMap((tried): ChangeLine[] => {
    const { siteId, criterionId, value } = tried;
    const site = figures.sites.findIndex((one) => one.siteId === siteId);
    const place = figures.criteria.findIndex(({ id }) => id === criterionId);
    const criterion = figures.criteria[place];
    if (gone.has(tried) || !criterion) return [];
    const cell = figures.cells[site]?.[place];
    return [
      {
        at: { kind: 'figure', siteId, criterionId },
        what: `${criterion.name} of ${figures.sites[site]?.name ?? ''}`,
        from: figureInFull(criterion, typeof cell === 'number' ? cell : null),
        to: figureInFull(criterion, value),
        each: [],
        falls: fallsInWords(figures, { site, place, value }),
      },
    ];
  });
}

function fallsInWords(
  { particulars, criteria }: RankingFigures,
  { site, place, value }: { site: number; place: number; value: number | null },
): string {
  const known = particulars.find(([s, p]) => s === site && p === place)?.[2];
  const criterion = criteria[place];
  if (!known || !criterion) return '';
  const parts = heldParticulars(value, known).dropped.map(
    (part) => `${part} ${figureInFull(criterion, known[part] ?? null)}`,
  );
  if (value === null) return `${listInWords([...parts, 'what is known of it'])} falls away`;
  return parts.length === 0
    ? ''
    : `${listInWords(parts)} no longer ${parts.length === 1 ? 'holds' : 'hold'} and ${parts.length === 1 ? 'falls' : 'fall'} away`;
}

function leftOutLines({ leftOut }: WhatIfChanges, { sites }: RankingFigures): ChangeLine[] {
  return sites
    .filter(({ siteId }) => leftOut.includes(siteId))
    .map(({ siteId, name }) => ({
      at: { kind: 'left-out', siteId },
      what: name,
      from: 'in the ranking',
      to: 'left out',
      each: [],
      falls: '',
    }));
}

/** How the lead moves from the study to the what-if; empty where there is no one leader to compare. */
export function leadInWords(study: Ranking, here: Ranking): string {
  const [was, is] = [study, here].map(({ ranked }) => ranked.filter(({ rank }) => rank === 1));
  const before = was?.[0];
  const now = is?.[0];
  if (!before || !now || was.length > 1 || is.length > 1) return '';
  if (before.siteId !== now.siteId) return `${now.name} takes the lead from ${before.name}.`;
  if (study.margin === null || here.margin === null) return '';
  const decimals = Math.max(valueDecimals(study), valueDecimals(here));
  const [from, to] = [study.margin, here.margin].map((margin) => formatNumber(margin, decimals));
  if (from === to) return `${now.name} keeps the lead, and its margin of ${from}.`;
  const grows = here.margin > study.margin;
  return `${now.name} keeps the lead; its margin ${grows ? 'grows' : 'shrinks'} from ${from} to ${to}.`;
}

/** "2", "6 to 7", "set aside", "left out" */
export function standingInWords(standing: Standing): string {
  if (standing.kind === 'ranked') return formatNumber(standing.rank);
  if (standing.kind === 'incomplete') return `incomplete, ${rankRange(standing)}`;
  return standing.kind === 'set-aside' ? 'set aside' : 'left out';
}

/** "up 2", "down 1", "stays", or what became of the site. */
export function moveInWords({ before, after }: RankMove): string {
  if (before.kind === 'ranked' && after.kind === 'ranked') {
    const risen = before.rank - after.rank;
    return risen === 0 ? 'stays' : `${risen > 0 ? 'up' : 'down'} ${formatNumber(Math.abs(risen))}`;
  }
  if (before.kind === after.kind) {
    const same = standingInWords(before) === standingInWords(after);
    return same ? 'stays' : `now ${standingInWords(after)}`;
  }
  return after.kind === 'ranked' ? `now ranked ${formatNumber(after.rank)}` : `now ${standingInWords(after)}`;
}
