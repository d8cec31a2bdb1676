import { foldName } from '#core/csv/codes.ts';
import type { Site } from '#contract/site.ts';

export const SORT_KEYS = ['code', 'name', 'latitudeDeg', 'longitudeDeg', 'elevationM'] as const;
export type SortKey = (typeof SORT_KEYS)[number];

export interface Sort {
  readonly key: SortKey;
  readonly down: boolean;
}

/** `name` or `-name`, as it stands in the address. */
export function sortOf(text: string | null): Sort | null {
  const key = SORT_KEYS.find((one) => one === text?.replace(/^-/, ''));
  return key ? { key, down: text?.startsWith('-') ?? false } : null;
}

/** Up, down, then as added. */
export function nextSort(now: Sort | null, key: SortKey): string | null {
  if (now?.key !== key) return key;
  return now.down ? null : `-${key}`;
}

const collator = new Intl.Collator('en', { numeric: true });

function compare(a: Site, b: Site, key: SortKey): number {
  const [x, y] = [a[key], b[key]];
  return typeof x === 'number' && typeof y === 'number' ? x - y : collator.compare(String(x), String(y));
}

/** The sites that hold the text in their code, name or notes, sorted; without a sort as they were added. */
export function shownSites(sites: readonly Site[], filter: string, sort: Sort | null): Site[] {
  const wanted = foldName(filter);
  const found = wanted
    ? sites.filter(({ code, name, notes }) =>
        [code, name, notes].some((text) => foldName(text).includes(wanted)),
      )
    : [...sites];
  if (sort) found.sort((a, b) => compare(a, b, sort.key) * (sort.down ? -1 : 1));
  return found;
}
