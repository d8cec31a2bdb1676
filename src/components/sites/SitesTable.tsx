import { Fragment, useEffect, useRef, useState, type KeyboardEvent, type MouseEvent } from 'react';
import { Icon } from '#components/ui/Icon.tsx';
import type { Site } from '#contract/site.ts';
import { COLUMNS, moveFocus, type At } from './grid-keys.ts';
import { CELLS, type CellKey } from './read-site.ts';
import { SORT_KEYS, type Sort, type SortKey } from './rows.ts';
import { ConflictRow, SiteRow } from './SiteRow.tsx';
import type { Editing } from './use-editing.ts';
import { useWindow } from './use-window.ts';

interface TableProps {
  /** Those that the filter leaves, in the order shown. */
  sites: readonly Site[];
  chosenId: string | null;
  onChoose: (siteId: string) => void;
  ticked: ReadonlySet<string>;
  onTick: (ticked: ReadonlySet<string>) => void;
  sort: Sort | null;
  onSort: (key: SortKey) => void;
  editing: Editing;
  /** Null where the viewer may edit. */
  locked: string | null;
}

const heads: readonly { key: (typeof COLUMNS)[number]; name: string; unit?: string }[] = [
  { key: 'code', name: 'Code' },
  { key: 'name', name: 'Candidate site' },
  { key: 'latitudeDeg', name: 'Latitude', unit: '°' },
  { key: 'longitudeDeg', name: 'Longitude', unit: '°' },
  { key: 'elevationM', name: 'Elev.', unit: 'm' },
  { key: 'permittedAzimuthsDeg', name: 'Azimuths', unit: '°' },
];

const isCell = (column: string | undefined): column is CellKey => CELLS.some((key) => key === column);

function Head({
  name,
  unit,
  column,
  sort,
  onSort,
}: (typeof heads)[number] & { column: string } & Pick<TableProps, 'sort' | 'onSort'>) {
  const key = SORT_KEYS.find((one) => one === column);
  const sorted = key && sort?.key === key ? (sort.down ? 'descending' : 'ascending') : undefined;
  const figure = column !== 'code' && column !== 'name';
  return (
    <th className={figure ? 'num' : undefined} aria-sort={sorted}>
      {key ? (
        <button type="button" className="sort" onClick={() => onSort(key)}>
          {name}
          {sorted && <Icon name={sorted === 'descending' ? 'down' : 'up'} size={12} />}
        </button>
      ) : (
        name
      )}
      {unit && <span className="unit">{unit}</span>}
    </th>
  );
}

/** Where in the table an event happened. */
function placeOf(target: EventTarget): (At & { siteId: string }) | undefined {
  const cell = target instanceof Element ? target.closest<HTMLElement>('[data-column]') : null;
  const row = cell?.closest<HTMLElement>('tr[data-site]');
  if (!cell || !row) return undefined;
  return {
    row: Number(row.dataset['row']),
    column: Number(cell.dataset['column']),
    siteId: row.dataset['site'] ?? '',
  };
}

/**
 * The candidates as a grid with one tab stop: arrows, Home, End and the Page keys move, Enter edits, Space chooses,
 * Escape leaves a cell. Long lists draw only the rows in sight.
 */
export function SitesTable(props: TableProps) {
  const { sites, chosenId, ticked, editing } = props;
  const holder = useRef<HTMLDivElement>(null);
  const [at, setAt] = useState<At>({ row: 0, column: 1 });
  const lastTick = useRef<number | null>(null);
  const drawn = useWindow(holder, sites.length);
  const stop = { row: Math.min(at.row, Math.max(0, sites.length - 1)), column: at.column };

  const cellAt = ({ row, column }: At): HTMLElement | null =>
    holder.current?.querySelector<HTMLElement>(`tr[data-row="${row}"] [data-column="${column}"]`) ?? null;
  const reveal = (row: number) => {
    const element = holder.current;
    if (!element || element.scrollHeight <= element.clientHeight) return;
    const top = row * drawn.rowPx;
    if (top < element.scrollTop || top > element.scrollTop + element.clientHeight - 3 * drawn.rowPx)
      element.scrollTop = top - element.clientHeight / 3;
  };
  const focus = (to: At) => {
    setAt(to);
    reveal(to.row);
    // A row scrolled into sight is drawn in the next frame.
    requestAnimationFrame(() => requestAnimationFrame(() => cellAt(to)?.focus()));
  };
  const chosenRow = sites.findIndex(({ id }) => id === chosenId);
  const revealLatest = useRef(reveal);
  useEffect(() => {
    revealLatest.current = reveal;
  });
  useEffect(() => {
    if (chosenRow >= 0) revealLatest.current(chosenRow);
  }, [chosenRow]);

  const tick = (row: number, range: boolean) => {
    const id = sites[row]?.id;
    if (!id) return;
    const next = new Set(ticked);
    const from = range && lastTick.current !== null ? lastTick.current : row;
    const on = !ticked.has(id);
    for (const site of sites.slice(Math.min(from, row), Math.max(from, row) + 1)) {
      if (on) next.add(site.id);
      else next.delete(site.id);
    }
    lastTick.current = row;
    props.onTick(next);
  };
  const editAt = (row: number, column: number) => {
    const site = sites[row];
    const key = COLUMNS[column];
    if (site && isCell(key) && props.locked === null) editing.begin(site, key);
  };
  const click = (event: MouseEvent) => {
    const place = placeOf(event.target);
    if (!place || editing.edit) return;
    setAt(place);
    if (place.column > 0) props.onChoose(place.siteId);
  };
  const doubleClick = (event: MouseEvent) => {
    const place = placeOf(event.target);
    if (place) editAt(place.row, place.column);
  };
  const press = (event: KeyboardEvent) => {
    const place = placeOf(event.target);
    if (!place || event.altKey || event.metaKey) return;
    const to = moveFocus(place, event, sites.length);
    if (to) focus(to);
    else if (event.key === ' ' && place.column === 0) tick(place.row, event.shiftKey);
    else if (event.key === ' ') props.onChoose(place.siteId);
    else if (event.key === 'Enter' || event.key === 'F2') editAt(place.row, place.column);
    else return;
    event.preventDefault();
  };

  const all = sites.length > 0 && sites.every(({ id }) => ticked.has(id));
  const rows = sites.slice(drawn.from, drawn.to);
  const long = sites.length > rows.length;
  return (
    <div className="sites-scroll" data-long={long ? '' : undefined} ref={holder}>
      <table
        className="sites-table table"
        data-hover=""
        role="grid"
        aria-label="Candidate sites"
        aria-rowcount={sites.length + 1}
        onClick={click}
        onDoubleClick={doubleClick}
        onKeyDown={press}
      >
        <thead>
          <tr aria-rowindex={1}>
            <th className="site-tick">
              <input
                type="checkbox"
                aria-label="Select all candidates shown"
                checked={all}
                onChange={() => props.onTick(new Set(all ? [] : sites.map(({ id }) => id)))}
              />
            </th>
            {heads.map((head) => (
              <Head {...head} key={head.key} column={head.key} sort={props.sort} onSort={props.onSort} />
            ))}
          </tr>
        </thead>
        <tbody>
          {drawn.from > 0 && <Gap px={drawn.from * drawn.rowPx} />}
          {rows.map((site, position) => {
            const index = drawn.from + position;
            const edit = editing.edit?.siteId === site.id ? editing.edit : null;
            return (
              <Fragment key={site.id}>
                <SiteRow
                  site={site}
                  index={index}
                  chosen={site.id === chosenId}
                  ticked={ticked.has(site.id)}
                  stop={stop.row === index ? stop.column : null}
                  edit={edit}
                  editing={editing}
                  onTick={tick}
                  onLeave={() => focus(at)}
                />
                {editing.conflict?.siteId === site.id && (
                  <ConflictRow conflict={editing.conflict} editing={editing} />
                )}
              </Fragment>
            );
          })}
          {drawn.to < sites.length && <Gap px={(sites.length - drawn.to) * drawn.rowPx} />}
        </tbody>
      </table>
    </div>
  );
}

/** The room of the rows that are not drawn. */
function Gap({ px }: { px: number }) {
  return (
    <tr aria-hidden="true">
      <td colSpan={COLUMNS.length} height={px} className="gap" />
    </tr>
  );
}
