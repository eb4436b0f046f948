/** What every page owes everybody, on any screen. */
import AxeBuilder from '@axe-core/playwright';
import type { Page } from 'playwright-core';
import { expect } from 'vitest';

/** No fault that a machine can find; what holds is not listed, since listing it takes most of the time. */
export async function expectAccessible(page: Page, what: string): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).options({ resultTypes: ['violations'] }).analyze();
  const said = violations.map(({ id, help, nodes }) => `${id}: ${help}: ${nodes.map(({ html }) => html).join(' | ')}`);
  expect(said, what).toEqual([]);
}

/** The page is no wider than the screen. */
export async function expectNoSidewaysScroll(page: Page, what: string): Promise<void> {
  const widths = await page.evaluate(() => ({
    content: document.documentElement.scrollWidth,
    screen: document.documentElement.clientWidth,
  }));
  expect(widths.content, what).toBeLessThanOrEqual(widths.screen);
}
