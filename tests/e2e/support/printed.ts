import type { Page } from '@playwright/test';

/** A table as it is read: one row a line, spaces folded. @param without parts that are left out */
export function readTable(
  page: Page,
  selector: string,
  without = '.sr-only, .sv-error',
): Promise<string[][]> {
  return page.locator(selector).evaluate((table, skipped) => {
    const text = (cell: Element): string => {
      const copy = cell.cloneNode(true) as Element;
      for (const part of copy.querySelectorAll(skipped)) part.remove();
      return (copy.textContent ?? '').replace(/\s+/g, ' ').trim();
    };
    return [...table.querySelectorAll('tbody tr')].map((row) =>
      [...row.querySelectorAll('th, td')].map(text),
    );
  }, without);
}
