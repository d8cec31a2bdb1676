import type { Criterion } from '#contract/criterion.ts';
import { formatCount, formatFull, listInWords } from '#contract/format.ts';
import type { RankingFigures } from '#contract/ranking.ts';
import type { FigureParticulars } from '#contract/site.ts';
import { isEntered, type Entry } from './figure.ts';

/** What is known of a figure beside its number. */
export interface Known {
  particulars: FigureParticulars;
  /** Evidence files. */
  files: number;
}

const tables = new WeakMap<RankingFigures, ReadonlyMap<number, Known>>();

/** What is known of the figures of a ranking, by site × count of criteria + criterion; read once for all cells. */
export function knownFigures(figures: RankingFigures): ReadonlyMap<number, Known> {
  const ready = tables.get(figures);
  if (ready) return ready;
  const table = new Map<number, Known>();
  const count = figures.criteria.length;
  for (const [site, criterion, particulars] of figures.particulars)
    table.set(site * count + criterion, { particulars, files: 0 });
  for (const [site, criterion, files] of figures.evidence) {
    const at = site * count + criterion;
    table.set(at, { particulars: table.get(at)?.particulars ?? {}, files });
  }
  tables.set(figures, table);
  return table;
}

/** What is known of one figure; undefined where there is nothing, or no figure. */
export function knownAt(figures: RankingFigures, site: number, criterion: number): Known | undefined {
  if (typeof figures.cells[site]?.[criterion] !== 'number') return undefined;
  return knownFigures(figures).get(site * figures.criteria.length + criterion);
}

/** "uncertain, 250 to 360; has a source; 2 evidence files", for a cell's name; empty where nothing is known. */
export function knownWords({ particulars: { low, high, source }, files }: Known): string {
  const bounds = [
    low === undefined ? undefined : `low ${formatFull(low)}`,
    high === undefined ? undefined : `high ${formatFull(high)}`,
  ].filter((one) => one !== undefined);
  return [
    bounds.length > 0 ? `uncertain, ${listInWords(bounds)}` : '',
    source === undefined ? '' : `source: ${source}`,
    files > 0 ? formatCount(files, 'evidence file') : '',
  ]
    .filter(Boolean)
    .join('; ');
}

/** An entered figure of a ranking, as a line of a list. */
export interface EnteredLine extends Known {
  siteId: string;
  code: string;
  siteName: string;
  criterion: Criterion;
  /** The criterion's place, for its decimals. */
  place: number;
  value: number;
}

/** Every entered figure, site by site in the order of the criteria. */
export function enteredLines(figures: RankingFigures): EnteredLine[] {
  const { criteria, sites, cells } = figures;
  return sites.flatMap(({ siteId, code, name }, site) =>
    criteria.flatMap((criterion, place): EnteredLine[] => {
      const value = cells[site]?.[place];
      if (!isEntered(criterion) || typeof value !== 'number') return [];
      const known = knownAt(figures, site, place) ?? { particulars: {}, files: 0 };
      return [{ siteId, code, siteName: name, criterion, place, value, ...known }];
    }),
  );
}

export const hasSource = ({ particulars }: Known): boolean => Boolean(particulars.source);

/** "14 of 60 figures have no source." */
export function sourceCount(lines: readonly Known[]): string {
  const without = lines.filter((line) => !hasSource(line)).length;
  if (lines.length === 0) return 'No figures are entered yet.';
  if (without === 0 && lines.length === 1) return 'The one figure has a source.';
  if (without === 0) return `All ${formatCount(lines.length, 'figure')} have a source.`;
  const have = without === 1 ? 'has' : 'have';
  return `${without} of ${formatCount(lines.length, 'figure')} ${have} no source.`;
}

/** The figures with one entered, until they are read again: a cell shows what was just saved. */
export function withEntry(
  figures: RankingFigures,
  { siteId, criterionId }: { siteId: string; criterionId: string },
  { value, known }: Entry,
): RankingFigures {
  const site = figures.sites.findIndex((one) => one.siteId === siteId);
  const place = figures.criteria.findIndex(({ id }) => id === criterionId);
  if (site < 0 || place < 0) return figures;
  const others = figures.particulars.filter(([s, c]) => s !== site || c !== place);
  return {
    ...figures,
    cells: figures.cells.map((row, s) =>
      s === site ? row.map((cell, c) => (c === place ? value : cell)) : row,
    ),
    particulars:
      value === null || Object.keys(known).length === 0 ? others : [...others, [site, place, known]],
  };
}
