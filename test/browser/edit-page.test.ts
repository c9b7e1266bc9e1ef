// Lines of the sheet edited on the page, by keyboard alone: a formula with an error seen and corrected, new lines, and the way back.
// What the page prints is compared with the record computed here in Node from the same sheet.

import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { makeRecord } from '../../src/record/index.ts';
import { type Cell, calculate, writeSheet } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { connect, drop, example, idOf, type Opened, open, resultsOf, resultsOn } from './open.ts';

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
const undoable = () => page.getByRole('button', { name: 'Undo' }).isEnabled();
const recordOf = (cells: readonly Cell[]) => makeRecord(calculate({ ...example, cells }, solver));
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

describe('a criterion on the page', () => {
  const criterion = example.cells.find((cell) => cell.kind === 'criterion');
  const row = () => page.locator(`ts-row[data-cell="${criterion?.id}"]`);

  it('without its relation is not kept and loses nothing; with another relation it is judged anew', async () => {
    if (criterion?.kind !== 'criterion') throw new Error('the example has no criterion');
    const { left, right } = criterion;
    const wanted = resultsOf(
      recordOf(
        example.cells.map((cell) => (cell.id === criterion.id ? { ...criterion, relation: '<', left: `2*(${left})` } : cell)),
      ),
    );
    await row().locator('.label').click();
    await row().locator('.formula').click();
    const line = row().locator('ts-formula-editor .cm-content');
    await line.waitFor();
    expect(await line.textContent()).toBe(`${left} ${criterion.relation} ${right}`);
    await page.keyboard.press('Control+a');
    await page.keyboard.type(`2*(${left})`);
    await row().locator('.problem.error').waitFor();
    await page.keyboard.press('Enter');
    await page.locator('.label').first().click();
    expect(await line.textContent()).toBe(`2*(${left})`);
    await line.click();
    await page.keyboard.press('End');
    await page.keyboard.type(` < ${right}`);
    await expect.poll(() => resultsOn(page)).toEqual(wanted);
    await page.keyboard.press('Enter');
    await expect.poll(undoable).toBe(true);
    expect(await focusedRow()).toBe(criterion.id);
    expect(await resultsOn(page)).toEqual(wanted);
  });
});

describe('lines of the sheet', () => {
  const lines = () => page.locator('ts-row').evaluateAll((rows) => rows.map((row) => (row as HTMLElement).dataset['cell']));

  it('a new derived quantity from the foot of a section computes, and undo takes it out', async () => {
    const before = await lines();
    const results = await resultsOn(page);
    await toRow('F_u');
    await page.keyboard.press('Control+Enter');
    const line = page.locator('ts-entry-line');
    await line.locator('.cm-content').waitFor();
    await page.keyboard.type('F_trial = 2*F_u');
    await expect.poll(() => line.locator('.edit-becomes').textContent()).toContain('a derived quantity');
    await page.keyboard.press('Enter');
    await expect.poll(async () => (await lines()).length).toBe(before.length + 1);
    const added = (await lines()).find((id) => !before.includes(id)) ?? '';
    const cell: Cell = { id: added, kind: 'derived', name: 'F_trial', formula: '2*F_u' };
    const wanted = recordOf([...example.cells, cell]).steps.find((step) => step.cell === added);
    await expect.poll(async () => (await resultsOn(page))[added]).toEqual(wanted?.cases.map((each) => each.result));
    // At the end of the section of F_u, with the focus still in the line, which is empty again.
    expect(await page.locator(`.stretch:has(> ts-row[data-cell="${added}"]:last-child) + .entry ts-entry-line`).count()).toBe(1);
    expect(await page.evaluate(() => document.activeElement?.closest('ts-entry-line') !== null)).toBe(true);
    expect(await line.locator('.cm-content').textContent()).not.toContain('F_trial');
    await page.keyboard.press('Escape');
    await expect.poll(focusedRow).toBe(idOf('F_u'));
    await page.keyboard.press('Control+z');
    await expect.poll(lines).toEqual(before);
    expect(await resultsOn(page)).toEqual(results);
  });

  it('are moved and removed by keyboard, with the focus kept and the way back', async () => {
    const before = await lines();
    const id = idOf('F_u');
    const at = before.indexOf(id);
    await toRow('F_u');
    await page.keyboard.press('Alt+ArrowDown');
    await expect.poll(lines).toEqual(before.toSpliced(at, 1).toSpliced(at + 1, 0, id));
    await expect.poll(focusedRow).toBe(id);
    await page.keyboard.press('Alt+ArrowUp');
    await expect.poll(lines).toEqual(before);
    await expect.poll(focusedRow).toBe(id);
    await page.keyboard.press('Control+Delete');
    await expect.poll(lines).toEqual(before.toSpliced(at, 1));
    expect(await focusedRow()).toBe(before[at + 1]);
    await page.keyboard.press('Control+z');
    await expect.poll(lines).toEqual(before);
    await expect.poll(() => resultsOn(page)).toEqual(resultsOf(recordOf(example.cells)));
  });

  it('a quantity renamed in the form of its line is renamed wherever it is used, in one step', async () => {
    const before = await resultsOn(page);
    await toRow('F_u');
    await page.keyboard.press('Shift+Enter');
    const field = rowOf('F_u').locator('[data-key="name"]').locator('input, textarea').first();
    await field.fill('F_pull');
    await rowOf('F_u').locator('.cell-actions button').first().click();
    await expect.poll(undoable).toBe(true);
    await expect.poll(() => resultsOn(page)).toEqual(before);
    expect(await focusedRow()).toBe(idOf('F_u'));
    expect(await page.locator('ts-row .problem.error').count()).toBe(0);
    expect(await page.getByRole('button', { name: 'Undo' }).getAttribute('title')).toContain('F_u renamed F_pull');
    await page.keyboard.press('Control+z');
    await expect.poll(undoable).toBe(false);
    expect(await resultsOn(page)).toEqual(before);
  });
});

describe('a sheet without a line', () => {
  it('is begun from its one new line: a heading opens a section, and what follows stands in it', async () => {
    const text = writeSheet({ format: 'tightside-sheet/1', title: 'Empty', cells: [] });
    await drop(page, 'empty.sheet.json', text);
    await expect.poll(() => page.locator('h1').textContent()).toBe('Empty');
    await page.getByRole('button', { name: 'New line' }).click();
    await page.locator('ts-entry-line .cm-content').waitFor();
    await page.keyboard.type('# Forces');
    await page.keyboard.press('Enter');
    await expect.poll(() => page.locator('.section h2').textContent()).toContain('Forces');
    await expect.poll(() => page.evaluate(() => document.activeElement?.closest('ts-entry-line') != null)).toBe(true);
    await page.keyboard.type('F_1 = 900 N');
    await page.keyboard.press('Enter');
    await expect.poll(() => page.locator('ts-row.given .result').first().textContent()).toContain('900');
    await expect.poll(() => page.evaluate(() => document.activeElement?.closest('ts-entry-line') != null)).toBe(true);
    expect(await page.locator('.section').count()).toBe(1);
  });
});

describe('accessibility rules', () => {
  const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
  const findings = async () => {
    await page.evaluate(axeSource);
    return page.evaluate(async (row) => {
      interface Finding {
        readonly id: string;
        readonly nodes: readonly { readonly target: readonly string[]; readonly failureSummary?: string }[];
      }
      const { axe } = globalThis as unknown as {
        axe: { run(context: object, options: object): Promise<{ violations: Finding[]; passes: unknown[] }> };
      };
      const context = { include: [[`.section:has(#row-${row})`]], exclude: [['.katex-html']] };
      const { violations, passes } = await axe.run(context, { resultTypes: ['violations'], iframes: false });
      if (passes.length < 5) return [`only ${passes.length} rules ran`];
      return violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.target.join(' ')} ${nodes[0]?.failureSummary}`);
    }, idOf('F_u'));
  };

  it('find nothing in a chosen line, a formula with an error, a form, a new line', async () => {
    await toRow('F_u');
    expect(await findings(), 'a chosen line').toEqual([]);
    await editFormula('F_u', 'K_A*P/(v');
    await rowOf('F_u').locator('.problem.error').waitFor();
    expect(await findings(), 'a formula with an error').toEqual([]);
    await page.keyboard.press('Escape');
    if ((await rowOf('F_u').locator('ts-formula-editor').count()) > 0) await page.keyboard.press('Escape');
    await page.keyboard.press('Shift+Enter');
    await rowOf('F_u').locator('.cell-actions').waitFor();
    expect(await findings(), 'a form').toEqual([]);
    await page.keyboard.press('Escape');
    await expect.poll(focusedRow).toBe(idOf('F_u'));
    await page.keyboard.press('Control+Enter');
    await page.locator('ts-entry-line .cm-content').waitFor();
    await page.keyboard.type('x = 2*F_nowhere');
    expect(await findings(), 'a new line').toEqual([]);
  });
});
