import { useEffect, useRef, type KeyboardEvent } from 'react';
import { Icon } from '#components/ui/Icon.tsx';
import type { Site } from '#contract/site.ts';
import { CELL_NAMES, readCell } from './read-site.ts';
import type { Edit, Editing } from './use-editing.ts';

interface EditCellProps {
  site: Site;
  edit: Edit;
  editing: Editing;
  /** The keyboard goes back to the grid. */
  onLeave: () => void;
}

/** One cell as a field: checked when it is left or on Enter, never while typing; Escape puts the old text back. */
export function EditCell({ site, edit, editing, onLeave }: EditCellProps) {
  const field = useRef<HTMLInputElement>(null);
  const left = useRef(false);
  useEffect(() => {
    field.current?.focus();
    field.current?.select();
  }, []);
  const name = `${CELL_NAMES[edit.key]} of ${site.name}`;
  const noteId = `cell-${site.id}-note`;
  const reading = readCell(edit.key, edit.text);
  const leave = () => {
    left.current = true;
    onLeave();
  };
  const press = (event: KeyboardEvent) => {
    event.stopPropagation();
    if (event.key === 'Enter') void editing.commit(site, edit.text).then(leave);
    if (event.key === 'Escape') {
      editing.cancel();
      leave();
    }
  };
  return (
    <span className="edit-cell" data-invalid={edit.message ? '' : undefined}>
      <input
        ref={field}
        type="text"
        value={edit.text}
        aria-label={name}
        aria-invalid={edit.message !== null || undefined}
        aria-describedby={noteId}
        autoComplete="off"
        onChange={(event) => editing.type(event.target.value)}
        onKeyDown={press}
        onBlur={() => {
          if (!left.current) void editing.commit(site, edit.text);
        }}
      />
      <span className="edit-note" id={noteId} role={edit.message ? 'alert' : undefined}>
        {edit.message ? (
          <>
            <Icon name="refused" size={14} /> {edit.message}
            {edit.meant && ` Did you mean ${edit.meant}?`}
          </>
        ) : (
          reading.kind === 'read' && reading.words
        )}
      </span>
    </span>
  );
}
