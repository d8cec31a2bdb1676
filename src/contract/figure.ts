/* How an entered figure is read and written: low, likely and high, and what is wrong with one. */
import type { FigureFault, FigurePart } from '#core/decision/entered-figure.ts';
import { formatFull } from './format.ts';
import type { FigureParticulars } from './site.ts';

type Parts = Readonly<Partial<Record<FigurePart, number | undefined>>>;

/** "Low 400 is above the figure, 300." */
export function faultInWords({ part, kind }: FigureFault, parts: Parts): string {
  const shown = formatFull(parts[part] ?? 0);
  const likely = formatFull(parts.likely ?? 0);
  const name = { low: 'Low', likely: 'The figure', high: 'High' }[part];
  switch (kind) {
    case 'no-figure':
      return `There is no figure for ${name.toLowerCase()} ${shown} to belong to.`;
    case 'no-step':
      return `${name} ${shown} is none of a rating’s steps, 0 to 4.`;
    case 'low-above':
      return `Low ${shown} is above the figure, ${likely}.`;
    case 'high-below':
      return `High ${shown} is below the figure, ${likely}.`;
  }
}

/** Whether a figure has a low or a high beside it. */
export const isUncertain = ({ low, high }: FigureParticulars): boolean =>
  low !== undefined || high !== undefined;

/** Particulars without what is empty; undefined where nothing is left. */
export function keptParticulars(given: FigureParticulars): FigureParticulars | undefined {
  const entries = Object.entries(given).filter(([, value]) => value !== undefined && value !== '');
  return entries.length === 0 ? undefined : (Object.fromEntries(entries) as FigureParticulars);
}
