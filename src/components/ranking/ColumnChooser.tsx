import { useEffect, useId, useRef, useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { Checkbox } from '#components/ui/Check.tsx';
import type { CriterionColumn } from './columns.ts';

interface ColumnChooserProps {
  columns: readonly CriterionColumn[];
  hidden: ReadonlySet<string>;
  onHide: (hidden: ReadonlySet<string>) => void;
}

/** Which criteria's columns are shown; rank, site and overall value always are. */
export function ColumnChooser({ columns, hidden, onHide }: ColumnChooserProps) {
  const [open, setOpen] = useState(false);
  const root = useRef<HTMLDivElement>(null);
  const id = useId();
  useEffect(() => {
    if (!open) return;
    root.current?.querySelector('input')?.focus();
    const away = (event: PointerEvent): void => {
      if (event.target instanceof Node && !root.current?.contains(event.target)) setOpen(false);
    };
    const leave = (event: KeyboardEvent): void => {
      if (event.key !== 'Escape') return;
      setOpen(false);
      root.current?.querySelector('button')?.focus();
    };
    document.addEventListener('pointerdown', away);
    document.addEventListener('keydown', leave);
    return () => {
      document.removeEventListener('pointerdown', away);
      document.removeEventListener('keydown', leave);
    };
  }, [open]);
  const toggle = (criterionId: string): void => {
    const next = new Set(hidden);
    if (!next.delete(criterionId)) next.add(criterionId);
    onHide(next);
  };
  return (
    <div className="relative" ref={root}>
      <Button
        size="small"
        icon="columns"
        aria-expanded={open}
        aria-controls={id}
        onClick={() => setOpen(!open)}
      >
        {hidden.size > 0 ? `Columns, ${hidden.size} hidden` : 'Columns'}
      </Button>
      {open && (
        <fieldset className="menu rk-chooser" id={id}>
          <legend className="sr-only">Columns shown</legend>
          {columns.map(({ criterion, letter }) => (
            <Checkbox
              key={criterion.id}
              label={`${letter} ${criterion.name}`}
              checked={!hidden.has(criterion.id)}
              onChange={() => toggle(criterion.id)}
            />
          ))}
          <Button size="small" kind="text" onClick={() => onHide(new Set())}>
            Show all columns
          </Button>
        </fieldset>
      )}
    </div>
  );
}
