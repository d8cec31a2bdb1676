import { CELL } from './figures.ts';
import type { Prepared } from './prepare.ts';

/**
 * Some criteria of a prepared table, with everything else as it was: what a site was set aside for stays, and a gap is
 * one only where the figure of a kept criterion is missing.
 * @param prepared the whole.
 * @param criteria places in the whole, in the order wanted; they become places 0, 1, … of the part.
 * @throws RangeError when a place is none of the table's.
 */
export function criteriaOf(prepared: Prepared, criteria: readonly number[]): Prepared {
  const { table, spans, shapes, limited, failures } = prepared;
  const { siteCount, criterionCount } = table;
  const wrong = criteria.find((place) => !Number.isInteger(place) || place < 0 || place >= spans.length);
  if (wrong !== undefined) throw new RangeError(`criteriaOf: criterion ${wrong} of ${spans.length}`);
  const columnsOf = <T extends Float64Array | Uint8Array>(into: T, from: T): T => {
    for (let site = 0; site < siteCount; site++) {
      criteria.forEach((place, column) => {
        into[site * criteria.length + column] = from[site * criterionCount + place] ?? 0;
      });
    }
    return into;
  };
  const cells = siteCount * criteria.length;
  const states = columnsOf(new Uint8Array(cells), table.states);
  return {
    table: {
      siteCount,
      criterionCount: criteria.length,
      figures: columnsOf(new Float64Array(cells), table.figures),
      states,
    },
    spans: criteria.flatMap((place) => spans[place] ?? []),
    shapes: criteria.flatMap((place) => shapes[place] ?? []),
    limited: Uint8Array.from(criteria, (place) => limited[place] ?? 0),
    values: columnsOf(new Float64Array(cells), prepared.values),
    setAside: prepared.setAside,
    gaps: prepared.gaps.map((_, site) =>
      Number(states.subarray(site * criteria.length, (site + 1) * criteria.length).includes(CELL.missing)),
    ),
    failures: failures.flatMap(({ site, criterion }) => {
      const column = criteria.indexOf(criterion);
      return column < 0 ? [] : [{ site, criterion: column }];
    }),
  };
}
