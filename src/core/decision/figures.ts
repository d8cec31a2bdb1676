/**
 * What a cell of sites × criteria holds.
 * `figure`: a number. `missing`: nobody has entered one; it may turn out worst or best.
 * `worst`: no number exists because an orbit is out of reach or falls short; it counts at the worst level.
 */
export const CELL = { figure: 0, missing: 1, worst: 2 } as const;

/** One cell as callers hand it in: a number, null for missing, or `worst`. */
export type Cell = number | null | 'worst';

/** Sites × criteria, row by row: the figure of site s under criterion c stands at s × criterionCount + c. */
export interface FigureTable {
  siteCount: number;
  criterionCount: number;
  /** Criterion's own unit; 0 where the state is not `figure`. */
  figures: Float64Array;
  /** One of CELL. */
  states: Uint8Array;
}

/**
 * Packs rows of cells into the flat table that weighing reads.
 * @param rows one row a site, one cell a criterion.
 * @throws RangeError when a row has another length than the first, or a figure is not finite.
 */
export function figureTable(rows: readonly (readonly Cell[])[]): FigureTable {
  const siteCount = rows.length;
  const criterionCount = rows[0]?.length ?? 0;
  const figures = new Float64Array(siteCount * criterionCount);
  const states = new Uint8Array(siteCount * criterionCount);
  rows.forEach((row, site) => {
    if (row.length !== criterionCount) {
      throw new RangeError(`row ${site}: ${row.length} cells where the first has ${criterionCount}`);
    }
    row.forEach((cell, criterion) => {
      const at = site * criterionCount + criterion;
      if (cell === null) states[at] = CELL.missing;
      else if (cell === 'worst') states[at] = CELL.worst;
      else if (Number.isFinite(cell)) figures[at] = cell;
      else throw new RangeError(`row ${site}, cell ${criterion}: ${cell} is not a finite figure`);
    });
  });
  return { siteCount, criterionCount, figures, states };
}
