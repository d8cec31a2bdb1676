import type { Page } from '@playwright/test';

const DESK = { width: 1440, height: 900 };
const PHONE = { width: 390, height: 844 };

/** Pictures of a page as it stands, at both widths in both themes; the page is left as it was. */
export async function picture(page: Page, name: string): Promise<void> {
  for (const size of [PHONE, DESK])
    for (const [theme, colorScheme] of [['night', 'dark'] as const, ['day', 'light'] as const]) {
      await page.setViewportSize(size);
      await page.emulateMedia({ colorScheme });
      await page.waitForTimeout(400);
      await page.screenshot({
        path: `test-results/screens/${name}-${theme}-${size.width}.png`,
        fullPage: true,
      });
    }
}
