import { decimalsNeeded } from '#core/printed/figure.ts';
import { formatNumber, listInWords } from '#contract/format.ts';
import type { MemoBlock, MemoTable } from '#contract/memo.ts';
import { QUANTITIES } from '#contract/quantity.ts';
import type { WeighedCriterion } from '#contract/ranking.ts';
import { letterOf } from '#contract/ranking-words.ts';
import { cell, figure, figures, row, table, unitOf, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';

/** Figures of levels and limits need no fewer decimals than the column they bound. */
const bound = (value: number, decimals: number): string =>
  figure(value, Math.max(decimals, decimalsNeeded([value])));

/** Entered levels in full; those of the candidates as their figures are printed. */
function levels({ span, levels: { mode } }: WeighedCriterion, decimals: number): [string, string] {
  const text = (value: number): string =>
    mode === 'fixed' ? bound(value, decimals) : figure(value, decimals);
  if (span.kind === 'span') return [text(span.worst), text(span.best)];
  return span.kind === 'flat' ? [text(span.figure), 'all equal'] : ['–', '–'];
}

function sourceOf(facts: MemoFacts, { source, quantity, orbitId }: WeighedCriterion): string {
  if (source === 'rating') return 'rating, five steps';
  if (source !== 'computed' || quantity === null) return 'entered';
  const orbit = facts.inputs.orbits.find((one) => one.orbitId === orbitId);
  const over = orbit ? `for ${orbit.name || orbit.code}` : QUANTITIES[quantity].overManifest;
  return over === '' ? 'computed' : `computed: ${over}`;
}

/** How values run between the levels, where not straight. */
function shapeNotes({ ranking: { criteria }, decimals }: MemoFacts): string[] {
  const bent = criteria.flatMap(({ shape, span }, place) => {
    const letter = letterOf(place);
    if (shape.kind === 'exponential')
      return [`${letter} as (1 − e^(−c s))/(1 − e^(−c)), c ${formatNumber(shape.curvature, 2)}`];
    if (shape.kind === 'straight' || span.kind !== 'span') return [];
    const points = shape.knots.map(
      ([s, v]) =>
        `${figure(span.worst + s * (span.best - span.worst), Math.max(decimals[place] ?? 0, 1))} → ${formatNumber(v, 3)}`,
    );
    return [`${letter} straight between ${listInWords(points)}`];
  });
  return bent.length === 0
    ? ['Every value function is straight.']
    : [`Straight between the levels, but for ${bent.join('; ')}. s is the way from worst to best, 0 to 1.`];
}

/** What the steps of ratings are called. */
const stepNotes = ({ ranking: { criteria } }: MemoFacts): string[] =>
  criteria.flatMap(({ steps, name }, place) =>
    steps === null
      ? []
      : [`${letterOf(place)} ${name}: ${steps.map((step, at) => `${at} ${step}`).join(', ')}.`],
  );

function criteriaTable(facts: MemoFacts): MemoTable {
  return table(
    'Criteria, levels, limits and weights',
    [
      words('', 4, true),
      words('Criterion', 21, true),
      words('Unit', 7),
      words('Better', 7),
      words('Source', 23),
      figures('Worst', 'value 0', 10),
      figures('Best', 'value 1', 10),
      words('Levels', 10),
      figures('Limit', '', 11),
      figures('Weight', 'sum 1', 8, true),
    ],
    facts.ranking.criteria.map((criterion, place) => {
      const decimals = facts.decimals[place] ?? 0;
      const [worst, best] = levels(criterion, decimals);
      const { limit } = criterion;
      return row([
        cell(letterOf(place), true),
        cell(criterion.name),
        cell(unitOf(criterion) || '–'),
        cell(criterion.direction),
        cell(sourceOf(facts, criterion)),
        cell(worst),
        cell(best),
        cell(criterion.levels.mode === 'fixed' ? 'fixed' : 'candidates'),
        cell(
          limit === null ? '–' : `${limit.kind === 'at-least' ? '≥' : '≤'} ${bound(limit.value, decimals)}`,
        ),
        cell(figure(criterion.weight, 4)),
      ]);
    }),
    [
      'A value runs from 0 at the worst level to 1 at the best and stays there beyond.',
      ...shapeNotes(facts),
      ...stepNotes(facts),
      ...(facts.ranking.criteria.some(({ span }) => span.kind === 'flat')
        ? ['Where all candidates are equal the criterion tells none apart: its value is 0 for all.']
        : []),
    ],
  );
}

/** What the candidates are weighed by. */
export function criteriaBlocks(facts: MemoFacts): MemoBlock[] {
  const { criteria } = facts.ranking;
  if (criteria.length === 0)
    return [{ kind: 'paragraph', text: ['The study has no criteria to weigh by yet.'] }];
  const moving = criteria.filter(({ levels: { mode } }) => mode === 'candidates').length;
  return [
    criteriaTable(facts),
    ...(moving > 0
      ? [
          {
            kind: 'paragraph' as const,
            text: [
              `${moving === criteria.length ? 'All levels are' : `The levels of ${formatNumber(moving)} of ${formatNumber(criteria.length)} criteria are`} set by the candidates themselves: adding or removing a site can move the values of all the others, and with them the order. Fixed levels keep values comparable.`,
            ],
          },
        ]
      : []),
  ];
}
