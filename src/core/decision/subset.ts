import type { Prepared } from './prepare.ts';

/**
 * Some sites of a prepared table, with everything else as it was: levels stay those of all candidates, so that a value
 * is the same in the part as in the whole.
 * @param prepared the whole.
 * @param sites places in the whole, in the order wanted; they become places 0, 1, … of the part.
 * @throws RangeError when a place is none of the table's.
 */
export function subsetOf(prepared: Prepared, sites: ArrayLike<number>): Prepared {
  const { table, failures } = prepared;
  const { siteCount, criterionCount } = table;
  const wanted = Array.from(sites);
  const wrong = wanted.find((site) => !Number.isInteger(site) || site < 0 || site >= siteCount);
  if (wrong !== undefined) throw new RangeError(`subsetOf: site ${wrong} of ${siteCount}`);
  const rowsOf = <T extends Float64Array | Uint8Array>(into: T, from: T): T => {
    wanted.forEach((site, row) => {
      into.set(from.subarray(site * criterionCount, (site + 1) * criterionCount), row * criterionCount);
    });
    return into;
  };
  const cells = wanted.length * criterionCount;
  return {
    ...prepared,
    table: {
      siteCount: wanted.length,
      criterionCount,
      figures: rowsOf(new Float64Array(cells), table.figures),
      states: rowsOf(new Uint8Array(cells), table.states),
    },
    values: rowsOf(new Float64Array(cells), prepared.values),
    setAside: Uint8Array.from(wanted, (site) => prepared.setAside[site] ?? 0),
    gaps: Uint8Array.from(wanted, (site) => prepared.gaps[site] ?? 0),
    failures: failuresAmong(failures, wanted),
  };
}

/** In the order of the part's rows. */
function failuresAmong(failures: Prepared['failures'], wanted: readonly number[]): Prepared['failures'] {
  const bySite = new Map<number, number[]>();
  for (const { site, criterion } of failures) bySite.set(site, [...(bySite.get(site) ?? []), criterion]);
  return wanted.flatMap((from, site) => (bySite.get(from) ?? []).map((criterion) => ({ site, criterion })));
}
