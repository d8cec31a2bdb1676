import { formatCount } from '#contract/format.ts';
import { rowOf, type RankingRow } from '#contract/ranking-rows.ts';
import type { RankingModel } from '#contract/ranking-model.ts';
import { writeCsv } from '#core/csv/export.ts';

type CsvCell = string | number;

/** Every digit a double holds for certain: 0.1 + 0.2 is written 0.3. */
const full = (value: number): number => Number(value.toPrecision(15));
const fullOrNone = (value: number | null): CsvCell => (value === null ? '' : full(value));

/** The sites asked for as CSV, in that order: ranks, values, and for every criterion figure, value, weight and term. */
export function rankingCsv(model: RankingModel, siteIds: readonly string[]): string {
  const { criteria, sites } = model.figures;
  const listedBySite = new Map(model.rows.map((listed) => [sites[listed.site]?.siteId, listed]));
  const rows = siteIds.flatMap((id) => {
    const listed = listedBySite.get(id);
    return listed ? [csvRow(rowOf(model, listed))] : [];
  });
  return writeCsv([
    [
      'standing',
      'rank',
      'best_rank',
      'worst_rank',
      'code',
      'name',
      'latitude_deg',
      'longitude_deg',
      'value',
      'best_value',
      'reasons',
      ...criteria.flatMap(({ name, unit }) => [
        unit ? `${name} (${unit})` : name,
        `${name}, value`,
        `${name}, weight`,
        `${name}, term`,
        `${name}, note`,
      ]),
    ],
    ...rows,
  ]);
}

function csvRow(row: RankingRow): CsvCell[] {
  const { kind, code, name, latitudeDeg, longitudeDeg } = row;
  return [
    kind,
    ...ranksOf(row),
    code,
    name,
    latitudeDeg,
    longitudeDeg,
    kind === 'set-aside' ? '' : full(row.value),
    kind === 'incomplete' ? full(row.bestValue) : '',
    kind === 'set-aside' ? row.reasons.map(({ message }) => message).join('; ') : '',
    ...row.contributions.flatMap(({ figure, value, weight, term, note }) => [
      fullOrNone(figure),
      fullOrNone(value),
      full(weight),
      fullOrNone(term),
      note ?? '',
    ]),
  ];
}

function ranksOf(row: RankingRow): [CsvCell, CsvCell, CsvCell] {
  if (row.kind === 'ranked') return [row.rank, row.rank, row.rank];
  return row.kind === 'incomplete' ? ['', row.bestRank, row.worstRank] : ['', '', ''];
}

/** Hands a text over as a file; spreadsheets read the byte order mark as UTF-8. */
export function saveCsv(fileName: string, text: string): void {
  const address = URL.createObjectURL(new Blob(['\uFEFF', text], { type: 'text/csv' }));
  const link = document.createElement('a');
  link.href = address;
  link.download = fileName;
  link.click();
  URL.revokeObjectURL(address);
}

export const exportLabel = (count: number): string => `Export ${formatCount(count, 'site')} as CSV`;
