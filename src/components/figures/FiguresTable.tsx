import { useRef, useState, type KeyboardEvent } from 'react';
import { useWindow } from '#components/sites/use-window.ts';
import { formatNumber } from '#contract/format.ts';
import { stepInWords } from '#contract/rating.ts';
import { spanText } from './figure.ts';
import type { EnteredLine } from './known.ts';

interface FiguresTableProps {
  lines: readonly EnteredLine[];
  /** One count of decimals a criterion, by its place. */
  decimals: readonly number[];
  onOpen: (siteId: string, criterionId: string) => void;
}

const PAGE = 10;
const MOVES: Record<string, number> = {
  ArrowDown: 1,
  ArrowUp: -1,
  PageDown: PAGE,
  PageUp: -PAGE,
  Home: -Infinity,
  End: Infinity,
};

/** Entered figures as a list with one tab stop: arrows, Home, End and the Page keys move, Enter opens a figure. */
export function FiguresTable({ lines, decimals, onOpen }: FiguresTableProps) {
  const holder = useRef<HTMLDivElement>(null);
  const drawn = useWindow(holder, lines.length);
  const [at, setAt] = useState(0);
  const stop = Math.min(at, lines.length - 1);
  const move = (event: KeyboardEvent): void => {
    const step = MOVES[event.key];
    const element = holder.current;
    if (step === undefined || !element) return;
    event.preventDefault();
    const to = Math.max(0, Math.min(lines.length - 1, stop + step));
    setAt(to);
    const top = to * drawn.rowPx;
    if (top < element.scrollTop || top > element.scrollTop + element.clientHeight - 3 * drawn.rowPx)
      element.scrollTop = top - element.clientHeight / 3;
    // A row scrolled into sight is drawn in the next frame.
    requestAnimationFrame(() =>
      requestAnimationFrame(() => element.querySelector<HTMLElement>(`tr[data-row="${to}"] button`)?.focus()),
    );
  };
  return (
    <div className="table-scroll fig-scroll" ref={holder}>
      <table className="fig-table table" aria-label="Entered figures" aria-rowcount={lines.length + 1}>
        <thead>
          <tr aria-rowindex={1}>
            <th scope="col">Candidate site</th>
            <th scope="col">Criterion</th>
            <th scope="col" className="num">
              Figure
            </th>
            <th scope="col" className="num">
              Low – high
            </th>
            <th scope="col">Source</th>
            <th scope="col">Date</th>
            <th scope="col">Confidence</th>
            <th scope="col" className="num">
              Evidence
            </th>
          </tr>
        </thead>
        <tbody>
          <Gap px={drawn.from * drawn.rowPx} />
          {lines.slice(drawn.from, drawn.to).map((line, index) => {
            const row = drawn.from + index;
            return (
              <FigureRow
                key={`${line.siteId}/${line.criterion.id}`}
                line={line}
                row={row}
                decimals={decimals[line.place] ?? 0}
                isStop={row === stop}
                onFocus={() => setAt(row)}
                onMove={move}
                onOpen={onOpen}
              />
            );
          })}
          <Gap px={(lines.length - drawn.to) * drawn.rowPx} />
        </tbody>
      </table>
    </div>
  );
}

/** What stands for the rows out of sight. */
function Gap({ px }: { px: number }) {
  return px > 0 ? (
    <tr aria-hidden="true">
      <td colSpan={8} style={{ height: px, padding: 0, border: 0 }} />
    </tr>
  ) : null;
}

interface FigureRowProps {
  line: EnteredLine;
  row: number;
  decimals: number;
  isStop: boolean;
  onFocus: () => void;
  onMove: (event: KeyboardEvent) => void;
  onOpen: FiguresTableProps['onOpen'];
}

function FigureRow({ line, row, decimals, isStop, onFocus, onMove, onOpen }: FigureRowProps) {
  const { siteId, siteName, code, criterion, value, particulars, files } = line;
  const { source, date, confidence } = particulars;
  const figure = stepInWords(criterion, value) ?? formatNumber(value, decimals);
  return (
    <tr data-site={siteId} data-row={row} aria-rowindex={row + 2}>
      <th scope="row">
        {siteName} <span className="sub">{code}</span>
      </th>
      <td>{criterion.name}</td>
      <td className="num">
        <button
          type="button"
          className="fig-open"
          tabIndex={isStop ? 0 : -1}
          aria-label={`Open ${criterion.name} of ${siteName}, ${figure} ${criterion.unit}`.trim()}
          onFocus={onFocus}
          onKeyDown={onMove}
          onClick={() => onOpen(siteId, criterion.id)}
        >
          {figure}
        </button>{' '}
        <span className="sub">{criterion.unit}</span>
      </td>
      <td className="num">{spanText(particulars, decimals)}</td>
      <td className="fig-source" title={source}>
        {source ?? <span className="no-figure">no source</span>}
      </td>
      <td className="fig-date">{date}</td>
      <td>{confidence}</td>
      <td className="num">{files > 0 && formatNumber(files)}</td>
    </tr>
  );
}
