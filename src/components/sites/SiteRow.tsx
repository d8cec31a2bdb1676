import { Conflict } from '#components/ui/Conflict.tsx';
import type { Site } from '#contract/site.ts';
import { EditCell } from './EditCell.tsx';
import { COLUMNS } from './grid-keys.ts';
import { azimuthWords, CELL_NAMES, cellText, cellWords, type CellKey } from './read-site.ts';
import type { CellConflict, Edit, Editing } from './use-editing.ts';

interface RowProps {
  site: Site;
  /** Its place among all rows shown, from 0. */
  index: number;
  chosen: boolean;
  ticked: boolean;
  /** The column that Tab reaches, where it is in this row. */
  stop: number | null;
  edit: Edit | null;
  editing: Editing;
  onTick: (index: number, range: boolean) => void;
  onLeave: () => void;
}

const wide = (value: number): string => value.toString().replace('-', '−');

function Cell({ site, column, stop }: { site: Site; column: CellKey; stop: number | null }) {
  const at = COLUMNS.indexOf(column);
  const figure = column !== 'code' && column !== 'name';
  const value = site[column];
  const looks = figure ? 'num' : column === 'code' ? 'site-code' : 'site-name';
  return (
    <td
      className={looks}
      tabIndex={stop === at ? 0 : -1}
      data-column={at}
      title={typeof value === 'number' ? wide(value) : undefined}
    >
      {column === 'name' ? (
        <>
          <span className="name">{site.name}</span>
          {site.notes && <span className="sub">{site.notes}</span>}
          <span className="sub narrow-only">{azimuthWords(site.permittedAzimuthsDeg)}</span>
        </>
      ) : column === 'permittedAzimuthsDeg' && site.permittedAzimuthsDeg.length === 0 ? (
        <span className="all-round">all round</span>
      ) : (
        cellWords(site, column)
      )}
    </td>
  );
}

/** One candidate. Pointer and keys are heard by the table, which knows the row by `data-site`. */
export function SiteRow(props: RowProps) {
  const { site, index, stop, edit } = props;
  return (
    <tr aria-rowindex={index + 2} aria-selected={props.chosen} data-site={site.id} data-row={index}>
      <td className="site-tick" data-column={0} tabIndex={stop === 0 ? 0 : -1}>
        <input
          type="checkbox"
          tabIndex={-1}
          aria-label={`Select ${site.name}`}
          checked={props.ticked}
          onChange={() => undefined}
          onClick={(event) => {
            event.stopPropagation();
            props.onTick(index, event.shiftKey);
          }}
        />
      </td>
      {COLUMNS.slice(1).map((column) =>
        edit?.key === column ? (
          <td key={column} className="editing" data-column={COLUMNS.indexOf(column)}>
            <EditCell site={site} edit={edit} editing={props.editing} onLeave={props.onLeave} />
          </td>
        ) : (
          <Cell key={column} site={site} column={column as CellKey} stop={stop} />
        ),
      )}
    </tr>
  );
}

/** Someone changed the site while this person was typing: both figures, under the row, and the person chooses. */
export function ConflictRow({ conflict, editing }: { conflict: CellConflict; editing: Editing }) {
  const { current, key, patch } = conflict;
  // Every digit: two figures that differ must not print alike.
  const words = (site: Site) => cellText(site, key) || 'all round';
  const theirs = words(current);
  const yours = words({
    ...current,
    ...patch,
    values: current.values,
    particulars: current.particulars,
    version: current.version,
  });
  return (
    <tr>
      <td colSpan={COLUMNS.length} className="conflict-cell">
        <Conflict
          what={`${CELL_NAMES[key]} of ${current.name}`}
          yours={yours}
          theirs={theirs}
          by={current.changedBy ?? undefined}
          at={current.changedAt ?? undefined}
          keepTheirs={`Keep ${theirs}`}
          putYours={`Put ${yours}`}
          onKeepTheirs={editing.keepTheirs}
          onPutYours={() => void editing.putYours()}
        />
      </td>
    </tr>
  );
}
