import { meetsLimit, type Criterion } from './criterion.ts';
import { CELL, type FigureTable } from './figures.ts';
import { STRAIGHT, type Shape } from './shape.ts';
import { spanOf, valueOf, type Span } from './value.ts';

/** A must-meet limit that a site fails: both are places in the table. */
export interface Failure {
  site: number;
  criterion: number;
}

/** Everything of a ranking that does not depend on the weights. */
export interface Prepared {
  table: FigureTable;
  spans: Span[];
  /** How value grows between the levels, one a criterion. */
  shapes: Shape[];
  /** 1 where the criterion carries a must-meet limit. */
  limited: Uint8Array;
  /** 0…1, laid out as the table; 0 where the figure is missing. */
  values: Float64Array;
  /** 1 where the site fails at least one limit. */
  setAside: Uint8Array;
  /** 1 where the site misses at least one figure. */
  gaps: Uint8Array;
  failures: Failure[];
}

/**
 * Values every figure and tests every limit, once, so that a change of weights only has to add up.
 * A cell at `worst` takes value 0 and fails any limit of its criterion: what cannot be flown meets none.
 * A missing figure fails no limit: nothing is known of it.
 * @param criteria one a column of the table.
 * @param table sites × criteria, figures in the criteria's own units.
 * @throws RangeError when a criterion cannot be weighed or their number is not the table's.
 */
export function prepare(criteria: readonly Criterion[], table: FigureTable): Prepared {
  const { siteCount, criterionCount } = table;
  if (siteCount > 0 && criteria.length !== criterionCount) {
    throw new RangeError(`criteria: ${criteria.length} for a table of ${criterionCount}`);
  }
  const prepared: Prepared = {
    table,
    spans: criteria.map((criterion, column) => spanOf(criterion, table, column)),
    shapes: criteria.map(({ shape }) => shape ?? STRAIGHT),
    limited: Uint8Array.from(criteria, ({ limit }) => (limit === null ? 0 : 1)),
    values: new Float64Array(table.figures.length),
    setAside: new Uint8Array(siteCount),
    gaps: new Uint8Array(siteCount),
    failures: [],
  };
  for (let site = 0; site < siteCount; site++) {
    criteria.forEach((criterion, column) => prepareCell(prepared, criterion, site, column));
  }
  return prepared;
}

function prepareCell(prepared: Prepared, criterion: Criterion, site: number, column: number): void {
  const { table, spans, values, setAside, gaps, failures } = prepared;
  const at = site * table.criterionCount + column;
  const state = table.states[at];
  if (state === CELL.missing) {
    gaps[site] = 1;
    return;
  }
  const figure = table.figures[at] ?? 0;
  if (state === CELL.figure)
    values[at] = valueOf(figure, spans[column] ?? { kind: 'empty' }, criterion.shape);
  if (criterion.limit !== null && (state === CELL.worst || !meetsLimit(figure, criterion.limit))) {
    setAside[site] = 1;
    failures.push({ site, criterion: column });
  }
}
