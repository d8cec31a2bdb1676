import type { GridApi } from 'ag-grid-community';
import type { GridLine } from './grid-rows.ts';

/** What of the grid lives in the address: filters as JSON by column, sort as "column:asc"; null where there is none. */
export interface GridView {
  filter: string | null;
  sort: string | null;
}

/** Takes up a view from an address; what does not fit the grid is left aside. */
export function applyGridView(api: GridApi<GridLine>, { filter, sort }: GridView): void {
  const model = filter === null ? null : parseObject(filter);
  if (model) api.setFilterModel(model);
  const [colId, way] = sort?.split(':') ?? [];
  if (colId && (way === 'asc' || way === 'desc')) api.applyColumnState({ state: [{ colId, sort: way }] });
}

export function gridViewOf(api: GridApi<GridLine>): GridView {
  const model = api.getFilterModel();
  const sorted = api.getColumnState().find(({ sort }) => sort);
  return {
    filter: Object.keys(model).length > 0 ? JSON.stringify(model) : null,
    sort: sorted ? `${sorted.colId}:${sorted.sort}` : null,
  };
}

function parseObject(text: string): Record<string, never> | null {
  try {
    const value: unknown = JSON.parse(text);
    return typeof value === 'object' && value !== null && !Array.isArray(value)
      ? (value as Record<string, never>)
      : null;
  } catch {
    return null;
  }
}
