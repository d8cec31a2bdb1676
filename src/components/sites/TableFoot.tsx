import { Button } from '#components/ui/Button.tsx';
import { EmptyState } from '#components/ui/States.tsx';

interface FootProps {
  total: number;
  /** Those that the filter leaves. */
  shown: number;
  onShowAll: () => void;
}

/** Under the table: what to do where there is no row, else how to change one. */
export function TableFoot({ total, shown, onShowAll }: FootProps) {
  if (total === 0)
    return (
      <EmptyState fact="No sites yet.">
        Add one by typing its coordinates, click a place on the map, or upload a CSV.
      </EmptyState>
    );
  if (shown === 0)
    return (
      <EmptyState fact="No site matches." actions={<Button onClick={onShowAll}>Show all sites</Button>}>
        The text is looked for in code, name and notes.
      </EmptyState>
    );
  return (
    <p className="caption sites-hint">
      Drag a round handle on the map, or type in the Azimuths column, to change a sector. Azimuths run
      clockwise from north. Enter edits a cell.
    </p>
  );
}
