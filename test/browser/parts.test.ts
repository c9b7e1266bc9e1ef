// Parts that come into a sheet on the page: blocks of templates, tables from the clipboard and from files; and the sheet beside its template.
// What the page prints is compared with the record computed here in Node from the same steps.

import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { makeRecord } from '../../src/record/index.ts';
import {
  applyEdit,
  type Cell,
  calculate,
  insertBlock,
  newFromTemplate,
  readSheet,
  type Sheet,
  writeSheet,
} from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { connect, drop, example, type Opened, open, resultsOn } from './open.ts';

let browser: Browser;
let opened: Opened;
let page: Page;

const begin = async (options: Parameters<typeof open>[1] = {}) => {
  opened = await open(browser, { permissions: ['clipboard-read', 'clipboard-write'], ...options });
  page = opened.page;
};
const end = async () => {
  const { requests, violations, faults } = opened;
  await opened.close();
  expect(requests, 'requests after load').toEqual([]);
  expect(violations, 'breaches of the policy').toEqual([]);
  expect(faults, 'faults').toEqual([]);
};
beforeAll(async () => {
  browser = await connect();
});
afterAll(() => browser.close());
beforeEach(() => begin());
afterEach(end);

function template(id: string): Sheet {
  const read = readSheet(readFileSync(new URL(`../../templates/${id}.sheet.json`, import.meta.url), 'utf8'));
  if (!read.ok) throw new Error(read.problems[0]?.message);
  return read.value;
}
const tableRow = (name: string) => {
  const cell = example.cells.find((one) => one.kind === 'table' && one.name === name);
  return page.locator(`ts-row[data-cell="${cell?.id}"]`);
};
const focused = () => page.evaluate(() => document.activeElement?.closest('ts-row')?.getAttribute('data-cell'));

describe('a block of a template', () => {
  const belt = template('flat-belt-open');
  /** The same step in Node. */
  const withBlock = (sheet: Sheet, suffix: string, from: string) => {
    const done = insertBlock(sheet, belt, { suffix, at: sheet.cells.length, connect: [{ name: 'n_1', formula: from }] });
    if (!done.ok) throw new Error(done.problems[0]?.message);
    return { sheet: applyEdit(sheet, done.edit).sheet, first: done.cells[0] };
  };
  /** Behind the last section, by the words at its foot. */
  const putIn = async (suffix: string, from: string) => {
    await page.locator('.row.entry .put-in').last().click();
    await page.locator('dialog.block [data-key="template"]').selectOption({ label: belt.title });
    expect(await page.locator('dialog.block [data-key="suffix"]').inputValue()).toBe(suffix);
    await page.locator('dialog.block [data-taken="n_1"]').fill(from);
    await expect.poll(() => page.locator('dialog.block .lines tbody tr').count()).toBeGreaterThan(60);
    await page.getByRole('button', { name: `Put in block ${suffix}` }).click();
    await page.locator('dialog.block').waitFor({ state: 'detached' });
  };

  it('comes twice, each time with a suffix and a given taken from the stage before, and goes by one undo each', async () => {
    const before = await resultsOn(page);
    const one = withBlock(example, 'B', 'n_2');
    const two = withBlock(one.sheet, 'C', 'n_2_B');
    await putIn('B', 'n_2');
    await expect.poll(focused).toBe(one.first);
    await putIn('C', 'n_2_B');
    await expect.poll(focused).toBe(two.first);
    const record = makeRecord(calculate(two.sheet, solver));
    expect(record.problems.filter(({ severity }) => severity === 'error')).toEqual([]);
    expect(record.steps.flatMap(({ cases }) => cases).every(({ closes }) => closes)).toBe(true);
    const wanted = record.steps.filter(({ kind, name }) => kind === 'derived' && /_[BC]$/u.test(name ?? ''));
    expect(wanted.length).toBeGreaterThan(70);
    await expect
      .poll(async () => {
        const now = await resultsOn(page);
        return wanted.map(({ cell }) => now[cell]);
      })
      .toEqual(wanted.map(({ cases }) => cases.map(({ result }) => result)));
    expect(await page.getByRole('button', { name: 'Undo' }).getAttribute('title')).toContain('block C');
    await page.keyboard.press('Control+z');
    await page.keyboard.press('Control+z');
    await expect.poll(() => resultsOn(page)).toEqual(before);
  });

  it('is refused with a sentence where a connection is of another kind or the suffix is taken, and nothing is touched', async () => {
    await page.locator('.row.entry .put-in').last().click();
    await page.locator('dialog.block [data-key="template"]').selectOption({ label: belt.title });
    await page.locator('dialog.block [data-taken="n_1"]').fill('P');
    await expect
      .poll(() => page.locator('dialog.block .problem.error').allTextContents())
      .toEqual([expect.stringContaining('n_1_B')]);
    await page.getByRole('button', { name: 'Put in block' }).click();
    expect(await page.locator('dialog.block').count()).toBe(1);
    await page.locator('dialog.block [data-taken="n_1"]').fill('');
    await page.locator('dialog.block [data-key="suffix"]').fill('B-2');
    await expect
      .poll(() => page.locator('dialog.block .problem.error').allTextContents())
      .toEqual([expect.stringContaining('B-2')]);
    await page.keyboard.press('Escape');
    await page.locator('dialog.block').waitFor({ state: 'detached' });
    expect(await page.getByRole('button', { name: 'Undo' }).isDisabled()).toBe(true);
  });
});

describe('a table', () => {
  const edit = async () => {
    const row = tableRow('service');
    await row.scrollIntoViewIfNeeded();
    await row.locator('[data-column="1"]').first().focus();
    await page.keyboard.press('Shift+Enter');
    await page.locator('ts-table-editor input[data-line="3"]').first().waitFor();
  };
  const entry = (row: number, column: number) =>
    page.locator(`ts-table-editor input[data-line="${row + 3}"][data-column="${column}"]`);
  const kept = () => tableRow('service').locator('table.data').first().locator('tbody tr');

  it('marks the row that is chosen and read, in words', async () => {
    await tableRow('service').scrollIntoViewIfNeeded();
    expect(await tableRow('service').locator('tr.used .use').allTextContents()).toEqual(['◂ chosen in 2.2; read in 2.4']);
  });

  it('takes tab-separated text where it is pasted, is typed by keys, copied as text, and comes back by one undo', async () => {
    const rows = await kept().count();
    await edit();
    await page.evaluate(() => navigator.clipboard.writeText('first\t1.05\r\nsecond\t1.15\r\n'));
    await entry(rows - 1, 0).focus();
    await page.keyboard.press('Alt+Enter');
    await page.keyboard.press('Control+v');
    await expect.poll(() => entry(rows + 1, 1).inputValue()).toBe('1.15');
    await entry(rows + 1, 1).focus();
    await page.keyboard.press('Enter');
    await page.keyboard.type('third');
    await page.keyboard.press('End');
    await page.keyboard.press('ArrowRight');
    await page.keyboard.type('much');
    await expect.poll(() => page.locator('ts-table-editor .table-faults').textContent()).toContain(`row ${rows + 3}, column K_A`);
    expect(await entry(rows + 2, 1).getAttribute('aria-invalid')).toBe('true');
    await entry(rows + 2, 1).fill('1.25');
    await page.getByRole('button', { name: 'Copy as text' }).click();
    await expect.poll(() => page.evaluate(() => navigator.clipboard.readText())).toContain('second\t1.15\nthird\t1.25');
    expect(await page.getByRole('button', { name: 'Undo' }).isDisabled()).toBe(true);
    await entry(0, 0).press('Control+Enter');
    await expect.poll(() => kept().count()).toBe(rows + 3);
    expect(await page.locator('ts-table-editor').count()).toBe(0);
    await page.keyboard.press('Control+z');
    await expect.poll(() => kept().count()).toBe(rows);
    expect(await page.getByRole('button', { name: 'Undo' }).isDisabled()).toBe(true);
  });

  it('is imported from a CSV file after a look at it: guesses can be changed, a bad row is told by its place', async () => {
    await edit();
    const text =
      'duty;K_A (1)\nlight load, soft start, up to 10 h a day;1,05\nmedium load, soft start, 10 to 16 h a day;1,25\nheavy;one\n';
    await page
      .locator('ts-table-editor input[type="file"]')
      .setInputFiles({ name: 'factors.csv', mimeType: 'text/csv', buffer: Buffer.from(text) });
    const panel = page.locator('.table-import');
    await expect.poll(() => panel.locator('tbody tr').count()).toBe(3);
    expect(await panel.locator('.problem').allTextContents()).toEqual([expect.stringContaining('row 3, column K_A')]);
    expect(await panel.locator('.will').textContent()).toContain('3 rows in place of');
    expect(await panel.getByLabel('Decimal sign').inputValue()).toBe(',');
    await panel.getByLabel('Columns are parted by').selectOption('tab');
    await expect.poll(() => panel.locator('thead th[scope="col"]').count()).toBe(1);
    await panel.getByLabel('Columns are parted by').selectOption('semicolon');
    await expect.poll(() => panel.locator('thead th[scope="col"]').count()).toBe(2);
    await page.getByRole('button', { name: 'Take the 3 rows' }).click();
    await expect.poll(() => entry(1, 1).inputValue()).toBe('1.25');
    await entry(2, 1).press('Control+Enter');
    await expect.poll(() => kept().count()).toBe(3);
    expect(await kept().nth(2).locator('.bad-entry').textContent()).toBe('one');
    expect(await tableRow('service').locator('.problem.error').allTextContents()).toEqual([
      expect.stringContaining('row 3, column K_A'),
    ]);
  });
});

describe('beside its template', () => {
  const capstan = template('capstan');
  const changed: Sheet = {
    ...newFromTemplate(capstan),
    cells: capstan.cells.map(
      (cell): Cell => (cell.kind === 'derived' && cell.name === 'k' ? { ...cell, formula: 'exp(mu*theta)' } : cell),
    ),
  };
  const was = capstan.cells.find((cell) => cell.kind === 'derived' && cell.name === 'k');

  it('a changed formula is shown, was and now, at the head and at its line, and led to from the side', async () => {
    await drop(page, 'line.sheet.json', writeSheet(changed));
    await expect
      .poll(() => page.locator('#beside-template').textContent())
      .toContain('Formulas as in template capstan, version 1, except:');
    expect(await page.locator('.head dl.differences dd code').allTextContents()).toEqual([
      was?.kind === 'derived' ? was.formula : '',
      'exp(mu*theta)',
    ]);
    await page.locator('#beside-template button').click();
    await expect.poll(focused).toBe(was?.id);
    expect(await page.locator(`ts-row[data-cell="${was?.id}"] .remark`).allTextContents()).toContainEqual(
      expect.stringContaining('formula changed: in template capstan, version 1'),
    );
  });

  it('a version that is not at hand is said, and so is a template that is not', async () => {
    await drop(page, 'other.sheet.json', writeSheet({ ...changed, template: { id: 'capstan', version: 7 } }));
    await expect
      .poll(() => page.locator('#beside-template').textContent())
      .toContain('made from version 7, which is not at hand');
    await drop(page, 'own.sheet.json', writeSheet({ ...changed, template: { id: 'somewhere-else', version: 2 } }));
    await expect
      .poll(() => page.locator('#beside-template').textContent())
      .toContain('template somewhere-else, version 2, is not at hand');
  });
});

describe('for everybody', () => {
  const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
  const findings = () =>
    page.evaluate(async () => {
      const { axe } = globalThis as unknown as {
        axe: {
          run(root: Document): Promise<{ violations: { id: string; nodes: { html: string; failureSummary: string }[] }[] }>;
        };
      };
      const { violations } = await axe.run(document);
      return violations.map(
        ({ id, nodes }) => `${id}: ${nodes.map((node) => `${node.html.slice(0, 160)} ${node.failureSummary}`).join(' | ')}`,
      );
    });

  it.each([
    ['light', 1440],
    ['dark', 320],
  ] as const)(
    'no findings of the accessibility rules, %s at %i px: a table with a fault and a preview, a block with a refusal',
    async (colorScheme, width) => {
      await end();
      await begin({ colorScheme, viewport: { width, height: 900 } });
      await page.evaluate(axeSource);
      const row = tableRow('service');
      await row.scrollIntoViewIfNeeded();
      await row.locator('[data-column="1"]').first().focus();
      await page.keyboard.press('Shift+Enter');
      await page.locator('ts-table-editor input[data-line="4"][data-column="1"]').fill('much');
      await page
        .locator('ts-table-editor input[type="file"]')
        .setInputFiles({ name: 'a.csv', mimeType: 'text/csv', buffer: Buffer.from('duty,K_A\na,1\nb\n') });
      await page.locator('.table-import .problem').first().waitFor();
      expect(await findings()).toEqual([]);
      await page.keyboard.press('Escape');
      await page.locator('.table-import').waitFor({ state: 'detached' });
      await page.keyboard.press('Escape');
      await page.locator('.row.entry .put-in').first().click();
      await page.locator('dialog.block [data-key="template"]').selectOption({ index: 2 });
      await page.locator('dialog.block .lines tbody tr').first().waitFor();
      expect(await findings()).toEqual([]);
      await page.locator('dialog.block [data-key="suffix"]').fill('?');
      await page.locator('dialog.block .problem.error').waitFor();
      expect(await findings()).toEqual([]);
      expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true);
    },
  );
});
