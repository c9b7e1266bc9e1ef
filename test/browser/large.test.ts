// A sheet of 1 000 cells: what is near the window is drawn first, everything in the end, and no number of before is left anywhere.

import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makeRecord } from '../../src/record/index.ts';
import { calculate, writeSheet } from '../../src/sheet/index.ts';
import { largeSheet } from '../bench/large-sheet.ts';
import { connect, drop, open } from './open.ts';

let browser: Browser;
beforeAll(async () => {
  browser = await connect();
});
afterAll(() => browser.close());

const sheet = largeSheet(1_000);
const resultOf = (cell: string, power: string) => {
  const cells = sheet.cells.map((one) => (one.id === 'P' && one.kind === 'given' ? { ...one, value: power } : one));
  return makeRecord(calculate({ ...sheet, cells })).steps.find((step) => step.cell === cell)?.cases[0];
};

describe('a sheet of 1 000 cells', () => {
  it('is typeset where one looks, complete in the end, walked from end to end, and recalculated to its last line', async () => {
    const { page, faults, violations, close } = await open(browser);
    await drop(page, 'large.sheet.json', writeSheet(sheet));
    await expect.poll(() => page.locator('h1').textContent()).toBe(sheet.title);
    await page.waitForSelector('ts-row[data-cell="P"] .katex');
    expect(await page.locator('.katex').count()).toBeLessThan(700);
    await expect.poll(() => page.locator('ts-row').count(), { timeout: 30_000 }).toBe(sheet.cells.length);

    const last = sheet.cells.at(-1)?.id ?? '';
    await page.locator('ts-row[data-cell="P"] .label').click();
    await page.locator('ts-row[data-cell="P"] [data-column="1"]').focus();
    await page.keyboard.press('Control+End');
    expect(await page.evaluate(() => document.activeElement?.closest('ts-row')?.getAttribute('data-cell'))).toBe(last);
    await expect.poll(() => page.locator(`ts-row[data-cell="${last}"] .katex`).count()).toBeGreaterThan(0);
    await page.keyboard.press('Control+Home');

    await page.locator('ts-row[data-cell="P"] [data-column="2"]').click();
    await page.keyboard.press('Control+a');
    await page.keyboard.type('9.25 kW');
    // Far below the window, while the value is still being typed.
    const wanted = resultOf('F1_38', '9.25 kW');
    const far = page.locator('ts-row[data-cell="F1_38"]');
    await expect.poll(() => far.locator('.result .value').first().textContent()).toContain(wanted?.result?.split(' ')[0]);
    await far.evaluate((row) => row.scrollIntoView());
    await expect
      .poll(() => far.locator('annotation').allTextContents())
      .toContainEqual(expect.stringContaining(wanted?.substituted ?? 'nothing'));
    expect([...faults, ...violations]).toEqual([]);
    await close();
  }, 120_000);
});
