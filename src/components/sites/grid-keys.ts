/** A cell of the table: its row among those shown, and its column. */
export interface At {
  readonly row: number;
  readonly column: number;
}

/** Columns in order; the first holds the tick for choosing several. */
export const COLUMNS = [
  'select',
  'code',
  'name',
  'latitudeDeg',
  'longitudeDeg',
  'elevationM',
  'permittedAzimuthsDeg',
] as const;

const PAGE = 10;

interface Pressed {
  readonly key: string;
  readonly ctrlKey: boolean;
}

/** Where a key moves the focus within the grid; undefined for a key that doesn't. */
export function moveFocus({ row, column }: At, { key, ctrlKey }: Pressed, rows: number): At | undefined {
  const last = { row: rows - 1, column: COLUMNS.length - 1 };
  const moves: Record<string, At> = {
    ArrowUp: { row: row - 1, column },
    ArrowDown: { row: row + 1, column },
    ArrowLeft: { row, column: column - 1 },
    ArrowRight: { row, column: column + 1 },
    PageUp: { row: row - PAGE, column },
    PageDown: { row: row + PAGE, column },
    Home: { row: ctrlKey ? 0 : row, column: 0 },
    End: { row: ctrlKey ? last.row : row, column: last.column },
  };
  const to = moves[key];
  return (
    to && {
      row: Math.max(0, Math.min(last.row, to.row)),
      column: Math.max(0, Math.min(last.column, to.column)),
    }
  );
}
