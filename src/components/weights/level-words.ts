import type { CriterionColumn } from '#components/ranking/columns.ts';
import { formatNumber } from '#contract/format.ts';
import { stepInWords } from '#contract/rating.ts';

/** A criterion's swing with its unit: "412 to 238 M€", "Poor to Very good" */
export function swingInWords({ criterion, decimals }: CriterionColumn): string {
  const { span, unit } = criterion;
  if (span.kind === 'empty') return 'no figures yet';
  const read = (figure: number): string => stepInWords(criterion, figure) ?? formatNumber(figure, decimals);
  if (span.kind === 'flat') return `all equal: ${read(span.figure)} ${unit}`.trim();
  return `${read(span.worst)} to ${read(span.best)} ${unit}`.trim();
}
