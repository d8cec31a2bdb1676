import { useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { Segmented } from '#components/ui/Segmented.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import { formatNumber } from '#contract/format.ts';
import type { SitesFile } from '#core/csv/read-sites.ts';
import type { Row } from '#core/csv/outcomes.ts';
import { countStates, filterRows, ROW_FILTERS, type RowFilter } from './row-filter.ts';
import { UploadRow } from './UploadRow.tsx';

const PAGE_ROWS = 100;

interface UploadRowsProps {
  file: SitesFile;
  /** Lines that are left out of the commit. */
  left: ReadonlySet<number>;
  onLeave: (left: ReadonlySet<number>) => void;
}

const FILTER_NAMES: Readonly<Record<RowFilter, string>> = {
  telling: 'To look at',
  refused: 'Refused',
  changed: 'Changed',
  warned: 'Warned of',
  duplicate: 'In the study',
  accepted: 'As they stand',
  all: 'All',
};

const isGood = (row: Row): boolean => row.outcome !== 'refused';

/** Every row of the file with what becomes of it and why, a hundred at a time. */
export function UploadRows({ file, left, onLeave }: UploadRowsProps) {
  const { rows, columns } = file;
  const states = countStates(rows);
  const telling = rows.length - states.accepted;
  const counts: Record<RowFilter, number> = { ...states, telling, all: rows.length };
  const [filter, setFilter] = useState<RowFilter>(telling > 0 ? 'telling' : 'all');
  const [page, setPage] = useState(0);
  const shown = filterRows(rows, filter);
  const drawn = shown.slice(page * PAGE_ROWS, (page + 1) * PAGE_ROWS);
  const show = (next: RowFilter) => {
    setFilter(next);
    setPage(0);
  };
  const good = shown.filter(isGood);
  const all = good.length > 0 && good.every(({ line }) => !left.has(line));
  const leave = (lines: readonly number[], out: boolean) => {
    const next = new Set(left);
    for (const line of lines) {
      if (out) next.add(line);
      else next.delete(line);
    }
    onLeave(next);
  };
  const last = rows.at(-1);
  return (
    <div className="upload-rows">
      <Segmented
        legend="Rows shown"
        segments={ROW_FILTERS.filter((one) => counts[one] > 0 || one === 'all' || one === filter).map(
          (value) => ({
            value,
            name: `${FILTER_NAMES[value]} ${formatNumber(counts[value])}`,
          }),
        )}
        value={filter}
        onChange={show}
      />
      <TableScroll label="Rows of the file">
        <table className="upload-table table">
          <thead>
            <tr>
              <th scope="col" className="upload-tick">
                <input
                  type="checkbox"
                  aria-label="Choose all good rows shown"
                  checked={all}
                  disabled={good.length === 0}
                  onChange={() =>
                    leave(
                      good.map(({ line }) => line),
                      all,
                    )
                  }
                />
              </th>
              <th scope="col" className="num">
                Line
              </th>
              <th scope="col">Outcome</th>
              <th scope="col">Code</th>
              <th scope="col">Name</th>
              <th scope="col" className="num">
                Latitude<span className="unit">°</span>
              </th>
              <th scope="col" className="num">
                Longitude<span className="unit">°</span>
              </th>
              <th scope="col">Reason</th>
            </tr>
          </thead>
          <tbody>
            {drawn.map((row) => (
              <UploadRow
                key={row.line}
                row={row}
                columns={columns}
                chosen={!left.has(row.line)}
                onChoose={(chosen) => leave([row.line], !chosen)}
              />
            ))}
            {filter === 'telling' && states.accepted > 0 && (
              <tr className="band">
                <td />
                <td className="num">{`${rows[0]?.line ?? 0}–${last?.line ?? 0}`}</td>
                <td colSpan={6}>
                  {`${formatNumber(states.accepted)} more accepted as they stand `}
                  <Button kind="text" size="small" onClick={() => show('all')}>
                    Show them
                  </Button>
                </td>
              </tr>
            )}
          </tbody>
        </table>
      </TableScroll>
      <Pages page={page} total={shown.length} onPage={setPage} />
    </div>
  );
}

function Pages({ page, total, onPage }: { page: number; total: number; onPage: (page: number) => void }) {
  if (total <= PAGE_ROWS) return null;
  const last = Math.ceil(total / PAGE_ROWS) - 1;
  const from = formatNumber(page * PAGE_ROWS + 1);
  const to = formatNumber(Math.min(total, (page + 1) * PAGE_ROWS));
  return (
    <nav className="upload-pages" aria-label="Pages of rows">
      <Button
        size="small"
        icon="previous"
        notYet={page === 0 ? 'These are the first rows.' : undefined}
        onClick={() => onPage(page - 1)}
      >
        Rows before
      </Button>
      <span role="status">{`Rows ${from} to ${to} of ${formatNumber(total)}`}</span>
      <Button
        size="small"
        icon="next"
        notYet={page === last ? 'These are the last rows.' : undefined}
        onClick={() => onPage(page + 1)}
      >
        Rows after
      </Button>
    </nav>
  );
}
