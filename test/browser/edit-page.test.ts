// Lines of the sheet edited on the page, by keyboard alone: a formula with an error seen and corrected, new lines, and the way back.
// What the page prints is compared with the record computed here in Node from the same sheet.

import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { makeRecord } from '../../src/record/index.ts';
import { type Cell, calculate } from '../../src/sheet/index.ts';
import { connect, example, idOf, type Opened, open, resultsOf, resultsOn } from './open.ts';

let browser: Browser;
let opened: Opened;
let page: Page;

beforeAll(async () => {
  browser = await connect();
});
afterAll(() => browser.close());
beforeEach(async () => {
  opened = await open(browser);
  page = opened.page;
});
afterEach(async () => {
  const { requests, violations, faults } = opened;
  await opened.close();
  expect(requests, 'requests after load').toEqual([]);
  expect(violations, 'breaches of the policy').toEqual([]);
  expect(faults, 'faults').toEqual([]);
});

const rowOf = (name: string) => page.locator(`ts-row[data-cell="${idOf(name)}"]`);
const focusedRow = () => page.evaluate(() => document.activeElement?.closest('ts-row')?.getAttribute('data-cell'));
const undoable = () => page.locator('.tools button').first().isEnabled();
const recordOf = (cells: readonly Cell[]) => makeRecord(calculate({ ...example, cells }));
const derived = (name: string) => {
  const cell = example.cells.find((one) => one.id === idOf(name));
  if (cell?.kind !== 'derived') throw new Error(`${name} is not derived`);
  return cell;
};

async function toRow(name: string) {
  await rowOf(name).locator('.label').click();
  await rowOf(name).locator('[data-column="1"]').focus();
}

async function editFormula(name: string, text: string) {
  await toRow(name);
  await page.keyboard.press('Enter');
  await rowOf(name).locator('ts-formula-editor .cm-content').waitFor();
  await page.keyboard.press('Control+a');
  await page.keyboard.type(text);
}

describe('a formula on the page', () => {
  it('is changed by keyboard: an error is seen with the last good numbers, corrected, kept, and taken back', async () => {
    const before = await resultsOn(page);
    const cell = derived('F_u');
    const wanted = resultsOf(
      recordOf(example.cells.map((one) => (one.id === cell.id ? { ...cell, formula: `1.1*(${cell.formula})` } : one))),
    );
    expect(wanted[cell.id]).not.toEqual(before[cell.id]);

    await editFormula('F_u', `1.1*(${cell.formula}`);
    await expect.poll(() => rowOf('F_u').locator('.problem.error').count()).toBe(1);
    expect(await resultsOn(page)).toEqual(before);
    await page.keyboard.press('End');
    await page.keyboard.type(')');
    await expect.poll(() => rowOf('F_u').locator('.problem.error').count()).toBe(0);
    await expect.poll(() => resultsOn(page)).toEqual(wanted);
    expect(await undoable()).toBe(false);
    await page.keyboard.press('Enter');
    await expect.poll(undoable).toBe(true);
    expect(await rowOf('F_u').locator('ts-formula-editor').count()).toBe(0);
    expect(await focusedRow()).toBe(cell.id);
    await expect.poll(() => resultsOn(page)).toEqual(wanted);
    await page.keyboard.press('Control+z');
    await expect.poll(() => resultsOn(page)).toEqual(before);
  });

  it('comes back by Escape, with the focus in its row', async () => {
    const before = await resultsOn(page);
    await editFormula('F_u', '2*K_A*P/v');
    await expect.poll(() => resultsOn(page)).not.toEqual(before);
    await page.keyboard.press('Escape');
    // The first one may have closed a list of proposals.
    if ((await rowOf('F_u').locator('ts-formula-editor').count()) > 0) await page.keyboard.press('Escape');
    await expect.poll(() => resultsOn(page)).toEqual(before);
    expect(await undoable()).toBe(false);
    expect(await focusedRow()).toBe(idOf('F_u'));
  });
});
