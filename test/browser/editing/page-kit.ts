// What the tests of editing on the page share: where the focus is, what the desk said, the lines in their order.

import type { Page } from 'playwright-core';

export const linesOn = (page: Page) =>
  page.locator('ts-row').evaluateAll((rows) => rows.map((row) => (row as HTMLElement).dataset['cell'] ?? ''));
export const focusedRow = (page: Page) =>
  page.evaluate(() => document.activeElement?.closest('ts-row')?.getAttribute('data-cell') ?? null);
/** The focus is in the grid, in a row or in a new line of it. */
export const focusInGrid = (page: Page) => page.evaluate(() => document.activeElement?.closest('[role="grid"]') != null);
export const said = (page: Page) => page.locator('[role="status"]').first().textContent();
export const undoButton = (page: Page) => page.getByRole('button', { name: 'Undo' });
export const rowOn = (page: Page, cell: string) => page.locator(`ts-row[data-cell="${cell}"]`);

export async function toLine(page: Page, cell: string) {
  await rowOn(page, cell).scrollIntoViewIfNeeded();
  await rowOn(page, cell).locator('[data-column="1"]').focus();
}
