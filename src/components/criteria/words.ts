import type { Criterion, CriterionShape } from '#contract/criterion.ts';
import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import { QUANTITIES } from '#contract/quantity.ts';
import { stepInWords } from '#contract/rating.ts';
import type { Ranking, RankingCell, WeighedCriterion } from '#contract/ranking.ts';
import { decimalsNeeded } from '#core/printed/figure.ts';
import { figureAt, type Levels } from './shape-editing.ts';

/** A figure as it was entered: as many decimals as it has, up to three. */
export const figureInWords = (value: number): string => formatNumber(value, decimalsNeeded([value]));

/** The same for a criterion: a rating by its step. */
const readFigure = (criterion: Pick<Criterion, 'steps'>, value: number): string =>
  stepInWords(criterion, value) ?? figureInWords(value);

export function sourceInWords({ source, quantity, orbitId, steps }: Criterion): string {
  if (source === 'text') return 'text, not weighed';
  if (source === 'rating') return `rating, ${steps?.at(0)} to ${steps?.at(-1)}`;
  if (source === 'entered') return 'entered';
  return quantity && orbitId === null && QUANTITIES[quantity].overManifest
    ? `computed: ${QUANTITIES[quantity].overManifest}`
    : 'computed';
}

export const directionInWords = (direction: Criterion['direction']): string =>
  direction === 'more' ? '↑ more is better' : '↓ less is better';

export function limitInWords({ limit, unit, steps }: Pick<Criterion, 'limit' | 'unit' | 'steps'>): string {
  if (!limit) return 'none';
  return `${limit.kind === 'at-least' ? '≥' : '≤'} ${readFigure({ steps }, limit.value)} ${unit}`.trim();
}

/** "straight between" · "through 0.400 at 260 M€" · "bent with curvature 2.5": how value grows between the levels. */
export function shapeInWords(shape: CriterionShape, at?: { span: Levels; unit: string }): string {
  if (shape.kind === 'straight') return 'straight between';
  if (shape.kind === 'exponential') return `bent with curvature ${figureInWords(shape.curvature)}`;
  const inner = shape.knots.slice(1, -1);
  if (!at || inner.length === 0) return `through ${formatCount(shape.knots.length, 'point')}`;
  const places = inner.map(([s, v]) =>
    `${formatNumber(v, 3)} at ${figureInWords(figureAt(at.span, s))} ${at.unit}`.trim(),
  );
  return `through ${listInWords(places)}`;
}

/** Where a value runs from 0 to 1, or why it does not. */
export function levelsInWords({
  levels,
  span,
  steps,
  shape,
}: Pick<WeighedCriterion, 'levels' | 'span' | 'steps' | 'shape'>): string {
  const source = levels.mode === 'fixed' ? 'fixed' : 'candidates';
  if (span.kind === 'empty') return `${source}, no figures yet`;
  if (span.kind === 'flat') return `${source}, all equal: value 0 for all`;
  const ends = `${source}, ${readFigure({ steps }, span.worst)} to ${readFigure({ steps }, span.best)}`;
  return shape.kind === 'straight' ? ends : `${ends}, ${shapeInWords(shape)}`;
}

const MOST_NAMED = 3;

/** The screen's finding: what weighs most, or what there is to do first. */
export function criteriaFinding({ criteria }: Pick<Ranking, 'criteria'>): string {
  if (criteria.length === 0) return 'No criteria yet.';
  const most = Math.max(...criteria.map(({ weight }) => weight));
  if (most === 0) return `${formatCount(criteria.length, 'criterion', 'criteria')} and no weights yet.`;
  const names = criteria.filter(({ weight }) => weight > most - 1e-12).map(({ name }) => name);
  const share = formatNumber(most, 2);
  if (names.length === 1) return `${names[0]} weighs most: ${share} of 1.`;
  return names.length <= MOST_NAMED
    ? `${listInWords(names)} weigh most: ${share} each.`
    : `${formatCount(names.length, 'criterion', 'criteria')} weigh most: ${share} each.`;
}

export function criteriaWhy(all: readonly Criterion[]): string {
  if (all.length === 0) return '';
  const count = (source: Criterion['source']): number => all.filter((one) => one.source === source).length;
  const parts = [
    `${formatNumber(count('computed'))} computed`,
    `${formatNumber(count('entered'))} entered`,
    ...(count('rating') > 0 ? [`${formatNumber(count('rating'))} rated`] : []),
    ...(count('text') > 0 ? [`${formatNumber(count('text'))} kept as text`] : []),
  ];
  const limits = all.filter(({ limit }) => limit !== null).length;
  const must =
    limits === 0
      ? 'None carries a must-meet limit.'
      : `${formatNumber(limits)} ${limits === 1 ? 'carries' : 'carry'} a must-meet limit.`;
  return `${formatCount(all.length, 'criterion', 'criteria')}: ${listInWords(parts)}. ${must}`;
}

/** The numbers of a criterion's column, with the site each belongs to. */
export function numbersOf(
  cells: readonly (readonly RankingCell[])[],
  place: number,
): { site: number; figure: number }[] {
  return cells.flatMap((row, site) => {
    const figure = row[place];
    return typeof figure === 'number' ? [{ site, figure }] : [];
  });
}
