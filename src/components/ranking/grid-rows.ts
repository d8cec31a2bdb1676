import type { IRowNode } from 'ag-grid-community';
import { rowOf, type RankingRow } from '#contract/ranking-rows.ts';
import type { RankingModel } from '#contract/ranking-model.ts';
import type { Listed } from '#core/decision/listing.ts';

/** A line of the grid: a site, drawn only when it comes into sight, or the band over those set aside. */
export type GridLine =
  | { kind: 'band'; id: string }
  | { kind: 'site'; id: string; listed: Listed; place: number; model: RankingModel };

const BAND: GridLine = { kind: 'band', id: 'band' };

/** @param banded whether the set-aside sites get their band */
export function gridLines(model: RankingModel, banded: boolean): GridLine[] {
  const lines: GridLine[] = [];
  model.rows.forEach((listed, place) => {
    const first = listed.kind === 'set-aside' && model.rows[place - 1]?.kind !== 'set-aside';
    if (first && banded) lines.push(BAND);
    const id = model.figures.sites[listed.site]?.siteId ?? String(listed.site);
    lines.push({ kind: 'site', id, listed, place, model });
  });
  return lines;
}

const drawn = new WeakMap<GridLine, RankingRow>();

/** A line's row; worked out once, when it is first drawn. */
export function rowOfLine(line: GridLine | undefined): RankingRow | undefined {
  if (line?.kind !== 'site') return undefined;
  const known = drawn.get(line);
  if (known) return known;
  const row = rowOf(line.model, line.listed);
  drawn.set(line, row);
  return row;
}

const GROUPS = { ranked: 0, incomplete: 1, band: 2, 'set-aside': 3 } as const;

const groupOf = (line: GridLine | undefined): number =>
  line?.kind === 'site' ? GROUPS[line.listed.kind] : GROUPS.band;

/** However the grid is sorted, the incomplete and then the set-aside sites stay apart at the bottom. */
export function keepGroups(nodes: IRowNode<GridLine>[]): void {
  const inOrder = [...nodes].sort((a, b) => groupOf(a.data) - groupOf(b.data));
  nodes.splice(0, nodes.length, ...inOrder);
}

/** For sorting and filtering: the cell's number; undefined where there is none. */
export function figureAt(line: GridLine | undefined, place: number): number | undefined {
  if (line?.kind !== 'site') return undefined;
  const cell = line.model.figures.cells[line.listed.site]?.[place];
  return typeof cell === 'number' ? cell : undefined;
}

/** Sites without a figure come last whichever way the column is sorted. */
export function compareFigures(
  a: number | undefined,
  b: number | undefined,
  _nodeA: unknown,
  _nodeB: unknown,
  descending: boolean,
): number {
  if (a === undefined || b === undefined) {
    const order = Number(a === undefined) - Number(b === undefined);
    return descending ? -order : order;
  }
  return a - b;
}
